import type { HoldKind, Stage, StepScope, WorkStep } from './route';
import type { Figure, RouteTemplate, TemplateStep } from './template';

/*
 * The route a new shop starts with. Times are the product's defaults for a small shop (common practice, no source); the
 * shop puts its own in their place. Waits come from the glue and the finish.
 */

const DAY = 24 * 60;

function work(
  key: string,
  stage: Stage,
  scope: StepScope,
  name: string,
  verb: string,
  setupMinutes: number,
  pieceMinutes: number,
  more: Partial<WorkStep> = {},
): TemplateStep {
  return {
    kind: 'WORK',
    key,
    stage,
    scope,
    name,
    verb,
    setupMinutes,
    pieceMinutes,
    pausable: true,
    people: 1,
    skill: null,
    station: null,
    takes: [],
    caution: null,
    ...more,
  };
}

function wait(
  key: string,
  stage: Stage,
  scope: StepScope,
  hold: HoldKind,
  after: string,
  min: Figure,
  max: Figure = { minutes: null },
): TemplateStep {
  const name = key.replace(/-\d$/, '').replaceAll('-', ' ');
  return { kind: 'WAIT', key, stage, scope, name, hold, after, min, max };
}

function glueUp(n: 1 | 2, stage: Stage, scope: 'PANEL' | 'BLOCK', minutes: number): TemplateStep[] {
  return [
    work(`glue-${n}`, stage, scope, 'glue-up', 'glue', 0, minutes, {
      pausable: false,
      skill: 'gluing',
      station: 'glue-bench',
      takes: [{ resource: 'CLAMPS', until: `unclamp-${n}` }],
    }),
    wait(`clamped-${n}`, stage, scope, 'CLAMPED', `glue-${n}`, { glue: 'clampedMinutes' }),
    work(`unclamp-${n}`, stage, scope, 'taking clamps off', 'take out of clamps', 0, 5),
    wait(`cure-${n}`, stage, scope, 'CURE', `glue-${n}`, { glue: 'machiningMinutes' }),
  ];
}

const machining = { skill: 'machining' };
const sanding = { skill: 'sanding', station: 'sanding-bench', caution: 'DUST' } as const;

export const DEFAULT_ROUTE: RouteTemplate = {
  isDefault: true,
  note: 'Default times. Put your own in their place; the data sheets of your glue and your oil come first.',
  steps: [
    work('mill', 'BLANK', 'BATCH', 'milling', 'mill', 15, 6, {
      ...machining,
      station: 'planer',
      caution: 'PLANER',
    }),
    work('rip', 'BLANK', 'BATCH', 'ripping', 'rip', 10, 5, {
      ...machining,
      station: 'table-saw',
      caution: 'TABLE_SAW',
    }),
    wait(
      'fresh-faces-1',
      'FIRST_GLUE_UP',
      'PANEL',
      'FRESHNESS',
      'rip',
      { minutes: 0 },
      { minutes: DAY },
    ),
    ...glueUp(1, 'FIRST_GLUE_UP', 'PANEL', 25),
    work('flatten-1', 'SLICE', 'PANEL', 'flattening', 'flatten', 5, 10, {
      ...machining,
      station: 'planer',
      caution: 'PLANER',
    }),
    work('slice', 'SLICE', 'PANEL', 'slicing', 'slice', 5, 15, {
      ...machining,
      station: 'table-saw',
      caution: 'SLICING',
    }),
    wait(
      'fresh-faces-2',
      'SECOND_GLUE_UP',
      'BLOCK',
      'FRESHNESS',
      'flatten-1',
      { minutes: 0 },
      { minutes: DAY },
    ),
    ...glueUp(2, 'SECOND_GLUE_UP', 'BLOCK', 20),
    work('flatten-2', 'SURFACE', 'BATCH', 'flattening end grain', 'flatten', 15, 8, {
      ...machining,
      station: 'planer',
      caution: 'END_GRAIN_PLANER',
    }),
    work('trim', 'SURFACE', 'BATCH', 'trimming', 'trim', 10, 4, {
      ...machining,
      station: 'table-saw',
      caution: 'TABLE_SAW',
    }),
    work('sand-80', 'SAND', 'BATCH', '80 grit', 'sand', 5, 8, sanding),
    work('sand-120', 'SAND', 'BATCH', '120 grit', 'sand', 5, 6, sanding),
    work('fill', 'SAND', 'BATCH', 'filling gaps', 'fill', 5, 2, { skill: 'sanding' }),
    wait('filler-cure', 'SAND', 'BATCH', 'FILLER_CURE', 'fill', { minutes: 120 }),
    work('sand-180', 'SAND', 'BATCH', '180 grit', 'sand', 5, 5, sanding),
    {
      ...work('oil-#', 'FINISH', 'BATCH', 'oil coat #', 'oil', 10, 3, {
        skill: 'finishing',
        station: 'finishing-bench',
        takes: [{ resource: 'oil-rack', until: 'wipe-#' }],
        caution: 'FOOD_CONTACT',
      }),
      perCoat: true,
    },
    {
      ...wait(
        'soak-#',
        'FINISH',
        'BATCH',
        'SOAK',
        'oil-#',
        { finish: 'soakMinutes' },
        { finish: 'wipeByMinutes' },
      ),
      perCoat: true,
    },
    {
      ...work('wipe-#', 'FINISH', 'BATCH', 'wiping coat #', 'wipe', 5, 2, {
        skill: 'finishing',
        caution: 'OILY_RAGS',
      }),
      perCoat: true,
    },
    {
      ...wait('dwell-#', 'FINISH', 'BATCH', 'DWELL', 'wipe-#', { finish: 'dwellMinutes' }),
      perCoat: true,
    },
    {
      ...wait('finish-cure', 'FINISH', 'BATCH', 'FINISH_CURE', 'wipe-#', {
        finish: 'fullCureMinutes',
      }),
      dryingOnly: true,
    },
    work('final-check', 'FINISH', 'BATCH', 'final check', 'check', 5, 3, {
      caution: 'FOOD_CONTACT',
    }),
  ],
};
