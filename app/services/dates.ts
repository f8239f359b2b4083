/** The one place that turns times into words. Everything is UTC. */

const MONTHS = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split(" ");
const MINUTE_S = 60;
const HOUR_S = 3_600;
const DAY_S = 86_400;
const RELATIVE_UP_TO_DAYS = 30;

/** `14 Sep 2026`; of a text in ISO 8601 too. */
export function formatDate(at: Date | string): string {
  const date = new Date(at);
  return `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}`;
}

/** `14 Sep` */
export function formatDateShort(date: Date): string {
  return `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]}`;
}

/** `14 Sep 2026, 17:20 UTC` */
export function formatDateTime(at: Date | string): string {
  const date = new Date(at);
  const hours = String(date.getUTCHours()).padStart(2, "0");
  const minutes = String(date.getUTCMinutes()).padStart(2, "0");
  return `${formatDate(date)}, ${hours}:${minutes} UTC`;
}

/** `just now`, `3 minutes ago`, `2 hours ago`, `5 days ago`; the date itself beyond thirty days or ahead. */
export function formatRelative(date: Date, now: Date): string {
  const seconds = (now.getTime() - date.getTime()) / 1_000;
  if (seconds < -MINUTE_S || seconds >= RELATIVE_UP_TO_DAYS * DAY_S) return formatDate(date);
  if (seconds < MINUTE_S) return "just now";
  if (seconds < HOUR_S) return ago(seconds / MINUTE_S, "minute");
  if (seconds < DAY_S) return ago(seconds / HOUR_S, "hour");
  return ago(seconds / DAY_S, "day");
}

function ago(count: number, unit: string): string {
  const whole = Math.floor(count);
  return `${whole} ${unit}${whole === 1 ? "" : "s"} ago`;
}
