/** The stages of a route, in the order in which every batch goes through those it has. */
export const STAGES = [
  'BLANK',
  'FIRST_GLUE_UP',
  'SLICE',
  'SECOND_GLUE_UP',
  'SURFACE',
  'SAND',
  'FINISH',
] as const;
export type Stage = (typeof STAGES)[number];

/** Where a batch may stand: before, in or after the stages. */
export const PLACES = ['QUEUED', ...STAGES, 'READY', 'SHIPPED'] as const;
export type Place = (typeof PLACES)[number];

/** What a step is done to: the whole batch, each panel, or each block. */
export type StepScope = 'BATCH' | 'PANEL' | 'BLOCK';

/** FRESHNESS is a wait with a maximum only: it guards nothing from being touched, it wants the next step soon. */
export const HOLD_KINDS = [
  'ACCLIMATION',
  'CLAMPED',
  'CURE',
  'FILLER_CURE',
  'SOAK',
  'DWELL',
  'FINISH_CURE',
  'FRESHNESS',
] as const;
export type HoldKind = (typeof HOLD_KINDS)[number];

/** Codes of the short cautions shown where the work is; their sentences are in shared/words. */
export type CautionCode =
  | 'PLANER'
  | 'TABLE_SAW'
  | 'END_GRAIN_PLANER'
  | 'SLICING'
  | 'DUST'
  | 'OILY_RAGS'
  | 'UNCURED_GLUE'
  | 'FOOD_CONTACT';

/** Something a work step takes at its start and that the finish of a later work step, `until`, gives back. */
export interface StepTake {
  /** A station's key, or CLAMPS: as many as the design needs for the piece. */
  resource: string;
  until: string;
}

interface StepBase {
  /** Unique in the route. */
  key: string;
  stage: Stage;
  /** The name after "start" and "finish": milling, 80 grit, taking clamps off. */
  name: string;
  scope: StepScope;
}

/** Work: needs people and perhaps a station, and advances only in working time. */
export interface WorkStep extends StepBase {
  kind: 'WORK';
  /** What one does, as in "2 to glue". */
  verb: string;
  /** Working minutes before the first piece. */
  setupMinutes: number;
  /** Working minutes for each board (scope BATCH) or for the piece (other scopes). */
  pieceMinutes: number;
  /** Whether it may stop where hours stop and go on later; otherwise it fits whole into one working span. */
  pausable: boolean;
  people: number;
  skill: string | null;
  /** Taken from the start of the step to its finish. */
  station: string | null;
  takes: readonly StepTake[];
  caution: CautionCode | null;
}

/** Waiting: needs no one, runs day and night. */
export interface WaitStep extends StepBase {
  kind: 'WAIT';
  hold: HoldKind;
  /** The work step from whose finish the wait counts. */
  after: string;
  /** Elapsed minutes before which the piece stays as it is. */
  minMinutes: number;
  /** Elapsed minutes after which the next step comes too late; null for no limit. */
  maxMinutes: number | null;
  /** Whose figure it is: the glue's or finish's name, or the shop. */
  source: string;
  /** The temperature the figure holds for, in tenths of a degree Celsius; null where temperature does not matter. */
  referenceTenthsC: number | null;
}

export type RouteStep = WorkStep | WaitStep;

/** A batch's own copy of the shop's route: steps in order, never changed afterwards. */
export interface Route {
  id: string;
  steps: readonly RouteStep[];
}

/** The stages that the route has steps in, in order. */
export function stagesOf(route: Route): Stage[] {
  return STAGES.filter((stage) => route.steps.some((step) => step.stage === stage));
}

/** The rank of a place, for comparing how far things are. */
export function rankOf(place: Place): number {
  return PLACES.indexOf(place);
}

/** The step with the given key and its index, or null. */
export function stepAt(route: Route, key: string): { step: RouteStep; index: number } | null {
  const index = route.steps.findIndex((step) => step.key === key);
  const step = route.steps[index];
  return step ? { step, index } : null;
}
