/** A date in a table of sweeps. Pure. */

export type Taken = { at: Date | null } | { problem: string };

/** `2026-09-14` (noon) or `2026-09-14 17:20`, UTC, also with T, seconds or Z; empty: not known. */
export function parseTaken(text: string, now: Date): Taken {
  const given = text.trim();
  if (given === "") return { at: null };
  const found = PATTERN.exec(given);
  if (!found) return { problem: `“${given}” is no date that is read here: ${EXPECTED}.` };
  const [, day, time] = found;
  const at = new Date(`${day}T${time ?? "12:00"}Z`);
  // A day that the calendar does not have is rolled over, or is no date at all.
  if (Number.isNaN(at.getTime()) || at.toISOString().slice(0, 10) !== day) {
    return { problem: `There is no such day or time as “${given}”: ${EXPECTED}.` };
  }
  if (at.getTime() > now.getTime() + DAY_MS) return { problem: `“${given}” is yet to come.` };
  return { at };
}

const PATTERN = /^(\d{4}-\d{2}-\d{2})(?:[T ](\d{2}:\d{2}(?::\d{2})?)Z?)?$/;
const EXPECTED = "expected 2026-09-14 or 2026-09-14 17:20, in UTC";
const DAY_MS = 24 * 60 * 60 * 1000;
