import type { Instant } from '#shared/time/instant';
import type { CautionCode, HoldKind, WaitStep } from '#shared/route/route';
import type { FloorBatch, OverrideRequest, RunChange } from './model';
import { runOf } from './progress';
import type { Refusal } from './refusal';

/** The shortest and the longest reason a person may write. */
export const REASON_MIN = 3;
export const REASON_MAX = 500;

/** The caution to show before a hold of this kind is cut short. */
export function cautionOf(kind: HoldKind): CautionCode {
  switch (kind) {
    case 'ACCLIMATION':
      return 'PLANER';
    case 'CLAMPED':
    case 'CURE':
    case 'FRESHNESS':
      return 'UNCURED_GLUE';
    case 'FILLER_CURE':
    case 'SOAK':
    case 'DWELL':
    case 'FINISH_CURE':
      return 'FOOD_CONTACT';
  }
}

/** What keeps an override from counting: no written reason, or a caution that was not read. */
export function cautionBefore(override: OverrideRequest, kind: HoldKind): Refusal | null {
  if (!isReason(override.reason)) return { code: 'REASON_MISSING', what: 'OVERRIDE' };
  if (!override.cautionRead) return { code: 'CAUTION_FIRST', caution: cautionOf(kind) };
  return null;
}

/** Whether a text will do as a reason. */
export function isReason(text: string | null): boolean {
  const length = text?.trim().length ?? 0;
  return length >= REASON_MIN && length <= REASON_MAX;
}

/** The change that cuts a wait short on a piece. */
export function cutRun(
  batch: FloorBatch,
  wait: WaitStep,
  piece: number,
  at: Instant,
  by: string,
): RunChange {
  return {
    step: wait.key,
    piece,
    before: runOf(batch, wait.key, piece),
    after: {
      step: wait.key,
      piece,
      startedAt: null,
      startedBy: null,
      finishedAt: null,
      finishedBy: null,
      cutAt: at,
      cutBy: by,
    },
  };
}
