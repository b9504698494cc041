import type { Actor, FloorBatch, FloorShop } from '#shared/floor/model';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import type { Route } from '#shared/route/route';
import { resolveRoute, type FinishProfile, type GlueProfile } from '#shared/route/template';
import { DEFAULT_CLAMPS, DEFAULT_STATIONS } from '#shared/shop/defaults';
import { HOUR_MS, MINUTE_MS, parseInstant, type Instant } from '#shared/time/instant';

/** Tuesday, 09:00 in Vienna. */
export const NOW: Instant = parseInstant('2026-12-01T08:00:00Z');

export const minutes = (n: number): number => n * MINUTE_MS;
export const hours = (n: number): number => n * HOUR_MS;

export const OWNER: Actor = { memberId: 'owner', roles: ['OWNER'] };
export const MAKER: Actor = { memberId: 'maker', roles: ['MAKER'] };
export const HELPER: Actor = { memberId: 'helper', roles: ['HELPER'] };
export const OFFICE: Actor = { memberId: 'office', roles: ['OFFICE'] };

export function aShop(over: Partial<FloorShop> = {}): FloorShop {
  return { zone: 'Europe/Vienna', stations: DEFAULT_STATIONS, clamps: DEFAULT_CLAMPS, ...over };
}

export function aRoute(
  glue: GlueProfile | undefined = DEFAULT_GLUES[0],
  finish: FinishProfile | undefined = DEFAULT_FINISHES[0],
): Route {
  if (!glue || !finish) throw new Error('There are no default profiles.');
  return { id: 'route', steps: resolveRoute(DEFAULT_ROUTE, glue, finish) };
}

const MILLIMETRE = 1_000_000n;

/** Four boards from two panels, let onto the floor, nothing done. */
export function aBatch(over: Partial<FloorBatch> = {}): FloorBatch {
  return {
    id: 'batch-1',
    code: 'CT-001',
    version: 1,
    boards: 4,
    needs: {
      panelCount: 1,
      panelBoards: 2,
      blocksPerBoard: 1,
      panelClamps: { count: 4, length: 300n * MILLIMETRE },
      blockClamps: { count: 2, length: 400n * MILLIMETRE },
    },
    route: aRoute(),
    dueDate: '2026-12-18',
    shipBy: '2026-12-15',
    releasedAt: NOW - hours(1),
    shippedAt: null,
    assignedTo: null,
    runs: [],
    occupations: [],
    overrides: [],
    ...over,
  };
}
