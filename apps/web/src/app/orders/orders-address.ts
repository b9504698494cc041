import type { OrderStatus } from '../graphql/generated/graphql';
import { STATUSES } from './order-words';

export const SORT_KEYS = ['due', 'code', 'ship-by', 'status', 'progress', 'forecast'] as const;
export type SortKey = (typeof SORT_KEYS)[number];

/** Orders a page of the list; as many pages as one opens by one's address before asking for more. */
export const PAGE_SIZE = 50;
export const MOST_PAGES = 20;

/** What the table shows, as the address keeps it. */
export interface OrdersView {
  readonly status: OrderStatus | null;
  readonly sort: SortKey;
  readonly descending: boolean;
  readonly pages: number;
}

export const FIRST_VIEW: OrdersView = { status: null, sort: 'due', descending: false, pages: 1 };

/** Reads the address; whatever it does not understand is as if it were not there. */
export function readView(params: {
  readonly status?: string | undefined;
  readonly sort?: string | undefined;
  readonly pages?: string | undefined;
}): OrdersView {
  const status = STATUSES.find((each) => statusParam(each) === params.status) ?? null;
  const descending = params.sort?.startsWith('-') ?? false;
  const key = descending ? params.sort?.slice(1) : params.sort;
  const sort = SORT_KEYS.find((each) => each === key);
  const pages = /^\d{1,3}$/.test(params.pages ?? '') ? Number(params.pages) : 1;
  return {
    status,
    sort: sort ?? FIRST_VIEW.sort,
    descending: sort !== undefined && descending,
    pages: Math.min(MOST_PAGES, Math.max(1, pages)),
  };
}

/** The address's parameters; null takes one out, so that the plain view has a plain address. */
export function writeView(view: OrdersView): Record<'status' | 'sort' | 'pages', string | null> {
  const sort = `${view.descending ? '-' : ''}${view.sort}`;
  return {
    status: view.status === null ? null : statusParam(view.status),
    sort: sort === FIRST_VIEW.sort ? null : sort,
    pages: view.pages === 1 ? null : String(view.pages),
  };
}

/** The view after a column's head was pressed: the same column turns round, another begins at its start. */
export function sortedBy(view: OrdersView, sort: SortKey): OrdersView {
  return { ...view, sort, descending: view.sort === sort ? !view.descending : false };
}

interface Sortable {
  readonly code: string;
  readonly dueDate: string;
  readonly shipBy: string;
  readonly status: OrderStatus;
  readonly progressPercent: number;
  readonly forecastReadyAt: string | null;
}

/** The rows in the view's order; those without a forecast come last either way, ties go by due date and code. */
export function sortRows<T extends Sortable>(rows: readonly T[], view: OrdersView): T[] {
  const turn = view.descending ? -1 : 1;
  return [...rows].sort((a, b) => {
    if (view.sort === 'forecast' && (a.forecastReadyAt === null || b.forecastReadyAt === null)) {
      const missing = Number(a.forecastReadyAt === null) - Number(b.forecastReadyAt === null);
      if (missing !== 0) return missing;
    }
    return turn * compare(a, b, view.sort) || compare(a, b, 'due') || compare(a, b, 'code');
  });
}

function compare(a: Sortable, b: Sortable, key: SortKey): number {
  switch (key) {
    case 'due':
      return order(a.dueDate, b.dueDate);
    case 'code':
      return order(codeNumber(a.code), codeNumber(b.code)) || order(a.code, b.code);
    case 'ship-by':
      return order(a.shipBy, b.shipBy);
    case 'status':
      return STATUSES.indexOf(a.status) - STATUSES.indexOf(b.status);
    case 'progress':
      return a.progressPercent - b.progressPercent;
    case 'forecast':
      return order(Date.parse(a.forecastReadyAt ?? ''), Date.parse(b.forecastReadyAt ?? ''));
  }
}

function order<T extends string | number>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** OR-999 comes before OR-1000. */
function codeNumber(code: string): number {
  return Number(/\d+$/.exec(code)?.[0] ?? 0);
}

function statusParam(status: OrderStatus): string {
  return status.toLowerCase().replaceAll('_', '-');
}
