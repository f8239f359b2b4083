/** When a digest is due, and what it takes along. Pure. */

export interface DigestTime {
  /** Names the digest, so that it is written once: an hour (UTC) or a day of the person's own. */
  key: string;
  /** What came before this moment belongs to it. */
  before: Date;
}

/** The newest digest that is due by now: of the last full hour, or of the last seven o'clock in the morning there. */
export function digestDue(mode: "hourly" | "daily", timeZone: string, now: Date): DigestTime {
  if (mode === "hourly") {
    const before = new Date(Math.floor(now.getTime() / HOUR_MS) * HOUR_MS);
    return { key: before.toISOString().slice(0, 13), before };
  }
  const zone = isZone(timeZone) ? timeZone : "UTC";
  const local = localTime(now, zone);
  // Days of the calendar, so that one of 23 or 25 hours counts as one.
  const day = new Date(Date.UTC(local.getUTCFullYear(), local.getUTCMonth(), local.getUTCDate()));
  if (local.getUTCHours() < MORNING_HOUR) day.setUTCDate(day.getUTCDate() - 1);
  return {
    key: day.toISOString().slice(0, 10),
    before: instantOf(day.getTime() + MORNING_HOUR * HOUR_MS, zone),
  };
}

/** What a clock there shows, as if it were UTC. */
function localTime(at: Date, timeZone: string): Date {
  const format = new Intl.DateTimeFormat("en-GB", {
    timeZone,
    hourCycle: "h23",
    ...({ year: "numeric", month: "2-digit", day: "2-digit" } as const),
    ...({ hour: "2-digit", minute: "2-digit", second: "2-digit" } as const),
  });
  const part = Object.fromEntries(format.formatToParts(at).map(({ type, value }) => [type, Number(value)]));
  return new Date(Date.UTC(part.year, part.month - 1, part.day, part.hour, part.minute, part.second));
}

/** The moment at which a clock there shows this; twice, for the offset may differ between guess and moment. */
function instantOf(localMs: number, timeZone: string): Date {
  let at = localMs;
  for (let i = 0; i < 2; i++)
    at = localMs - (localTime(new Date(at), timeZone).getTime() - Math.floor(at / 1000) * 1000);
  return new Date(at);
}

function isZone(timeZone: string): boolean {
  try {
    new Intl.DateTimeFormat("en", { timeZone });
    return true;
  } catch {
    return false;
  }
}

const HOUR_MS = 60 * 60 * 1000;
const MORNING_HOUR = 7;
