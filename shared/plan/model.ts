import type { Calendar } from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';
import type { LocalDate } from '#shared/time/zone';
import type { HoldKind } from '#shared/route/route';

/*
 * What is to be planned, and a plan: the only file that the planner and its checker share. Everything is plain data that
 * a structured clone carries between threads (lengths are bigint, so it is not JSON).
 */

export interface Problem {
  /** A whole minute: nothing free starts before it. */
  readonly now: Instant;
  /** Calendars end here; what would start later is not planned. */
  readonly horizonEnd: Instant;
  /** The shop's open hours. */
  readonly shop: Calendar;
  readonly people: readonly Person[];
  readonly stations: readonly StationCapacity[];
  readonly clamps: readonly ClampStock[];
  /** Batch by batch, in the order of each batch's route, so that what comes before stands before. */
  readonly activities: readonly Activity[];
  /** What is occupied by work that has started or is done. */
  readonly held: readonly Held[];
  readonly batches: readonly PlanBatch[];
}

export interface Person {
  readonly id: string;
  readonly skills: readonly string[];
  /** When this person and the shop both work. */
  readonly calendar: Calendar;
}

export interface StationCapacity {
  readonly key: string;
  /** The station's key as the shop knows it. */
  readonly station: string;
  readonly capacity: number;
  /** Whether each batch counts once, however many of its pieces are there. */
  readonly countsBatches: boolean;
}

export interface ClampStock {
  readonly key: string;
  /** Nanometres: the longest work they close on. */
  readonly length: bigint;
  readonly count: number;
}

export interface PlanBatch {
  readonly id: string;
  readonly code: string;
  readonly shipBy: LocalDate | null;
  /** The end of work on the ship-by date. */
  readonly dueAt: Instant | null;
  readonly weight: number;
  /** 0 is planned first. */
  readonly priority: number;
  /** The person it is given to, taken where it costs no time. */
  readonly preferred: string | null;
  /** A step of its route that can never be done as the route is written; null when there is none. */
  readonly brokenStep: string | null;
  /** Waits after the last work: the batch is ready when they are over. */
  readonly tail: readonly Link[];
}

/** One work step on one piece. */
export interface Activity {
  readonly id: string;
  readonly batchId: string;
  readonly step: string;
  /** 0 for the whole batch. */
  readonly piece: number;
  /** Working minutes, whole and at least 1: all of them when free, what is left when started. */
  readonly minutes: number;
  /** Whether it may stop where hours stop; otherwise it lies whole in one working span. */
  readonly pausable: boolean;
  readonly people: number;
  readonly skill: string | null;
  /** What a free activity takes at its start. What others have taken is in `held`. */
  readonly takes: readonly Take[];
  readonly clamps: ClampTake | null;
  readonly state: ActivityState;
  /** What comes before it. */
  readonly after: readonly Link[];
}

export type ActivityState =
  | { readonly kind: 'FREE' }
  /** `people` as far as they are known; none: the shop's hours count. */
  | { readonly kind: 'STARTED'; readonly startedAt: Instant; readonly people: readonly string[] }
  | { readonly kind: 'DONE'; readonly startedAt: Instant; readonly finishedAt: Instant };

/** Units of a station, from an activity's start until the last of the activities named in `until` has ended. */
export interface Take {
  readonly resource: string;
  readonly units: number;
  readonly until: readonly string[];
}

/** So many clamps of at least a length, of any classes together, until the last of `until` has ended. */
export interface ClampTake {
  readonly count: number;
  readonly length: bigint;
  readonly until: readonly string[];
}

/** Something occupied now, as a fact. It ends at `until`, else when the last of `release` has ended. */
export interface Held {
  readonly batchId: string;
  readonly step: string;
  readonly piece: number;
  readonly resource: string;
  readonly isClamps: boolean;
  readonly units: number;
  readonly until: Instant | null;
  readonly release: readonly string[];
}

/** From the end of one activity to the start of another: elapsed minutes at least and at most. */
export interface Link {
  readonly activity: string;
  readonly minMinutes: number;
  readonly maxMinutes: number | null;
  /** The wait that asks for it; null when one step simply follows the other. */
  readonly wait: { readonly step: string; readonly piece: number; readonly hold: HoldKind } | null;
}

export interface Span {
  readonly start: Instant;
  readonly end: Instant;
}

export interface Plan {
  /** One for each planned activity that is not done, by start, then id. */
  readonly placements: readonly Placement[];
  readonly unplanned: readonly UnplannedBatch[];
  /** Maximum waits that no plan was found to keep, each with what was missed. */
  readonly missedMaxima: readonly MissedMaximum[];
}

export interface Placement {
  readonly activity: string;
  readonly batchId: string;
  readonly step: string;
  readonly piece: number;
  /** For started work the moment it started. */
  readonly start: Instant;
  readonly end: Instant;
  /** When people are at it from now on; more than one where hours stop in between. */
  readonly segments: readonly Span[];
  readonly people: readonly string[];
  /** Clamps taken at its start, by class. */
  readonly clamps: readonly { readonly key: string; readonly amount: number }[];
  readonly reason: Reason;
}

/** A step on a piece of a batch. */
export interface ActivityRef {
  readonly batchId: string;
  readonly step: string;
  readonly piece: number;
}

/** Why an activity does not start earlier: the last thing that it had to wait for, until `at`. */
export type Reason =
  | { readonly code: 'NOW' }
  | { readonly code: 'STARTED' }
  | { readonly code: 'PRECEDENCE'; readonly at: Instant; readonly before: ActivityRef }
  | {
      readonly code: 'WAIT';
      readonly at: Instant;
      readonly wait: ActivityRef;
      readonly hold: HoldKind;
    }
  | {
      readonly code: 'STATION';
      readonly at: Instant;
      readonly station: string;
      readonly holders: readonly ActivityRef[];
    }
  | { readonly code: 'CLAMPS'; readonly at: Instant; readonly holders: readonly ActivityRef[] }
  | {
      readonly code: 'PEOPLE';
      readonly at: Instant;
      readonly people: readonly string[];
      readonly holders: readonly ActivityRef[];
    }
  /** SHOP and PEOPLE: closed from `since` on; FIT: open, but not for long enough. */
  | {
      readonly code: 'HOURS';
      readonly at: Instant;
      readonly since: Instant;
      readonly whose: 'SHOP' | 'PEOPLE' | 'FIT';
      readonly people: readonly string[];
    }
  /** Held back so that a later step keeps its maximum wait. */
  | { readonly code: 'MAXIMUM'; readonly at: Instant; readonly later: ActivityRef };

export interface UnplannedBatch {
  readonly batchId: string;
  readonly reason: UnplannedReason;
}

/** Why a batch has no plan. */
export type UnplannedReason =
  /** The step can never be done as the route is written. */
  | { readonly code: 'ROUTE'; readonly step: string }
  /** Fewer people have the skill than the step needs. */
  | {
      readonly code: 'SKILL';
      readonly step: string;
      readonly skill: string | null;
      readonly need: number;
      readonly have: number;
    }
  /** No working span of the people it needs is long enough, or their hours do not suffice before the horizon. */
  | {
      readonly code: 'HOURS';
      readonly step: string;
      readonly minutes: number;
      readonly pausable: boolean;
    }
  /** The station is smaller than what the step puts there at once. */
  | {
      readonly code: 'STATION';
      readonly step: string;
      readonly station: string;
      readonly need: number;
      readonly capacity: number;
    }
  /** The shop owns fewer clamps of the length than one piece needs. */
  | {
      readonly code: 'CLAMPS';
      readonly step: string;
      readonly need: number;
      readonly owned: number;
      readonly length: bigint;
    }
  /** What the step needs is held by something that no plan gives back. */
  | {
      readonly code: 'HELD';
      readonly step: string;
      readonly piece: number;
      readonly holders: readonly ActivityRef[];
    }
  /** No room was found before the horizon. */
  | { readonly code: 'HORIZON'; readonly step: string; readonly piece: number };

export interface MissedMaximum {
  /** The activity that starts too late. */
  readonly activity: string;
  /** The one whose end the wait counts from. */
  readonly after: string;
  readonly wait: string;
  readonly latestAt: Instant;
  readonly overrunMinutes: number;
}
