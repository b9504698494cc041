import type { FloorChangeSet } from '#shared/floor/model';
import type { HoldKind, Place, RouteStep, StepScope } from '#shared/route/route';
import { holdWords, pieceName, placeWords } from './card-words';
import { piecesName } from './command-words';

/** What the sentence of a batch's event is made from. */
export interface BatchEventFacts {
  type: string;
  /** Null when the product did it, or somebody whose name is gone. */
  personName: string | null;
  changes: FloorChangeSet | null;
  steps: readonly RouteStep[];
  to: Place | null;
  boards: number | null;
  reason: string | null;
  /** Whom it was given to, where that is known. */
  assigneeName?: string | null;
}

/** What happened to a batch, in words. */
export function batchEventSentence(facts: BatchEventFacts): string {
  const who = facts.personName ?? 'Someone';
  const cut = facts.changes?.cut.length ?? 0;
  const overriding = cut > 0 ? `, overriding ${cut === 1 ? 'a hold' : `${cut} holds`}` : '';
  const because = facts.reason ? `: “${facts.reason}”` : '';
  const place = facts.to ? placeWords(facts.to) : 'another stage';
  switch (facts.type) {
    case 'BATCH_MADE':
      return `${who} made the batch${facts.boards === null ? '' : ` of ${boardsWords(facts.boards)}`}.`;
    case 'STEP_STARTED':
      return `${who} started ${workWords(facts)}${overriding}.`;
    case 'STEP_FINISHED':
      return `${who} finished ${workWords(facts)}.`;
    case 'BATCH_MOVED':
      return `${who} moved it to ${place}${overriding}.`;
    case 'BATCH_REWORKED':
      return `${who} sent it back to ${place}${overriding}${because}.`;
    case 'BATCH_ASSIGNED':
      return `${who} ${assignedWords(facts)}.`;
    case 'COMMAND_UNDONE':
      return `${who} took the last command back.`;
    default:
      return `${who} changed it.`;
  }
}

/** An override, for the owner who has to hear of it. */
export function overrideSentence(facts: {
  batchCode: string;
  personName: string | null;
  hold: HoldKind | null;
  pieceKind: StepScope;
  piece: number;
  reason: string;
}): string {
  const piece = pieceName(facts.pieceKind, facts.piece);
  const what = piece === '' ? facts.batchCode : `${piece} of ${facts.batchCode}`;
  const state = facts.hold ? ` while it was ${holdWords(facts.hold)}` : '';
  return `${facts.personName ?? 'Someone'} overrode a hold on ${what}${state}: “${facts.reason}”`;
}

function boardsWords(boards: number): string {
  return boards === 1 ? '1 board' : `${boards} boards`;
}

function assignedWords({ changes, assigneeName }: BatchEventFacts): string {
  if (changes?.fields.assignedTo?.after === null) return 'gave it to no one';
  return assigneeName ? `gave it to ${assigneeName}` : 'gave it to someone else';
}

/** "glue-up on panels 1 and 2". */
function workWords({ changes, steps }: BatchEventFacts): string {
  const runs = changes?.runs.filter((run) => run.after?.startedAt != null) ?? [];
  const step = steps.find((candidate) => candidate.key === runs[0]?.step);
  if (!step) return 'a step';
  const pieces = runs.filter((run) => run.step === step.key).map((run) => run.piece);
  const on = piecesName(step.scope, pieces);
  return on === '' ? step.name : `${step.name} on ${on}`;
}
