import { desc, eq, lt, sql } from 'drizzle-orm';
import type { Task } from 'graphile-worker';
import { member } from '#drizzle/tables/member';
import { batch } from '#drizzle/tables/batch';
import { forecast, plan } from '#drizzle/tables/plan';
import { shop, shopCounter } from '#drizzle/tables/shop';
import type { PlanInput, PlanResult } from '#shared/plan/plan-shop';
import { appendEvent } from '#server/db/events';
import { loadBatches, loadFloorShop } from '#server/floor/load';
import type { Services } from '#server/http/services';
import type { Planner } from '#server/work/planner';

/** Plans are kept this many back. */
const KEPT = 20;
/** Time passing moves forecasts too: with nothing else happening a shop is planned anew after so long. */
const RENEW_MS = 15 * 60_000;

/** The job that plans one shop: reads it in one snapshot, plans in the planner's thread, keeps a checked plan. */
export function planTask(services: Services, planner: Planner): Task {
  return async (payload, helpers) => {
    const { shopId } = payload as { shopId: string };
    const read = await readShopToPlan(services, shopId);
    if (!read) return;
    const result = await planner.plan(read.input);
    if (result.violations.length > 0) {
      services.log.error(
        { shopId, violations: result.violations.slice(0, 20), count: result.violations.length },
        'a plan breaks rules and was not kept',
      );
      throw new Error('The plan breaks rules and was not kept.');
    }
    const kept = await keepPlan(services, shopId, read.seq, result);
    if (kept) services.hub.wake();
    if (read.input.batches.length === 0) return;
    await helpers.addJob(
      'plan',
      { shopId },
      {
        queueName: `plan ${shopId}`,
        jobKey: `renew plan ${shopId}`,
        jobKeyMode: 'replace',
        runAt: new Date(Date.now() + RENEW_MS),
        maxAttempts: 5,
      },
    );
  };
}

async function readShopToPlan(
  { doors, now }: Services,
  shopId: string,
): Promise<{ input: PlanInput; seq: number } | null> {
  return doors.readShop(shopId, async (tx) => {
    const [settings] = await tx.select().from(shop);
    const [counter] = await tx.select({ seq: shopCounter.seq }).from(shopCounter);
    // A shop that is gone has nothing to plan.
    if (!settings || !counter) return null;
    const at = now();
    const people = await tx.select().from(member).where(eq(member.active, true));
    const loaded = await loadBatches(tx, 'OPEN', at);
    return {
      seq: counter.seq,
      input: {
        now: at.getTime(),
        shop: await loadFloorShop(tx),
        hours: {
          zone: settings.zone,
          weekly: settings.weekly,
          exceptions: settings.exceptions,
        },
        people: people
          .filter((person) => person.skills.length > 0)
          .sort((a, b) => (a.id < b.id ? -1 : 1))
          .map(({ id, skills, weekly, exceptions }) => ({ id, skills, weekly, exceptions })),
        batches: loaded.map(({ floor }) => floor),
      },
    };
  });
}

/** Keeps a plan and its forecasts, and says which batches' forecasts changed. False when a newer plan was kept before. */
async function keepPlan(
  { doors, now }: Services,
  shopId: string,
  seq: number,
  result: PlanResult,
): Promise<boolean> {
  return doors.inShop(shopId, async (tx) => {
    const [latest] = await tx
      .select({ version: plan.version, seq: plan.seq })
      .from(plan)
      .orderBy(desc(plan.version))
      .limit(1);
    if (latest && latest.seq > seq) return false;
    const version = (latest?.version ?? 0) + 1;
    const madeAt = now();
    await tx.insert(plan).values({
      shopId,
      version,
      madeAt,
      seq,
      steps: result.steps,
      unplanned: result.unplanned,
    });
    await tx.delete(plan).where(lt(plan.version, version - KEPT));
    const before = new Map((await tx.select().from(forecast)).map((row) => [row.batchId, row]));
    const open = new Set((await tx.select({ id: batch.id }).from(batch)).map((row) => row.id));
    const rows = result.forecasts
      .filter((each) => open.has(each.batchId))
      .map((each) => ({
        shopId,
        batchId: each.batchId,
        planVersion: version,
        readyAt: new Date(each.readyAt),
        nextStartAt: each.nextStartAt === null ? null : new Date(each.nextStartAt),
        slackMinutes: each.slackMinutes,
        slackDays: each.slackDays,
      }));
    const changed = rows.filter((row) => {
      const old = before.get(row.batchId);
      return (
        old?.readyAt.getTime() !== row.readyAt.getTime() ||
        old.nextStartAt?.getTime() !== row.nextStartAt?.getTime() ||
        old.slackMinutes !== row.slackMinutes ||
        old.slackDays !== row.slackDays
      );
    });
    if (changed.length > 0) {
      await tx
        .insert(forecast)
        .values(changed)
        .onConflictDoUpdate({
          target: [forecast.shopId, forecast.batchId],
          set: {
            planVersion: sql`excluded.plan_version`,
            readyAt: sql`excluded.ready_at`,
            nextStartAt: sql`excluded.next_start_at`,
            slackMinutes: sql`excluded.slack_minutes`,
            slackDays: sql`excluded.slack_days`,
          },
        });
    }
    const planned = new Set(rows.map((row) => row.batchId));
    const gone = [...before.keys()].filter((id) => !planned.has(id));
    for (const id of gone) await tx.delete(forecast).where(eq(forecast.batchId, id));
    await appendEvent(tx, shopId, {
      type: 'PLAN_MADE',
      by: null,
      happenedAt: madeAt,
      recordedAt: madeAt,
      data: { version, seq, batchIds: [...changed.map((row) => row.batchId), ...gone] },
    });
    return true;
  });
}
