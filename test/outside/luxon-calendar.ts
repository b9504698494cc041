import { DateTime, IANAZone } from 'luxon';
import type { Hours, Span } from '#shared/time/hours';

/**
 * Working time the slow way, on luxon 3.7.2 (MIT, general-purpose) and without any of our own arithmetic: walk minute by
 * minute, read the wall clock of the zone, and call a minute open when the furthest that clock has ever been lies in a
 * span of that date. "The furthest" is what makes an hour that comes twice one stretch of work.
 */
export interface WalkedMinute {
  at: number;
  /** The date on the clock at its furthest. */
  date: string;
  open: boolean;
}

const MINUTE = 60_000;
/** How long before the window the walk begins, so that the clock's furthest is right at its start. */
const WARM_UP_MINUTES = 2 * 1440;

export function walk(hours: Hours, from: number, minutes: number): WalkedMinute[] {
  const walked: WalkedMinute[] = [];
  let furthest = -Infinity;
  let date = '';
  let day = Number.NaN;
  let spans: readonly Span[] = [];
  for (let i = -WARM_UP_MINUTES; i < minutes; i++) {
    const at = from + i * MINUTE;
    furthest = Math.max(furthest, at + luxonOffset(hours.zone, at) * MINUTE);
    if (Math.floor(furthest / (1440 * MINUTE)) !== day) {
      day = Math.floor(furthest / (1440 * MINUTE));
      const wall = DateTime.fromMillis(furthest, { zone: 'utc' });
      date = wall.toFormat('yyyy-MM-dd');
      spans = luxonSpans(hours, wall);
    }
    const minute = furthest / MINUTE - day * 1440;
    const open = spans.some((span) => span.from <= minute && minute < span.to);
    if (i >= 0) walked.push({ at, date, open });
  }
  return walked;
}

const asked = new Map<string, Map<number, number>>();

/** Minutes ahead of UTC. Every minute is asked of luxon, but once only: each costs microseconds. */
function luxonOffset(name: string, at: number): number {
  const known = asked.get(name) ?? new Map<number, number>();
  asked.set(name, known);
  const offset = known.get(at) ?? IANAZone.create(name).offset(at);
  known.set(at, offset);
  return offset;
}

/** Interval by interval, for hours in which no clock changes: luxon makes an instant of each edge. */
export function edges(hours: Hours, from: string, days: number): [number, number][] {
  const intervals: [number, number][] = [];
  for (let i = 0; i < days; i++) {
    const day = DateTime.fromISO(from, { zone: hours.zone }).plus({ days: i });
    for (const { from: begin, to } of luxonSpans(hours, day)) {
      const edge = (minute: number) =>
        day.set({ hour: Math.floor(minute / 60), minute: minute % 60 }).toMillis();
      const last = intervals.at(-1);
      if (last && last[1] === edge(begin)) last[1] = edge(to);
      else intervals.push([edge(begin), edge(to)]);
    }
  }
  return intervals;
}

/** The instants at which a zone's clock shows a wall time: none, one or two, earliest first. */
export function luxonInstants(zone: string, date: string, minute: number): number[] {
  const wall = DateTime.fromISO(date, { zone: 'utc' }).plus({ minutes: minute });
  const { year, month, day, hour, minute: onClock } = wall;
  return DateTime.fromObject({ year, month, day, hour, minute: onClock }, { zone })
    .getPossibleOffsets()
    .map((possible) => possible.toMillis())
    .filter(
      (at) =>
        DateTime.fromMillis(at, { zone }).toFormat('yyyy-MM-dd HH:mm') ===
        wall.toFormat('yyyy-MM-dd HH:mm'),
    )
    .sort((a, b) => a - b);
}

function luxonSpans(hours: Hours, day: DateTime): readonly Span[] {
  const date = day.toFormat('yyyy-MM-dd');
  const exception = hours.exceptions.find((one) => one.date === date);
  return exception?.spans ?? hours.weekly[day.weekday - 1] ?? [];
}
