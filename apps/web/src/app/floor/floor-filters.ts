import { addDays, isLocalDate, weekdayOf } from '#shared/time/zone';

/** Which cards are shown. It lives in the address, so that a link or a bookmark shows the same. */
export interface FloorFilters {
  /** A member's id, or NOBODY; null for everyone. */
  readonly who: string | null;
  /** A design's id; null for all. */
  readonly design: string | null;
  /** This week, or a local date; null for any. */
  readonly due: 'week' | string | null;
  /** Only what the plan expects to be late. */
  readonly late: boolean;
}

export const NOBODY = 'nobody';
export const NO_FILTERS: FloorFilters = { who: null, design: null, due: null, late: false };

/** What a filter asks of a card. */
export interface Filtered {
  /** Those at work on it, and the one it is given to. */
  readonly people: readonly string[];
  readonly designId: string;
  readonly dueDate: string | null;
  readonly isLate: boolean;
}

/** As much of the address as filters need. What makes no sense counts as not given. */
export function readFilters(query: {
  readonly who?: string | undefined;
  readonly design?: string | undefined;
  readonly due?: string | undefined;
  readonly late?: string | undefined;
}): FloorFilters {
  const { who, design, due, late } = query;
  const isDue = due === 'week' || (due !== undefined && isLocalDate(due));
  return {
    who: who || null,
    design: design || null,
    due: isDue ? due : null,
    late: late === '1',
  };
}

/** The address's part for a change of filters; null takes a parameter out of it. */
export function writeFilters(filters: Partial<FloorFilters>): Record<string, string | null> {
  const { late, ...rest } = filters;
  return late === undefined ? rest : { ...rest, late: late ? '1' : null };
}

export function isFiltered(filters: FloorFilters): boolean {
  return filters.who !== null || filters.design !== null || filters.due !== null || filters.late;
}

/** Whether a card is shown; `today` is the shop's local date. */
export function passes(card: Filtered, filters: FloorFilters, today: string): boolean {
  const { who, design, due, late } = filters;
  if (who === NOBODY && card.people.length > 0) return false;
  if (who !== null && who !== NOBODY && !card.people.includes(who)) return false;
  if (design !== null && card.designId !== design) return false;
  if (late && !card.isLate) return false;
  if (due === null) return true;
  if (card.dueDate === null) return false;
  // What was due earlier and is still here belongs to this week's worries, too.
  return due === 'week' ? card.dueDate <= lastDayOfWeek(today) : card.dueDate === due;
}

/** The Sunday of the week that a local date is in. */
export function lastDayOfWeek(date: string): string {
  return addDays(date, 7 - weekdayOf(date));
}
