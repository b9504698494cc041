import { localId } from '#server/http/global-id';
import { newId } from '#server/db/uuid';
import type { ApiServer } from './api-server';
import { newClient, newOwner, newScreen, type Person } from './people';
import { newBatch, newDesign, newOrder, tryMove, type Batch, type Order } from './things';
import { until } from './until';

/** A shop that has at least one row in every table, and the API's ids of what is in it. */
export interface FullShop {
  owner: Person;
  /** The row's id. */
  id: string;
  designId: string;
  order: Order;
  batch: Batch;
  overrideId: string;
  screenId: string;
  keyId: string;
  sessionId: string;
  /** The number of the last floor command on the batch. */
  event: number;
}

export async function fullShop(server: ApiServer, shopName: string): Promise<FullShop> {
  const owner = await newOwner(server, { shopName });
  const { caller } = owner;
  const id = localId('shop', owner.shopId) ?? '';
  const designId = await newDesign(caller);
  const order = await newOrder(caller, {
    clientReference: 'PO 1',
    lines: [{ designId, count: 4 }],
  });
  const made = await newBatch(caller, {
    designId,
    boards: 4,
    orderLineIds: [order.lines[0]?.id],
    idempotencyKey: 'once',
  });
  const moved = await tryMove(caller, made, 'BLANK');
  const batch = moved.batch ?? made;
  await newScreen(server, owner);
  await newClient(server, owner, ['ORDERS_READ']);
  const overrideId = newId();
  const batchId = localId('batch', batch.id);
  const memberId = localId('member', owner.memberId);
  // The planner brings the plan, the forecast and the relay's cursor, and takes away what it did not bring.
  await until(
    'the batch has a forecast',
    () => server.admin.query('select from forecast where batch_id = $1', [batchId]),
    ({ rowCount }) => rowCount === 1,
  );
  const insert = (text: string, ...values: unknown[]) => server.admin.query(text, [id, ...values]);
  await insert(
    `insert into hold_override (shop_id, id, batch_id, step, piece, by, at, reason)
     values ($1, $2, $3, 'cure-1', 1, $4, now(), 'a test')`,
    overrideId,
    batchId,
    memberId,
  );
  await insert(
    `insert into rework_reason (shop_id, id, batch_id, reason) values ($1, $2, $3, 'a test')`,
    newId(),
    batchId,
  );
  await insert(
    `insert into step_run (shop_id, batch_id, step, piece, started_at) values ($1, $2, 'mill', 0, now())
     on conflict do nothing`,
    batchId,
  );
  await insert(
    `insert into occupation (shop_id, batch_id, resource, is_clamps, amount, step, piece, since)
     values ($1, $2, 'planer', false, 1, 'mill', 0, now()) on conflict do nothing`,
    batchId,
  );
  await insert(
    `insert into reading (shop_id, id, at, temperature_tenths_c) values ($1, $2, now(), 190)`,
    newId(),
  );
  const { screens, apiKeys, sessions } = await caller.get<
    Record<'screens' | 'apiKeys' | 'sessions', { id: string }[]>
  >('{ screens { id } apiKeys { id } sessions { id } }');
  return {
    owner,
    id,
    designId,
    order,
    batch,
    overrideId: `override_${overrideId.replaceAll('-', '')}`,
    screenId: screens[0]?.id ?? '',
    keyId: apiKeys[0]?.id ?? '',
    sessionId: sessions[0]?.id ?? '',
    event: moved.event,
  };
}
