import type { Instant } from '#shared/time/instant';
import type { Activity, Placement, Plan, Problem } from '../model';

export type Rule =
  | 'PLACED_ONCE'
  | 'FACT'
  | 'DURATION'
  | 'HOURS'
  | 'ONE_SPAN'
  | 'PAUSE'
  | 'ORDER'
  | 'MINIMUM'
  | 'MAXIMUM'
  | 'PEOPLE'
  | 'SKILL'
  | 'TWO_PLACES'
  | 'STATION'
  | 'CLAMPS'
  | 'CLAMP_LENGTH'
  | 'UNPLANNED';

/** A rule that a plan breaks, and where. */
export interface Violation {
  rule: Rule;
  /** The activity's id; for UNPLANNED the batch's. */
  activity: string;
  detail: string;
}

/** A plan beside its problem, looked up. */
export interface View {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly activities: ReadonlyMap<string, Activity>;
  readonly placements: ReadonlyMap<string, Placement>;
  /** Ids of batches that are named as unplanned. */
  readonly unplanned: ReadonlySet<string>;
  /** When an activity ends; Infinity when it is not placed. */
  endOf(id: string): Instant;
  say(rule: Rule, activity: string, detail: string): void;
}
