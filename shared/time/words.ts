import { MINUTE_MS, type Instant } from './instant';
import { daysBetween, toLocal, weekdayOf, type LocalDate } from './zone';

const WEEKDAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** "14:20" today, "Wed 09:05" within six days, "Wed 9 Dec 09:05" beyond. */
export function clockWords(zone: string, now: Instant, at: Instant): string {
  const local = toLocal(zone, at);
  const days = daysBetween(toLocal(zone, now).date, local.date);
  if (days === 0) return local.time;
  if (Math.abs(days) <= 6) return `${weekdayWord(local.date)} ${local.time}`;
  return `${dateWords(local.date)} ${local.time}`;
}

/** "Tue 1 Dec". */
export function dateWords(date: LocalDate): string {
  const month = MONTHS[Number(date.slice(5, 7)) - 1] ?? '';
  return `${weekdayWord(date)} ${Number(date.slice(8, 10))} ${month}`;
}

/** "45 min", "1 h 20 min", "12 h", "2 d 3 h". */
export function durationWords(minutes: number): string {
  const whole = Math.max(0, Math.round(minutes));
  const days = Math.floor(whole / 1440);
  const hours = Math.floor((whole % 1440) / 60);
  const rest = whole % 60;
  if (days > 0) return joined([days, 'd'], [hours, 'h']);
  if (hours > 0) return joined([hours, 'h'], [rest, 'min']);
  return `${rest} min`;
}

/** How long ago: "1 s", "3 min", "2 h". */
export function agoWords(milliseconds: number): string {
  const seconds = Math.max(0, Math.round(milliseconds / 1000));
  return seconds < 60 ? `${seconds} s` : durationWords((seconds * 1000) / MINUTE_MS);
}

function joined(...parts: [number, string][]): string {
  return parts
    .filter(([amount]) => amount > 0)
    .map(([amount, unit]) => `${amount} ${unit}`)
    .join(' ');
}

function weekdayWord(date: LocalDate): string {
  return WEEKDAYS[weekdayOf(date) - 1] ?? '';
}
