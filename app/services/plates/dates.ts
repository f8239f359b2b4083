/** Dates as plates write them; everything is UTC. */

/** `14 Sep 2026` */
export function shortDate(at: Date | string): string {
  const date = new Date(at);
  return `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}`;
}

/** `2026-09-14` */
export function isoDay(at: Date | string): string {
  return new Date(at).toISOString().slice(0, 10);
}

const MONTHS = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split(" ");
