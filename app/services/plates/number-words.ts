/** "Plate 3", "Plate 3, version 2". Pure. */
export function numberWords({ number, version }: { number: number; version: number }): string {
  return version > 1 ? `Plate ${number}, version ${version}` : `Plate ${number}`;
}
