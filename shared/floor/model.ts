import type { Instant } from '#shared/time/instant';
import type { Role } from '#shared/members/permissions';
import type { HoldKind, Place, Route } from '#shared/route/route';

/**
 * One step on one piece, as far as it has gone. A step that nobody has touched has no run. Work steps use the start and
 * finish; waits are computed from the finish of the step they count from, and use only the cut of an override.
 */
export interface StepRun {
  step: string;
  /** Panel or block number from 1; 0 when the step is the whole batch's. */
  piece: number;
  startedAt: Instant | null;
  startedBy: string | null;
  finishedAt: Instant | null;
  finishedBy: string | null;
  cutAt: Instant | null;
  cutBy: string | null;
}

/** Something a batch keeps occupied: a station's capacity or clamps of one class. */
export interface Occupation {
  resource: string;
  isClamps: boolean;
  amount: number;
  /** The step that took it. */
  step: string;
  piece: number;
  since: Instant;
  /** When it was given back; null while it is occupied. */
  until: Instant | null;
}

/** A hold that was overridden, on the batch for ever. */
export interface Override {
  id: string;
  step: string;
  piece: number;
  by: string;
  at: Instant;
  reason: string;
}

/** What the rules need to know of a batch's design. */
export interface PieceNeeds {
  panelCount: number;
  panelBoards: number;
  blocksPerBoard: number;
  panelClamps: ClampNeed;
  blockClamps: ClampNeed;
}

export interface ClampNeed {
  count: number;
  /** Nanometres. */
  length: bigint;
}

/** A batch as the rules of the floor see it. */
export interface FloorBatch {
  id: string;
  code: string;
  version: number;
  boards: number;
  needs: PieceNeeds;
  route: Route;
  /** Local dates. */
  dueDate: string | null;
  shipBy: string | null;
  releasedAt: Instant | null;
  shippedAt: Instant | null;
  assignedTo: string | null;
  runs: readonly StepRun[];
  /** Open ones; on the server also those that ended after the moment being judged. */
  occupations: readonly Occupation[];
  overrides: readonly Override[];
}

/** What a station's capacity counts. */
export type StationUnit = 'BATCH' | 'PIECE' | 'BOARD';

export interface Station {
  key: string;
  name: string;
  unit: StationUnit;
  capacity: number;
}

/** Clamps of one length; `length` in nanometres is the longest work they close on. */
export interface ClampClass {
  key: string;
  length: bigint;
  count: number;
}

/** The shop around the batches, as the rules see it. */
export interface FloorShop {
  zone: string;
  stations: readonly Station[];
  clamps: readonly ClampClass[];
}

/** A wait that is running on a piece now, or (for FRESHNESS) that limits when its next step starts. */
export interface Hold {
  step: string;
  piece: number;
  kind: HoldKind;
  since: Instant;
  /** Not before; equal to `since` for FRESHNESS. */
  clearAt: Instant;
  /** Not after; null for no limit. */
  latestAt: Instant | null;
  minMinutes: number;
  source: string;
  referenceTenthsC: number | null;
}

export type Shelf = 'READY' | 'WORKING' | 'HOLDING';

export type { Role } from '#shared/members/permissions';

/** Who gives a command. */
export interface Actor {
  memberId: string;
  roles: readonly Role[];
}

/** The reason for an override, and whether its caution was read first. */
export interface OverrideRequest {
  reason: string;
  cautionRead: boolean;
}

export type FloorCommand =
  | {
      kind: 'START' | 'FINISH';
      step: string;
      pieces: readonly number[];
      happenedAt: Instant | null;
      override: OverrideRequest | null;
    }
  | {
      kind: 'MOVE';
      to: Place;
      reason: string | null;
      happenedAt: Instant | null;
      override: OverrideRequest | null;
    }
  | { kind: 'ASSIGN'; memberId: string | null };

/** One run before and after a command; null stands for "no run". Enough to replay and to take back. */
export interface RunChange {
  step: string;
  piece: number;
  before: StepRun | null;
  after: StepRun | null;
}

/** What a command does to a batch: a value that can be previewed, applied, replayed and inverted. */
export interface FloorChangeSet {
  runs: RunChange[];
  /** Occupations that begin. */
  taken: Occupation[];
  /** Occupations (as they stood) that end, with the instant they end at. */
  released: { occupation: Occupation; at: Instant }[];
  fields: {
    releasedAt?: { before: Instant | null; after: Instant | null };
    shippedAt?: { before: Instant | null; after: Instant | null };
    assignedTo?: { before: string | null; after: string | null };
  };
  /** Holds cut short: what to write down as overrides. */
  cut: { step: string; piece: number; kind: HoldKind }[];
}
