import type { SpeciesKey } from '#shared/designs/species';
import type { Role } from '#shared/members/permissions';

/* The demo workshop. It and its people are invented; their addresses end in example.com. */

export const DEMO_PASSWORD = 'clamps-and-tide';

export interface DemoPerson {
  name: string;
  initials: string;
  email: string;
  roles: Role[];
  skills: string[];
}

export const DEMO_OWNER: DemoPerson = {
  name: 'Ines Rothe',
  initials: 'IR',
  email: 'ines@example.com',
  roles: ['OWNER', 'MAKER'],
  skills: ['machining', 'gluing', 'sanding', 'finishing'],
};

export const DEMO_OTHERS: readonly DemoPerson[] = [
  {
    name: 'Olle Lindqvist',
    initials: 'OL',
    email: 'olle@example.com',
    roles: ['MAKER'],
    skills: ['machining', 'gluing', 'sanding', 'finishing'],
  },
  {
    name: 'Mika Kern',
    initials: 'MK',
    email: 'mika@example.com',
    roles: ['HELPER'],
    skills: ['gluing', 'sanding', 'finishing'],
  },
  {
    name: 'Pia Novakova',
    initials: 'PN',
    email: 'pia@example.com',
    roles: ['OFFICE', 'INTEGRATOR'],
    skills: [],
  },
];

export interface DemoDesign {
  name: string;
  /** Finished size in millimetres. */
  size: { length: number; width: number; thickness: number };
  /** Species and width in millimetres of each strip. */
  strips: readonly (readonly [SpeciesKey, number])[];
  slices: number;
  panelBoards: number;
  panelClampCount: number;
  blockClampCount: number;
}

export const DEMO_DESIGNS: readonly DemoDesign[] = [
  {
    name: 'Drift',
    size: { length: 420, width: 280, thickness: 40 },
    strips: [
      ['maple', 60],
      ['walnut', 40],
      ['cherry', 60],
      ['maple', 40],
      ['walnut', 80],
    ],
    slices: 10,
    panelBoards: 4,
    panelClampCount: 4,
    blockClampCount: 2,
  },
  {
    name: 'Checker',
    size: { length: 360, width: 240, thickness: 38 },
    strips: [
      ['maple', 60],
      ['walnut', 60],
      ['maple', 60],
      ['walnut', 60],
    ],
    slices: 6,
    panelBoards: 6,
    panelClampCount: 4,
    blockClampCount: 2,
  },
  {
    name: 'Ember',
    size: { length: 400, width: 270, thickness: 42 },
    strips: [
      ['cherry', 60],
      ['hickory', 90],
      ['cherry', 30],
      ['beech', 90],
    ],
    slices: 9,
    panelBoards: 6,
    panelClampCount: 5,
    blockClampCount: 2,
  },
  {
    name: 'Field',
    size: { length: 450, width: 300, thickness: 40 },
    strips: [
      ['ash', 65],
      ['beech', 35],
      ['hickory', 65],
      ['ash', 35],
      ['beech', 65],
      ['hickory', 35],
    ],
    slices: 11,
    panelBoards: 6,
    panelClampCount: 5,
    blockClampCount: 2,
  },
  {
    name: 'Shoal',
    size: { length: 300, width: 200, thickness: 35 },
    strips: [
      ['beech', 50],
      ['maple', 50],
      ['beech', 50],
      ['cherry', 50],
    ],
    slices: 8,
    panelBoards: 8,
    panelClampCount: 3,
    blockClampCount: 2,
  },
  {
    name: 'Longshore',
    size: { length: 560, width: 320, thickness: 45 },
    strips: [
      ['walnut', 80],
      ['ash', 40],
      ['walnut', 40],
      ['maple', 80],
      ['walnut', 80],
    ],
    slices: 12,
    panelBoards: 3,
    panelClampCount: 5,
    blockClampCount: 3,
  },
];

/**
 * Batches as they enter the shop: design, boards, days before now they were let in (null: still queued), days to due, and
 * the step that nobody has come to yet where the crew would otherwise have gone on.
 */
export const DEMO_BATCHES: readonly {
  design: string;
  boards: number;
  entered: number | null;
  due: number | null;
  stopBefore?: string;
}[] = [
  { design: 'Field', boards: 8, entered: 14, due: -4 },
  { design: 'Checker', boards: 6, entered: 13, due: -3 },
  { design: 'Drift', boards: 8, entered: 12.5, due: 2, stopBefore: 'final-check' },
  { design: 'Shoal', boards: 8, entered: 10, due: 1 },
  { design: 'Ember', boards: 6, entered: 9, due: 5, stopBefore: 'oil-1' },
  { design: 'Drift', boards: 8, entered: 8, due: -1, stopBefore: 'sand-120' },
  { design: 'Field', boards: 6, entered: 6.5, due: 4, stopBefore: 'trim' },
  { design: 'Checker', boards: 4, entered: 6, due: 6, stopBefore: 'fill' },
  { design: 'Longshore', boards: 3, entered: 5, due: 4 },
  { design: 'Ember', boards: 6, entered: 4, due: 7, stopBefore: 'flatten-2' },
  { design: 'Shoal', boards: 6, entered: 2.2, due: 9, stopBefore: 'flatten-1' },
  { design: 'Field', boards: 12, entered: 1.6, due: 8, stopBefore: 'glue-2' },
  { design: 'Drift', boards: 8, entered: 1.1, due: 10 },
  { design: 'Checker', boards: 10, entered: 0.7, due: 12 },
  { design: 'Ember', boards: 6, entered: 0.4, due: 11 },
  { design: 'Field', boards: 8, entered: 0.035, due: 14, stopBefore: 'rip' },
  { design: 'Shoal', boards: 10, entered: null, due: 15 },
  { design: 'Longshore', boards: 4, entered: null, due: 18 },
];

/** Who orders: invented names. */
export const DEMO_CUSTOMERS: readonly { name: string; email: string | null }[] = [
  { name: 'Tamsin Okoro', email: 'tamsin@example.com' },
  { name: 'Harbour Lane Kitchen Shop', email: 'orders@harbourlane.example.com' },
  { name: 'Bram Vesely', email: 'bram@example.com' },
  { name: 'Lucia Ferrand', email: null },
  { name: 'The Larder on Mill Street', email: 'larder@example.com' },
  { name: 'Noor Halloran', email: 'noor@example.com' },
  { name: 'Jonas Pell', email: 'jonas@example.com' },
];
