import type { FloorBatch } from '#shared/floor/model';
import { piecesOf, relatedPieces } from '#shared/floor/pieces';
import { runOf } from '#shared/floor/progress';
import type { RouteStep, StepScope, WorkStep } from '#shared/route/route';

/** The name of a work step on a piece in a problem. */
export function activityId(batchId: string, step: string, piece: number): string {
  return `${batchId}/${step}/${piece}`;
}

export type PieceState = 'FREE' | 'STARTED' | 'DONE';

/** A batch with its route and pieces looked up once: a problem asks for the same relations many times. */
export class BatchPieces {
  private readonly related = new Map<string, readonly number[]>();

  constructor(readonly batch: FloorBatch) {}

  pieces(step: RouteStep): readonly number[] {
    return piecesOf(this.batch, step.scope);
  }

  /** As relatedPieces of the floor. */
  relatedTo(from: StepScope, to: StepScope, piece: number): readonly number[] {
    const key = `${from}/${to}/${piece}`;
    let pieces = this.related.get(key);
    if (!pieces) {
      pieces = relatedPieces(this.batch, from, to, piece);
      this.related.set(key, pieces);
    }
    return pieces;
  }

  state(step: WorkStep, piece: number): PieceState {
    const run = runOf(this.batch, step.key, piece);
    if (run?.finishedAt != null) return 'DONE';
    return run?.startedAt != null ? 'STARTED' : 'FREE';
  }

  id(step: RouteStep, piece: number): string {
    return activityId(this.batch.id, step.key, piece);
  }

  /** The activities whose end gives back what a step on a piece has taken: all the pieces of the step that does. */
  release(step: WorkStep, piece: number, resource: string): string[] {
    const until = step.takes.find((take) => take.resource === resource)?.until ?? step.key;
    const giver = this.batch.route.steps.find((candidate) => candidate.key === until);
    if (giver?.kind !== 'WORK') return [];
    return this.relatedTo(giver.scope, step.scope, piece).map((on) => this.id(giver, on));
  }
}
