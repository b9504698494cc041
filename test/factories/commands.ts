import type { Caller } from './caller';
import type { Problem } from './things';

/** A batch with all that commands change, as the API shows it. */
export interface BatchAnswer {
  id: string;
  code: string;
  version: number;
  place: string;
  shipBy: string | null;
  routeId: string;
  releasedAt: string | null;
  assignedTo: string | null;
  runs: {
    step: string;
    piece: number;
    startedAt: string | null;
    startedBy: string | null;
    finishedAt: string | null;
    finishedBy: string | null;
    cutAt: string | null;
    cutBy: string | null;
  }[];
  occupations: { resource: string; isClamps: boolean; amount: number; step: string }[];
  overrides: { id: string; step: string; piece: number; reason: string; seen: boolean }[];
  forecast: { readyAt: string; nextStartAt: string | null; slackDays: number | null } | null;
  undo: { event: number; by: string; until: string } | null;
}

export interface CommandAnswer {
  batch: BatchAnswer | null;
  problems: Problem[];
  event: number | null;
}

/** All fields of a batch that tests look at. */
export const BATCH_FIELDS = `id code version place shipBy routeId releasedAt assignedTo
  runs { step piece startedAt startedBy finishedAt finishedBy cutAt cutBy }
  occupations { resource isClamps amount step }
  overrides { id step piece reason seen }
  forecast { readyAt nextStartAt slackDays }
  undo { event by until }`;

const PAYLOAD = `{ batch { ${BATCH_FIELDS} } problems { code field sentence } event }`;

type Known = Pick<BatchAnswer, 'id' | 'version'>;

export function start(
  caller: Caller,
  batch: Known,
  step: string,
  pieces: number[],
  more: object = {},
): Promise<CommandAnswer> {
  const input = { batchId: batch.id, version: batch.version, step, pieces, ...more };
  return answer(
    caller,
    `mutation ($input: StepCommandInput!) { it: startStep(input: $input) ${PAYLOAD} }`,
    { input },
  );
}

export function finish(
  caller: Caller,
  batch: Known,
  step: string,
  pieces: number[],
  more: object = {},
): Promise<CommandAnswer> {
  const input = { batchId: batch.id, version: batch.version, step, pieces, ...more };
  return answer(
    caller,
    `mutation ($input: StepCommandInput!) { it: finishStep(input: $input) ${PAYLOAD} }`,
    { input },
  );
}

export function move(
  caller: Caller,
  batch: Known,
  to: string,
  more: object = {},
): Promise<CommandAnswer> {
  const input = { batchId: batch.id, version: batch.version, to, ...more };
  return answer(
    caller,
    `mutation ($input: MoveBatchInput!) { it: moveBatch(input: $input) ${PAYLOAD} }`,
    { input },
  );
}

export function undo(caller: Caller, batch: Known, event: number | null): Promise<CommandAnswer> {
  return answer(
    caller,
    `mutation ($batchId: ID!, $event: Int!) { it: undoCommand(batchId: $batchId, event: $event) ${PAYLOAD} }`,
    { batchId: batch.id, event },
  );
}

export function assign(
  caller: Caller,
  batch: Known,
  memberId: string | null,
): Promise<CommandAnswer> {
  return answer(
    caller,
    `mutation ($batchId: ID!, $version: Int!, $memberId: ID) {
      it: assignBatch(batchId: $batchId, version: $version, memberId: $memberId) ${PAYLOAD}
    }`,
    { batchId: batch.id, version: batch.version, memberId },
  );
}

export function makeBatch(caller: Caller, input: object): Promise<CommandAnswer> {
  return answer(
    caller,
    `mutation ($input: CreateBatchInput!) { it: createBatch(input: $input) ${PAYLOAD} }`,
    { input },
  );
}

/** The batch after a command that must work. */
export async function done(answered: Promise<CommandAnswer>): Promise<BatchAnswer> {
  const { batch, problems } = await answered;
  if (!batch || problems.length > 0) throw new Error(`Refused: ${JSON.stringify(problems)}`);
  return batch;
}

export async function readBatch(caller: Caller, code: string): Promise<BatchAnswer> {
  const { batch } = await caller.get<{ batch: BatchAnswer }>(
    `query ($code: String!) { batch(code: $code) { ${BATCH_FIELDS} } }`,
    { code },
  );
  return batch;
}

export async function history(caller: Caller, batch: Known) {
  const { batchHistory } = await caller.get<{
    batchHistory: {
      nodes: {
        seq: number;
        type: string;
        happenedAt: string;
        recordedAt: string;
        by: string | null;
        sentence: string;
      }[];
    };
  }>(
    `query ($id: ID!) {
      batchHistory(batchId: $id, first: 100) { nodes { seq type happenedAt recordedAt by sentence } }
    }`,
    { id: batch.id },
  );
  return batchHistory.nodes;
}

async function answer(
  caller: Caller,
  document: string,
  variables: Record<string, unknown>,
): Promise<CommandAnswer> {
  const { it } = await caller.get<{ it: CommandAnswer }>(document, variables);
  return it;
}
