import { MINUTE_MS, type Instant } from './instant';
import { daysBetween, toLocal, weekdayOf, type LocalDate } from './zone';

const WEEKDAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** "14:20" on the zone's same date as now, "Wed 09:05" up to six dates ahead or behind, "Wed 9 Dec 09:05" beyond. */
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

/** "45 min", "1 h 20 min", "12 h"; from a day on to the nearest hour, "2 d 3 h". Less than nothing is "0 min". */
export function durationWords(minutes: number): string {
  const whole = Math.max(0, Math.round(minutes));
  if (whole >= 1440) {
    const hours = Math.round(whole / 60);
    return joined([Math.floor(hours / 24), 'd'], [hours % 24, 'h']);
  }
  if (whole >= 60) return joined([Math.floor(whole / 60), 'h'], [whole % 60, 'min']);
  return `${whole} min`;
}

/** How long ago: "1 s", then as `durationWords`: "3 min", "2 h". */
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
