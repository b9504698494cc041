import type { ClampClass, Station } from '#shared/floor/model';

/* What a new shop starts with until its people put their own in its place. */

/** Monday to Friday 08:00 to 12:00 and 13:00 to 17:00; minutes of the local day. */
export const DEFAULT_WEEKLY: readonly (readonly { from: number; to: number }[])[] = [
  ...Array.from({ length: 5 }, () => [
    { from: 480, to: 720 },
    { from: 780, to: 1020 },
  ]),
  [],
  [],
];

export const DEFAULT_STATIONS: readonly Station[] = [
  { key: 'planer', name: 'planer', unit: 'BATCH', capacity: 1 },
  { key: 'table-saw', name: 'table saw', unit: 'BATCH', capacity: 1 },
  { key: 'glue-bench', name: 'glue bench', unit: 'PIECE', capacity: 2 },
  { key: 'sanding-bench', name: 'sanding bench', unit: 'BATCH', capacity: 2 },
  { key: 'finishing-bench', name: 'finishing bench', unit: 'BATCH', capacity: 1 },
  { key: 'oil-rack', name: 'oil rack', unit: 'BOARD', capacity: 36 },
];

const MILLIMETRE = 1_000_000n;

export const DEFAULT_CLAMPS: readonly ClampClass[] = [
  { key: 'c600', length: 600n * MILLIMETRE, count: 12 },
  { key: 'c900', length: 900n * MILLIMETRE, count: 6 },
];

/** What a person can be able to do; steps ask for one of these. */
export const DEFAULT_SKILLS = ['machining', 'gluing', 'sanding', 'finishing'] as const;
