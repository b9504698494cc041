import type { Instant } from '#shared/time/instant';
import type { CautionCode, HoldKind, Place } from '#shared/route/route';
import type { FloorChangeSet } from './model';

/** Why the rules refuse a command. The sentence is made from it in shared/words, for every reader in one place. */
export type Refusal =
  | { code: 'FORBIDDEN'; what: 'MOVE' | 'OVERRIDE' | 'UNDO' }
  | { code: 'BATCH_GONE' }
  | { code: 'ALREADY_THERE'; place: Place }
  | { code: 'NOT_ON_ROUTE'; place: Place }
  | { code: 'STEP_UNKNOWN'; step: string }
  | { code: 'PIECE_UNKNOWN'; step: string; piece: number; pieces: number }
  | { code: 'PIECES_EMPTY' }
  | { code: 'ALREADY_STARTED'; stepName: string; piece: number; pieceKind: PieceKind }
  | { code: 'ALREADY_FINISHED'; stepName: string; piece: number; pieceKind: PieceKind }
  | { code: 'NOT_STARTED'; stepName: string; piece: number; pieceKind: PieceKind }
  | {
      code: 'STEP_BEFORE';
      stepName: string;
      beforeName: string;
      piece: number;
      pieceKind: PieceKind;
    }
  | {
      code: 'HOLD_RUNNING';
      kind: HoldKind;
      piece: number;
      pieceKind: PieceKind;
      clearAt: Instant;
      minMinutes: number;
      source: string;
      referenceTenthsC: number | null;
    }
  | { code: 'HOLD_AHEAD'; kind: HoldKind; beforeName: string; minMinutes: number; source: string }
  | {
      code: 'STATION_FULL';
      station: string;
      capacity: number;
      need: number;
      free: number;
      holder: Holder | null;
    }
  | { code: 'CLAMPS_FULL'; need: number; free: number; owned: number; holder: Holder | null }
  | { code: 'IN_THE_FUTURE' }
  | { code: 'TOO_LONG_AGO'; minutes: number }
  | { code: 'BEFORE_THE_FACT_BEFORE'; earliest: Instant }
  | { code: 'REASON_MISSING'; what: 'OVERRIDE' | 'REWORK' }
  | { code: 'CAUTION_FIRST'; caution: CautionCode }
  | { code: 'NOTHING_TO_OVERRIDE' }
  | { code: 'SHIPPED_STAYS' }
  | { code: 'UNDO_TOO_LATE' }
  | { code: 'UNDO_BUILT_ON' };

export type RefusalCode = Refusal['code'];

export type PieceKind = 'BATCH' | 'PANEL' | 'BLOCK';

/** Who keeps what is full, and when the first of them is expected to give it back, if people come to it as soon as they may. */
export interface Holder {
  batchCode: string;
  /** Not after now when it is given back already and was full only then. */
  freeAt: Instant | null;
}

export type Verdict = { ok: true; changes: FloorChangeSet } | { ok: false; refusal: Refusal };

export function refuse(refusal: Refusal): Verdict {
  return { ok: false, refusal };
}

/** A change set that changes nothing yet. */
export function noChanges(): FloorChangeSet {
  return { runs: [], taken: [], released: [], fields: {}, cut: [] };
}
