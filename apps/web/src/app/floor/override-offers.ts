import type { FloorView } from '#shared/floor/judge';
import type { Actor, FloorBatch, Hold } from '#shared/floor/model';
import { relatedPieces } from '#shared/floor/pieces';
import { stepAt } from '#shared/route/route';
import { holdWords, pieceName } from '#shared/words/card-words';
import { overrideCautions, type Overridable } from './drop-verdict';

/** A hold that this person may cut short, with the command that does it: starting the work that the hold keeps back. */
export interface OverrideOffer {
  readonly words: string;
  readonly hold: Hold;
  readonly command: Overridable;
}

/** Which of the running holds may be overridden just now. */
export function overridesOf(
  view: FloorView,
  batch: FloorBatch,
  holds: readonly Hold[],
  actor: Actor,
): OverrideOffer[] {
  return holds.flatMap((hold) => {
    const at = stepAt(batch.route, hold.step);
    if (!at) return [];
    const next = batch.route.steps.slice(at.index + 1).find((step) => step.kind === 'WORK');
    if (!next) return [];
    const pieces = relatedPieces(batch, next.scope, at.step.scope, hold.piece).slice(0, 1);
    const command: Overridable = {
      kind: 'START',
      step: next.key,
      pieces,
      happenedAt: null,
      override: null,
    };
    if (overrideCautions(view, batch, command, actor) === null) return [];
    const piece = pieceName(at.step.scope, hold.piece);
    const on = piece === '' ? holdWords(hold.kind) : `${piece} ${holdWords(hold.kind)}`;
    return [{ hold, command, words: `Override the hold (${on}): start ${next.name} …` }];
  });
}
