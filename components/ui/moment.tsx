const FORMAT = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});
const DAY = new Intl.DateTimeFormat('en-CA', {
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  timeZone: 'UTC',
});

interface MomentProps {
  /** ISO 8601, UTC. */
  at: string;
  dayOnly?: boolean;
}

/**
 * A moment in UTC, said so beside it: the same on every server and every machine that reads it, so
 * two people comparing versions over the telephone name the same minute.
 */
export function Moment({ at, dayOnly = false }: MomentProps) {
  const date = new Date(at);
  return (
    <time dateTime={at} className="whitespace-nowrap">
      {dayOnly ? DAY.format(date) : `${FORMAT.format(date)} UTC`}
    </time>
  );
}
