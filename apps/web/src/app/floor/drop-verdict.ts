import { judge, type FloorView } from '#shared/floor/judge';
import type { Actor, FloorBatch, FloorCommand } from '#shared/floor/model';
import { cautionOf } from '#shared/floor/override';
import type { Refusal } from '#shared/floor/refusal';
import type { CautionCode, Place } from '#shared/route/route';

/** What happens to a card that is let go over a place. */
export type DropVerdict =
  | { readonly kind: 'HERE' }
  /** Rework asks for a reason first. */
  | { readonly kind: 'ACCEPT'; readonly isRework: boolean }
  | { readonly kind: 'REFUSE'; readonly refusal: Refusal };

export type Overridable = Extract<FloorCommand, { kind: 'START' | 'FINISH' | 'MOVE' }>;

export function moveTo(to: Place): Extract<FloorCommand, { kind: 'MOVE' }> {
  return { kind: 'MOVE', to, reason: null, happenedAt: null, override: null };
}

/** Asks the rules of the floor, before anything is let go. */
export function dropVerdict(
  view: FloorView,
  batch: FloorBatch,
  to: Place,
  actor: Actor,
): DropVerdict {
  const verdict = judge(view, batch, moveTo(to), actor);
  if (verdict.ok) return { kind: 'ACCEPT', isRework: false };
  const { refusal } = verdict;
  if (refusal.code === 'ALREADY_THERE') return { kind: 'HERE' };
  if (refusal.code === 'REASON_MISSING' && refusal.what === 'REWORK') {
    return { kind: 'ACCEPT', isRework: true };
  }
  return { kind: 'REFUSE', refusal };
}

/**
 * The cautions to show before a command cuts running holds short, each once; null when this person may not override, or
 * when an override would not help.
 */
export function overrideCautions(
  view: FloorView,
  batch: FloorBatch,
  command: Overridable,
  actor: Actor,
): CautionCode[] | null {
  const override = { reason: 'asked for next', cautionRead: true };
  const verdict = judge(view, batch, { ...command, override }, actor);
  if (!verdict.ok) return null;
  return [...new Set(verdict.changes.cut.map((cut) => cautionOf(cut.kind)))];
}
