import type { FloorCommand } from '#shared/floor/model';
import type { StepScope } from '#shared/route/route';
import { pieceName, placeWords } from './card-words';

/** What was just done, for the one who did it. */
export function doneSentence(
  batchCode: string,
  command: FloorCommand,
  named: { stepName: string | null; scope: StepScope; personName: string | null },
): string {
  switch (command.kind) {
    case 'START':
    case 'FINISH': {
      const done = command.kind === 'START' ? 'started' : 'finished';
      const on = piecesName(named.scope, command.pieces);
      return `${batchCode}${on === '' ? '' : `, ${on}`}: ${named.stepName ?? command.step} ${done}.`;
    }
    case 'MOVE':
      return command.to === 'SHIPPED'
        ? `${batchCode} has left the shop.`
        : `${batchCode} is in ${placeWords(command.to)} now.`;
    case 'ASSIGN':
      return `${batchCode} is given to ${named.personName ?? 'no one'}.`;
  }
}

/** "panel 2", "panels 1, 2 and 3", "all 3 panels" where `all` says that there are no more; empty for the whole batch. */
export function piecesName(scope: StepScope, pieces: readonly number[], all = false): string {
  const [first] = pieces;
  if (scope === 'BATCH' || first === undefined) return '';
  if (pieces.length === 1) return pieceName(scope, first);
  const kind = scope === 'PANEL' ? 'panels' : 'blocks';
  if (all) return pieces.length === 2 ? `both ${kind}` : `all ${pieces.length} ${kind}`;
  return `${kind} ${pieces.slice(0, -1).join(', ')} and ${pieces.at(-1)}`;
}
