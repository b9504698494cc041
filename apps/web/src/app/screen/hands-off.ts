import type { Hold } from '#shared/floor/model';
import { piecesOf } from '#shared/floor/pieces';
import { holdsOf } from '#shared/floor/progress';
import { stepAt } from '#shared/route/route';
import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { clockWords } from '#shared/time/words';
import { holdWords } from '#shared/words/card-words';
import { piecesName } from '#shared/words/command-words';
import type { BoardBatch } from '../floor/floor-view';

/** Pieces that clear within so many minutes of the first of them are one line. */
const TOGETHER_MINUTES = 60;
const SOON_MINUTES = 60;

/** What must be left alone, and until when. */
export interface HandsOffRow {
  readonly id: string;
  readonly batch: BoardBatch;
  /** "panel 2 in clamps", "3 of 10 blocks curing", "soaking" */
  readonly what: string;
  /** When all of it is clear. */
  readonly clearAt: Instant;
  readonly until: string;
  /** Whether it clears within the hour. */
  readonly soon: boolean;
  /** What is left of the waiting, 1 at its beginning and 0 when it is clear. */
  readonly left: number;
}

/** Running holds by the time they clear. A line with several pieces says when the last of them is clear: the safe side. */
export function handsOff(
  batches: readonly BoardBatch[],
  zone: string,
  now: Instant,
): HandsOffRow[] {
  return batches
    .flatMap((batch) => linesOf(batch, now).map((holds) => toRow(batch, holds, zone, now)))
    .sort((a, b) => a.clearAt - b.clearAt || (a.batch.floor.code < b.batch.floor.code ? -1 : 1));
}

function linesOf(batch: BoardBatch, now: Instant): Hold[][] {
  const lines: Hold[][] = [];
  for (const hold of firstOnEachPiece(batch, holdsOf(batch.floor, now))) {
    const line = lines.find(
      ([first]) =>
        first !== undefined &&
        first.step === hold.step &&
        hold.clearAt - first.clearAt <= TOGETHER_MINUTES * MINUTE_MS,
    );
    if (line) line.push(hold);
    else lines.push([hold]);
  }
  return lines;
}

/** A piece in clamps also cures: of the holds on a piece only the one that comes first in the route is told. */
function firstOnEachPiece(batch: BoardBatch, holds: readonly Hold[]): Hold[] {
  const rank = (hold: Hold) => stepAt(batch.floor.route, hold.step)?.index ?? 0;
  const scope = (hold: Hold) => stepAt(batch.floor.route, hold.step)?.step.scope;
  return holds.filter(
    (hold) =>
      !holds.some(
        (other) =>
          scope(other) === scope(hold) && other.piece === hold.piece && rank(other) < rank(hold),
      ),
  );
}

function toRow(batch: BoardBatch, holds: readonly Hold[], zone: string, now: Instant): HandsOffRow {
  const { floor } = batch;
  const [first] = holds;
  const step = first ? stepAt(floor.route, first.step)?.step : undefined;
  if (!first || !step) throw new Error('A line of holds has at least one, of a step of its route.');
  const since = Math.min(...holds.map((hold) => hold.since));
  const clearAt = Math.max(...holds.map((hold) => hold.clearAt));
  const pieces = holds.map((hold) => hold.piece).sort((a, b) => a - b);
  const on = heldPieces(step.scope, pieces, piecesOf(floor, step.scope).length);
  const whole = Math.max(1, clearAt - since);
  return {
    id: `${floor.id}/${first.step}/${pieces.join(',')}`,
    batch,
    what: [on, holdWords(first.kind)].filter((word) => word !== '').join(' '),
    clearAt,
    until: clockWords(zone, now, clearAt),
    soon: clearAt - now <= SOON_MINUTES * MINUTE_MS,
    left: Math.min(1, Math.max(0, (clearAt - now) / whole)),
  };
}

/** "panel 2", "3 panels" when it is all of them, "3 of 10 blocks"; empty for the whole batch. */
function heldPieces(
  scope: 'BATCH' | 'PANEL' | 'BLOCK',
  pieces: readonly number[],
  of: number,
): string {
  if (scope === 'BATCH') return '';
  if (pieces.length === 1) return piecesName(scope, pieces);
  const kind = scope === 'PANEL' ? 'panels' : 'blocks';
  return pieces.length === of ? `${of} ${kind}` : `${pieces.length} of ${of} ${kind}`;
}
