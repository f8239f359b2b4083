import { formatDate, formatDateTime, formatRelative } from "~/services/dates";

interface At {
  /** ISO string or Date; always shown in UTC. */
  at: string | Date;
}

/** `14 Sep 2026, 17:20 UTC`, or with `dateOnly` `14 Sep 2026`. */
export function DateTime({ at, dateOnly = false }: At & { dateOnly?: boolean }) {
  const date = new Date(at);
  return <time dateTime={date.toISOString()}>{dateOnly ? formatDate(date) : formatDateTime(date)}</time>;
}

/** `3 minutes ago`; the full time is its title. */
export function RelativeTime({ at, now }: At & { now?: Date }) {
  const date = new Date(at);
  return (
    <time dateTime={date.toISOString()} title={formatDateTime(date)} suppressHydrationWarning>
      {formatRelative(date, now ?? new Date())}
    </time>
  );
}
