import {
  createSourceEventStream,
  execute,
  type ExecutionArgs,
  type ExecutionResult,
} from 'graphql';
import type { Context } from '#server/http/context';
import { endable } from './endable';

/** Results by message, then by what was asked: many screens ask the same of the same message. */
const results = new WeakMap<object, Map<string, ExecutionResult>>();
const documentIds = new WeakMap<object, number>();
let documentCount = 0;

/**
 * graphql-js's subscribe, except that a message is executed once for all subscribers who ask the same with the same
 * rights. The cursor a subscriber started from does not change what a message says, so it is no part of the question.
 */
export async function subscribeOnce(
  args: ExecutionArgs,
): Promise<AsyncGenerator<ExecutionResult, void, void> | ExecutionResult> {
  const source = await createSourceEventStream(args);
  if (!(Symbol.asyncIterator in source)) return source;
  const messages = source[Symbol.asyncIterator]();
  return endable(mapped(source, args, questionOf(args)), () => {
    // Whatever it fails with, whoever waits for the next message is told.
    void messages.return?.().catch(() => undefined);
  });
}

async function* mapped(
  source: AsyncIterable<unknown>,
  args: ExecutionArgs,
  question: string,
): AsyncGenerator<ExecutionResult, void, void> {
  for await (const message of source) {
    if (typeof message !== 'object' || message === null) continue;
    let known = results.get(message);
    if (!known) {
      known = new Map();
      results.set(message, known);
    }
    let result = known.get(question);
    if (!result) {
      result = await execute({ ...args, rootValue: message });
      known.set(question, result);
    }
    yield result;
  }
}

function questionOf(args: ExecutionArgs): string {
  let id = documentIds.get(args.document);
  if (id === undefined) {
    id = documentCount++;
    documentIds.set(args.document, id);
  }
  const { after: _after, ...variables } = args.variableValues ?? {};
  const { principal } = args.contextValue as Context;
  const rights = principal?.kind === 'member' ? principal.roles.join() : principal?.kind;
  return JSON.stringify([id, args.operationName, variables, rights]);
}
