import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { localId } from '#server/http/global-id';
import { startApiServer, type ApiServer } from '../factories/api-server';
import {
  assign,
  done,
  finish,
  makeBatch,
  readBatch,
  start,
  type BatchAnswer,
} from '../factories/commands';
import { follow } from '../factories/follower';
import { newMember, newOwner, type Person } from '../factories/people';
import { inDays, newDesign } from '../factories/things';
import { until } from '../factories/until';

/* The plan that follows every change. Nothing here measures time: it waits until the plan is there. */

let server: ApiServer;
let owner: Person;
let maker: Person;
let shopId: string;
let designId: string;

beforeAll(async () => {
  server = await startApiServer();
  owner = await newOwner(server);
  maker = await newMember(server, owner, ['MAKER']);
  shopId = localId('shop', owner.shopId) ?? '';
  designId = await newDesign(owner.caller, { panelBoards: 2 });
});
afterAll(() => server.stop());

interface PlanAnswer {
  version: number;
  madeAt: string;
  seq: number;
  steps: {
    batchId: string;
    step: string;
    piece: number;
    startAt: string;
    endAt: string;
    members: string[];
    reason: string | null;
  }[];
  unplanned: { batchId: string; reason: string }[];
}

async function planOf(caller = owner.caller): Promise<PlanAnswer | null> {
  const { plan } = await caller.get<{ plan: PlanAnswer | null }>(
    `{ plan { version madeAt seq steps { batchId step piece startAt endAt members reason } unplanned { batchId reason } } }`,
  );
  return plan;
}

/** The first plan that knows an event. */
async function planAfter(event: number | null): Promise<PlanAnswer> {
  const plan = await until(
    `event ${event} is planned`,
    () => planOf(),
    (made) => (made?.seq ?? 0) >= (event ?? Infinity),
  );
  if (!plan) throw new Error('There is no plan.');
  return plan;
}

describe('a plan', () => {
  it('is none before there is anything to plan, and holds every step of a new batch', async () => {
    const made = await makeBatch(owner.caller, { designId, boards: 4, dueDate: inDays(40) });
    const batch = await done(Promise.resolve(made));
    const plan = await planAfter(made.event);
    expect(plan.unplanned).toEqual([]);
    const steps = plan.steps.filter((step) => step.batchId === batch.id);
    // Two panels and four blocks; waits are no steps of the plan.
    const pieces = (key: string) =>
      steps.filter(({ step }) => step === key).map(({ piece }) => piece);
    expect(pieces('mill')).toEqual([0]);
    expect(pieces('glue-1').sort()).toEqual([1, 2]);
    expect(pieces('unclamp-2').sort()).toEqual([1, 2, 3, 4]);
    expect(pieces('final-check')).toEqual([0]);
    expect(pieces('cure-1')).toEqual([]);
    const starts = plan.steps.map(({ startAt }) => startAt);
    expect(starts).toEqual([...starts].sort());
    for (const { startAt, endAt, members, reason } of steps) {
      expect(Date.parse(endAt)).toBeGreaterThan(Date.parse(startAt));
      // Members with skills do the work; reasons are sentences.
      expect([owner.memberId, maker.memberId]).toEqual(expect.arrayContaining(members));
      expect(members.length).toBeGreaterThan(0);
      if (reason !== null) expect(reason).toMatch(/^[A-Z].*[.]$/);
    }
    const { forecast } = await readBatch(owner.caller, batch.code);
    const last = Math.max(...steps.map(({ endAt }) => Date.parse(endAt)));
    expect(Date.parse(forecast?.readyAt ?? '')).toBeGreaterThanOrEqual(last);
    expect(forecast?.nextStartAt).toBe(starts[0]);
    expect(forecast?.slackDays).toBeGreaterThan(0);
  });

  it('follows every command: each batch has a forecast, and what is done is not planned again', async () => {
    let batch = await done(makeBatch(owner.caller, { designId, boards: 2 }));
    batch = await done(start(maker.caller, batch, 'mill', [0]));
    const finished = await finish(maker.caller, batch, 'mill', [0]);
    const plan = await planAfter(finished.event);
    expect(
      plan.steps.filter((each) => each.batchId === batch.id).map(({ step }) => step),
    ).not.toContain('mill');
    const { floor } = await owner.caller.get<{
      floor: { batches: Pick<BatchAnswer, 'code' | 'forecast'>[] };
    }>('{ floor { batches { code forecast { readyAt } } } }');
    expect(floor.batches.length).toBeGreaterThan(1);
    for (const { code, forecast } of floor.batches) expect(forecast, code).not.toBeNull();
  });

  it('is told to whoever watches, with the forecasts that changed', async () => {
    const follower = await follow(server, owner.caller);
    const made = await makeBatch(owner.caller, { designId, boards: 1, dueDate: inDays(30) });
    await until(
      'its forecast is told',
      () => follower.messages.flatMap(({ batches }) => batches),
      (told) => told.some((each) => each.id === made.batch?.id && each.forecast !== null),
    );
    await follower.end();
  });

  it('names a batch that cannot be planned and why, and plans the others', async () => {
    const huge = await newDesign(owner.caller, { panelClampCount: 40 });
    const made = await makeBatch(owner.caller, { designId: huge, boards: 1 });
    const plan = await planAfter(made.event);
    expect(plan.unplanned).toMatchObject([{ batchId: made.batch?.id }]);
    expect(plan.unplanned[0]?.reason).toMatch(/40 clamps/);
    expect(plan.steps.some((step) => step.batchId === made.batch?.id)).toBe(false);
    expect(new Set(plan.steps.map((step) => step.batchId)).size).toBeGreaterThan(1);
    expect((await readBatch(owner.caller, made.batch?.code ?? '')).forecast).toBeNull();
    await server.admin.query('update batch set shipped_at = now() where id = $1', [
      localId('batch', made.batch?.id ?? ''),
    ]);
  });
});

describe('a job that fails', () => {
  const jobs = async () => {
    const { rows } = await server.admin.query<{ attempts: number; last_error: string | null }>(
      `select attempts, last_error from graphile_worker.jobs where key = 'plan ' || $1 and last_error is not null`,
      [shopId],
    );
    return rows;
  };

  it('leaves the last plan as it is, and is tried again', async () => {
    const made = await makeBatch(owner.caller, { designId, boards: 1 });
    const batch = await done(Promise.resolve(made));
    const before = await planAfter(made.event);
    const forecast = (await readBatch(owner.caller, batch.code)).forecast;
    // Hours that no command can write, and that the planner's thread cannot read.
    const { rows } = await server.admin.query('select weekly from shop where id = $1', [shopId]);
    await server.admin.query(`update shop set weekly = '7' where id = $1`, [shopId]);
    const commanded = await assign(owner.caller, batch, maker.memberId);
    await until('it has failed', jobs, (failed) => failed.length === 1);
    expect(await planOf()).toEqual(before);
    expect((await readBatch(owner.caller, batch.code)).forecast).toEqual(forecast);
    await server.admin.query('update shop set weekly = $2 where id = $1', [
      shopId,
      JSON.stringify(rows[0].weekly),
    ]);
    // Nothing else happens in the shop: it is the same job that comes again, here without its pause.
    await server.admin.query(
      `update graphile_worker._private_jobs set run_at = now() where key = 'plan ' || $1`,
      [shopId],
    );
    const after = await planAfter(commanded.event);
    expect(after.version).toBe(before.version + 1);
    expect(await jobs()).toEqual([]);
  });

  it('is released when its worker is gone, and done by another', async () => {
    const made = await makeBatch(owner.caller, { designId, boards: 1 });
    const before = await planAfter(made.event);
    await server.admin.query(
      `select graphile_worker.add_job('plan', json_build_object('shopId', $1::text), queue_name := 'plan ' || $1,
         job_key := 'plan ' || $1, run_at := now() + interval '1 hour')`,
      [shopId],
    );
    await server.admin.query(
      `with queue as (
         update graphile_worker._private_job_queues set locked_by = 'pool-gone', locked_at = now() - interval '1 minute'
         where queue_name = 'plan ' || $1
       ) update graphile_worker._private_jobs
         set locked_by = 'pool-gone', locked_at = now() - interval '1 minute', run_at = now(), attempts = 1
         where key = 'plan ' || $1`,
      [shopId],
    );
    // Commands find the shop's queue taken until then.
    const commanded = await assign(owner.caller, made.batch as BatchAnswer, maker.memberId);
    const after = await planAfter(commanded.event);
    expect(after.version).toBeGreaterThan(before.version);
    const { rows } = await server.admin.query(
      `select locked_by from graphile_worker._private_job_queues where locked_by = 'pool-gone'`,
    );
    expect(rows).toEqual([]);
  });
});
