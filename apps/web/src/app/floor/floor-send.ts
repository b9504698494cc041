import { inject, Injectable } from '@angular/core';
import type { FloorCommand } from '#shared/floor/model';
import { formatInstant } from '#shared/time/instant';
import type { OperationVariables, TypedDocumentNode } from '@apollo/client';
import { Apollo } from 'apollo-angular';
import { firstValueFrom } from 'rxjs';
import {
  AssignBatchDocument,
  FinishStepDocument,
  MoveBatchDocument,
  StartStepDocument,
  UndoCommandDocument,
  type CommandAnswerFragment,
} from '../graphql/generated/graphql';

/** Sends commands to the server. Throws when it gives no answer; a refusal is an answer. */
@Injectable({ providedIn: 'root' })
export class FloorSend {
  private readonly apollo = inject(Apollo);

  async command(
    batch: { readonly id: string; readonly version: number },
    command: FloorCommand,
  ): Promise<CommandAnswerFragment> {
    const named = { batchId: batch.id, version: batch.version };
    switch (command.kind) {
      case 'START':
      case 'FINISH': {
        const { step, pieces, override } = command;
        const happenedAt = maybeIso(command.happenedAt);
        const input = { ...named, step, pieces: [...pieces], override, happenedAt };
        return command.kind === 'START'
          ? (await this.run(StartStepDocument, { input })).startStep
          : (await this.run(FinishStepDocument, { input })).finishStep;
      }
      case 'MOVE': {
        const { to, reason, override } = command;
        const input = { ...named, to, reason, override, happenedAt: maybeIso(command.happenedAt) };
        return (await this.run(MoveBatchDocument, { input })).moveBatch;
      }
      case 'ASSIGN': {
        const { memberId } = command;
        return (await this.run(AssignBatchDocument, { ...named, memberId })).assignBatch;
      }
    }
  }

  async undo(batchId: string, event: number): Promise<CommandAnswerFragment> {
    return (await this.run(UndoCommandDocument, { batchId, event })).undoCommand;
  }

  /** The rows are kept by the store, so Apollo's cache is left out. */
  private async run<T, V extends OperationVariables>(
    mutation: TypedDocumentNode<T, V>,
    variables: V,
  ): Promise<T> {
    const options = { mutation, variables, fetchPolicy: 'no-cache' } as Apollo.MutateOptions<T, V>;
    const { data } = await firstValueFrom(this.apollo.mutate<T, V>(options));
    if (!data) throw new Error('The server gave no answer.');
    return data as T;
  }
}

function maybeIso(at: number | null): string | null {
  return at === null ? null : formatInstant(at);
}
