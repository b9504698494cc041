import type { Caller } from './caller';

const MM = 1_000_000;

let count = 0;

export interface Problem {
  code: string;
  field: string | null;
  sentence: string;
}

export const DESIGN = {
  name: 'Drift',
  length: `${400 * MM}`,
  width: `${280 * MM}`,
  thickness: `${40 * MM}`,
  strips: [
    { species: 'maple', width: `${60 * MM}` },
    { species: 'walnut', width: `${230 * MM}` },
  ],
  slices: 10,
  panelCount: 1,
  panelBoards: 4,
  blocksPerBoard: 1,
  panelClampCount: 4,
  blockClampCount: 2,
};

export async function tryDesign(caller: Caller, changes: object = {}) {
  const { createDesign } = await caller.get<{
    createDesign: { design: { id: string; name: string } | null; problems: Problem[] };
  }>(
    `mutation ($input: DesignInput!) {
      createDesign(input: $input) {
        design { id name panelClamps { count length } blockClamps { count length } }
        problems { code field sentence }
      }
    }`,
    { input: { ...DESIGN, name: `Drift ${++count}`, ...changes } },
  );
  return createDesign;
}

/** The id of a new design. */
export async function newDesign(caller: Caller, changes: object = {}): Promise<string> {
  const { design, problems } = await tryDesign(caller, changes);
  if (!design) throw new Error(JSON.stringify(problems));
  return design.id;
}

export interface Batch {
  id: string;
  code: string;
  version: number;
}

const BATCH = 'batch { id code version place } problems { code field sentence } event';

export async function newBatch(caller: Caller, input: object): Promise<Batch> {
  const { createBatch } = await caller.get<{
    createBatch: { batch: Batch | null; problems: Problem[] };
  }>(`mutation ($input: CreateBatchInput!) { createBatch(input: $input) { ${BATCH} } }`, { input });
  if (!createBatch.batch) throw new Error(JSON.stringify(createBatch.problems));
  return createBatch.batch;
}

export async function tryMove(caller: Caller, batch: Batch, to: string, more: object = {}) {
  const { moveBatch } = await caller.get<{
    moveBatch: { batch: (Batch & { place: string }) | null; problems: Problem[]; event: number };
  }>(`mutation ($input: MoveBatchInput!) { moveBatch(input: $input) { ${BATCH} } }`, {
    input: { batchId: batch.id, version: batch.version, to, ...more },
  });
  return moveBatch;
}

/** A date so many days from now, by the clock of UTC; far enough from midnight matters to no test that uses it. */
export function inDays(days: number): string {
  return new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);
}

export interface Order {
  id: string;
  code: string;
  lines: { id: string }[];
}

export async function tryOrder(caller: Caller, input: object) {
  const { createOrder } = await caller.get<{
    createOrder: { order: Order | null; problems: Problem[] };
  }>(
    `mutation ($input: CreateOrderInput!) {
      createOrder(input: $input) {
        order { id code clientReference dueDate shipBy customer { id name email } status lines { id count } }
        problems { code field sentence }
      }
    }`,
    { input: { customerName: 'Nell Farrow', dueDate: inDays(30), ...input } },
  );
  return createOrder;
}

export async function newOrder(caller: Caller, input: object): Promise<Order> {
  const { order, problems } = await tryOrder(caller, input);
  if (!order) throw new Error(JSON.stringify(problems));
  return order;
}
