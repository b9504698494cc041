import type { Place } from '#shared/route/route';

/** A card in the hand of somebody who uses the keyboard: where it came from, and over which place it is. */
export interface Carry {
  readonly batchId: string;
  readonly from: Place;
  readonly over: Place;
}

export type CarryStep =
  /** The key means something else here. */
  | { readonly kind: 'NONE' }
  | { readonly kind: 'GRABBED' | 'OVER'; readonly carry: Carry }
  /** Let go where it may be dropped, where it may not, or where it came from. */
  | { readonly kind: 'DROPPED' | 'REFUSED'; readonly carry: Carry }
  | { readonly kind: 'CANCELLED'; readonly carry: Carry };

/** What a key does to the card whose handle has the focus. */
export function carryKey(
  carry: Carry | null,
  key: string,
  card: { readonly batchId: string; readonly place: Place },
  places: readonly Place[],
  accepts: (place: Place) => boolean,
): CarryStep {
  const isLift = key === ' ' || key === 'Enter';
  if (!carry || carry.batchId !== card.batchId) {
    if (!isLift) return { kind: 'NONE' };
    const { batchId, place } = card;
    return { kind: 'GRABBED', carry: { batchId, from: place, over: place } };
  }
  if (key === 'Escape' || key === 'Tab') return { kind: 'CANCELLED', carry };
  if (isLift) {
    if (carry.over === carry.from) return { kind: 'CANCELLED', carry };
    return { kind: accepts(carry.over) ? 'DROPPED' : 'REFUSED', carry };
  }
  const over = placeTowards(carry.over, key, places);
  return over === null ? { kind: 'NONE' } : { kind: 'OVER', carry: { ...carry, over } };
}

/** The place a key leads to; the same at the ends, null when the key leads nowhere. */
function placeTowards(over: Place, key: string, places: readonly Place[]): Place | null {
  const at = places.indexOf(over);
  switch (key) {
    case 'ArrowLeft':
    case 'ArrowUp':
      return places[Math.max(0, at - 1)] ?? over;
    case 'ArrowRight':
    case 'ArrowDown':
      return places[Math.min(places.length - 1, at + 1)] ?? over;
    case 'Home':
      return places[0] ?? over;
    case 'End':
      return places.at(-1) ?? over;
    default:
      return null;
  }
}

/** The card that an arrow key leads to from a card that is not carried: up and down its column, or across at its height. */
export function cardTowards(
  columns: readonly (readonly string[])[],
  from: string,
  key: string,
): string | null {
  const column = columns.findIndex((cards) => cards.includes(from));
  const row = columns[column]?.indexOf(from) ?? -1;
  const across = (step: 1 | -1): string | null => {
    for (let at = column + step; at >= 0 && at < columns.length; at += step) {
      const cards = columns[at] ?? [];
      if (cards.length > 0) return cards[Math.min(row, cards.length - 1)] ?? null;
    }
    return null;
  };
  if (column < 0) return null;
  switch (key) {
    case 'ArrowUp':
      return columns[column]?.[row - 1] ?? null;
    case 'ArrowDown':
      return columns[column]?.[row + 1] ?? null;
    case 'ArrowLeft':
      return across(-1);
    case 'ArrowRight':
      return across(1);
    default:
      return null;
  }
}
