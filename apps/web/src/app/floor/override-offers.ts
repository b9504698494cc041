import type { FloorView } from '#shared/floor/judge';
import type { Actor, FloorBatch, Hold } from '#shared/floor/model';
import { relatedPieces } from '#shared/floor/pieces';
import { stepAt, type WorkStep } from '#shared/route/route';
import { holdWords, pieceName, placeWords } from '#shared/words/card-words';
import { moveTo, overrideCautions, type Overridable } from './drop-verdict';

/** Holds that this person may cut short with one command, and the command that does it. */
export interface OverrideOffer {
  readonly words: string;
  readonly command: Overridable;
}

/**
 * Which of the running holds may be overridden just now: by starting the work they keep back or, where its station is
 * full, by moving the batch to that work. Holds that keep the same work back are one offer.
 */
export function overridesOf(
  view: FloorView,
  batch: FloorBatch,
  holds: readonly Hold[],
  actor: Actor,
): OverrideOffer[] {
  const together = new Map<string, { next: WorkStep; pieces: number[]; holds: Hold[] }>();
  for (const hold of holds) {
    const at = stepAt(batch.route, hold.step);
    // In clamps and curing at once: the clamps come first, and the glue goes on curing.
    const isLater = holds.some((other) => {
      const before = stepAt(batch.route, other.step);
      const isSamePiece = before?.step.scope === at?.step.scope && other.piece === hold.piece;
      return isSamePiece && (before?.index ?? 0) < (at?.index ?? 0);
    });
    if (isLater) continue;
    const next = batch.route.steps.slice((at?.index ?? 0) + 1).find((step) => step.kind === 'WORK');
    if (!at || next?.kind !== 'WORK') continue;
    const pieces = relatedPieces(batch, next.scope, at.step.scope, hold.piece).slice(0, 1);
    const key = `${next.key}/${pieces.join()}`;
    const known = together.get(key);
    if (known) known.holds.push(hold);
    else together.set(key, { next, pieces, holds: [hold] });
  }
  return [...together.values()].flatMap(({ next, pieces, holds: kept }): OverrideOffer[] => {
    const start: Overridable = {
      kind: 'START',
      step: next.key,
      pieces,
      happenedAt: null,
      override: null,
    };
    const what = heldWords(batch, kept);
    if (overrideCautions(view, batch, start, actor) !== null) {
      return [{ command: start, words: `Override the hold (${what}): start ${next.name} …` }];
    }
    const move = moveTo(next.stage);
    if (overrideCautions(view, batch, move, actor) === null) return [];
    const words = `Override the hold (${what}): move to ${placeWords(next.stage)} …`;
    return [{ command: move, words }];
  });
}

/** "panel 2 in clamps", "6 curing". */
function heldWords(batch: FloorBatch, holds: readonly Hold[]): string {
  const [hold] = holds;
  if (!hold) return '';
  if (holds.length > 1) return `${holds.length} ${holdWords(hold.kind)}`;
  const piece = pieceName(stepAt(batch.route, hold.step)?.step.scope ?? 'BATCH', hold.piece);
  return piece === '' ? holdWords(hold.kind) : `${piece} ${holdWords(hold.kind)}`;
}
