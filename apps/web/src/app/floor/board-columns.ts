import { PLACES, type Place } from '#shared/route/route';
import type { BoardCard } from './board-card';

/** The places that the board has columns for, in order. What was shipped has left the floor. */
export const COLUMNS = PLACES.filter((place) => place !== 'SHIPPED');

export const SHELVES = ['READY', 'WORKING', 'HOLDING'] as const;

/** The cards of one place on its three shelves. */
export interface BoardColumn {
  readonly place: Place;
  readonly READY: readonly BoardCard[];
  readonly WORKING: readonly BoardCard[];
  readonly HOLDING: readonly BoardCard[];
  readonly count: number;
  readonly boards: number;
}

/** Puts cards onto the shelves of their places: ready in the plan's order, working by since when, holding by when it clears. */
export function columnsOf(cards: readonly BoardCard[]): BoardColumn[] {
  const byPlace = new Map<Place, BoardCard[]>(COLUMNS.map((place) => [place, []]));
  for (const card of cards) byPlace.get(card.card.place)?.push(card);
  return COLUMNS.map((place) => {
    const here = byPlace.get(place) ?? [];
    const shelf = (name: (typeof SHELVES)[number], by: (card: BoardCard) => number) =>
      here.filter((card) => card.card.shelf === name).sort(inOrder(by));
    return {
      place,
      READY: shelf('READY', plannedStart),
      WORKING: shelf('WORKING', (card) => card.since ?? Infinity),
      HOLDING: shelf('HOLDING', (card) => card.card.holds[0]?.clearAt ?? Infinity),
      count: here.length,
      boards: here.reduce((sum, card) => sum + card.batch.floor.boards, 0),
    };
  });
}

/** The same columns, with those that hold the very same cards as before as the very same objects. */
export function keepColumns(
  before: readonly BoardColumn[],
  after: readonly BoardColumn[],
): readonly BoardColumn[] {
  const kept = after.map((column, index) => {
    const old = before[index];
    return old && SHELVES.every((shelf) => sameItems(old[shelf], column[shelf])) ? old : column;
  });
  return sameItems(before, kept) ? before : kept;
}

export function sameItems(a: readonly unknown[], b: readonly unknown[]): boolean {
  return a.length === b.length && a.every((item, index) => item === b[index]);
}

function plannedStart(card: BoardCard): number {
  const at = card.batch.forecast?.nextStartAt;
  return at ? Date.parse(at) : Infinity;
}

/** By the given figure; what has none comes last. Then by ship-by, then by code, so that cards never swap by themselves. */
function inOrder(by: (card: BoardCard) => number) {
  return (a: BoardCard, b: BoardCard): number => {
    const [one, other] = [by(a), by(b)];
    if (one !== other) return one < other ? -1 : 1;
    const [shipA, shipB] = [a.batch.floor.shipBy ?? '9999', b.batch.floor.shipBy ?? '9999'];
    if (shipA !== shipB) return shipA < shipB ? -1 : 1;
    return a.batch.floor.code.localeCompare(b.batch.floor.code, 'en', { numeric: true });
  };
}
