/** One figure. It is good when it is at most its goal. */
export interface BenchRow {
  name: string;
  value: number;
  goal: number;
  unit: string;
}
