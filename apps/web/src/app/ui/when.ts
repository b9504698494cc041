/** Instants as people say them, in the shop's zone. An instant is ISO 8601 or milliseconds since the epoch. */
export type When = string | number;

const DAY = 86_400_000;
const formats = new Map<string, Intl.DateTimeFormat>();

interface Parts {
  readonly year: number;
  readonly month: string;
  readonly day: string;
  readonly weekday: string;
  readonly clock: string;
  /** 2026-12-01 */
  readonly date: string;
}

/** "14:20" */
export function clockTime(at: When, zone: string): string {
  return parts(at, zone).clock;
}

/** "Tue 1 Dec"; with the year when it is not the one of `now`. */
export function dayName(at: When, zone: string, now?: When): string {
  const { weekday, day, month, year } = parts(at, zone);
  const isOtherYear = now !== undefined && parts(now, zone).year !== year;
  return `${weekday} ${day} ${month}${isOtherYear ? ` ${year}` : ''}`;
}

/** "14:20" today, "Wed 07:40" within six days, "Wed 9 Dec 07:40" beyond. */
export function dayTime(at: When, zone: string, now: When): string {
  const { date, weekday, clock } = parts(at, zone);
  if (date === parts(now, zone).date) return clock;
  if (Math.abs(time(at) - time(now)) < 6 * DAY) return `${weekday} ${clock}`;
  return `${dayName(at, zone, now)} ${clock}`;
}

/** The local date of an instant, 2026-12-01. */
export function localDate(at: When, zone: string): string {
  return parts(at, zone).date;
}

/** "Tue 1 Dec" for a calendar date such as 2026-12-01; with the year when it is not that of `today`. */
export function dateName(date: string, today?: string): string {
  const name = dayName(`${date}T12:00:00Z`, 'UTC');
  return today !== undefined && today.slice(0, 4) !== date.slice(0, 4)
    ? `${name} ${date.slice(0, 4)}`
    : name;
}

/** "just now", "4 min ago", "3 h ago", "2 d ago". */
export function ago(at: When, now: When): string {
  const minutes = Math.floor((time(now) - time(at)) / 60_000);
  if (minutes < 1) return 'just now';
  if (minutes < 60) return `${minutes} min ago`;
  if (minutes < 48 * 60) return `${Math.floor(minutes / 60)} h ago`;
  return `${Math.floor(minutes / 1_440)} d ago`;
}

function time(at: When): number {
  return typeof at === 'number' ? at : Date.parse(at);
}

function parts(at: When, zone: string): Parts {
  let format = formats.get(zone);
  if (!format) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone: zone,
      weekday: 'short',
      year: 'numeric',
      month: 'short',
      day: 'numeric',
      hour: '2-digit',
      minute: '2-digit',
      hourCycle: 'h23',
    });
    formats.set(zone, format);
  }
  const read = Object.fromEntries(
    format.formatToParts(time(at)).map((part) => [part.type, part.value]),
  ) as Record<'weekday' | 'year' | 'month' | 'day' | 'hour' | 'minute', string>;
  const month = read.month.slice(0, 3);
  const number = String(MONTHS.indexOf(month) + 1).padStart(2, '0');
  return {
    year: Number(read.year),
    month,
    day: read.day,
    weekday: read.weekday.slice(0, 3),
    clock: `${read.hour}:${read.minute}`,
    date: `${read.year}-${number}-${read.day.padStart(2, '0')}`,
  };
}

const MONTHS = [
  ...['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun'],
  ...['Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'],
];
