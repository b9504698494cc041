import type { Instant } from '#shared/time/instant';
import { rankOf, type Place } from '#shared/route/route';

/** Where an order or a line stands, the least advanced first. */
export const ORDER_STATUSES = ['RECEIVED', 'PLANNED', 'IN_WORK', 'READY', 'SHIPPED'] as const;
export type OrderStatus = (typeof ORDER_STATUSES)[number];

/** A batch as far as it makes an order line. */
export interface LineMaker {
  place: Place;
  /** How many of the line's boards come from it. */
  boards: number;
  /** How much of the batch is done, in whole percent. */
  progressPercent: number;
  /** When the plan expects it to be ready, or when it was; null when that is not known. */
  readyAt: Instant | null;
}

/** What follows from the floor for a line or for a whole order. */
export interface Standing {
  status: OrderStatus;
  /** The least advanced place of the batches; null when there is none. */
  stage: Place | null;
  /** Weighted by boards; boards that no batch makes have 0. */
  progressPercent: number;
  /** When the last board is ready; null when that is not known of all boards. */
  readyAt: Instant | null;
}

/** Where a line of `count` boards stands. Boards that no batch makes keep it from being ready. */
export function lineStanding(count: number, makers: readonly LineMaker[]): Standing {
  const covered = makers.reduce((sum, maker) => sum + maker.boards, 0);
  const done = makers.reduce((sum, maker) => sum + maker.boards * maker.progressPercent, 0);
  const times = makers.map((maker) => maker.readyAt);
  return {
    status: lineStatus(covered >= count, makers),
    stage: leastAdvanced(makers.map((maker) => maker.place)),
    progressPercent: Math.floor(done / Math.max(count, covered, 1)),
    readyAt: covered >= count ? latest(times) : null,
  };
}

/** Where an order stands: with its least advanced line. `count` is a line's number of boards. */
export function orderStanding(lines: readonly (Standing & { count: number })[]): Standing {
  const boards = lines.reduce((sum, line) => sum + line.count, 0);
  const done = lines.reduce((sum, line) => sum + line.count * line.progressPercent, 0);
  const ranks = lines.map((line) => ORDER_STATUSES.indexOf(line.status));
  return {
    status: ORDER_STATUSES[Math.min(...ranks)] ?? 'RECEIVED',
    stage: leastAdvanced(lines.flatMap((line) => line.stage ?? [])),
    progressPercent: Math.floor(done / Math.max(boards, 1)),
    readyAt: latest(lines.map((line) => line.readyAt)),
  };
}

function lineStatus(isCovered: boolean, makers: readonly LineMaker[]): OrderStatus {
  if (makers.length === 0) return 'RECEIVED';
  const all = (place: Place) => makers.every((maker) => rankOf(maker.place) >= rankOf(place));
  if (isCovered && all('SHIPPED')) return 'SHIPPED';
  if (isCovered && all('READY')) return 'READY';
  const isBegun = makers.some((maker) => rankOf(maker.place) > rankOf('QUEUED'));
  return isBegun ? 'IN_WORK' : 'PLANNED';
}

function leastAdvanced(places: readonly Place[]): Place | null {
  return [...places].sort((a, b) => rankOf(a) - rankOf(b))[0] ?? null;
}

function latest(times: readonly (Instant | null)[]): Instant | null {
  const known = times.filter((time) => time !== null);
  return known.length === times.length && known.length > 0 ? Math.max(...known) : null;
}
