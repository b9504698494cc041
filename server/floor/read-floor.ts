import { asc } from 'drizzle-orm';
import { member } from '#drizzle/tables/member';
import { shopCounter } from '#drizzle/tables/shop';
import type { Floor, Route, RouteStep } from '#server/generated/schema';
import type { RouteStep as ModelStep } from '#shared/route/route';
import { readDesigns } from '#server/designs/read-designs';
import type { Context } from '#server/http/context';
import { globalId } from '#server/http/global-id';
import { toCursor } from '#server/live/cursor';
import { presentMember } from '#server/members/present';
import { readShop } from '#server/shop/read-shop';
import { loadBatches } from './load';
import { presentBatch } from './present';

/** Everything the Floor shows, with the place in the stream of events at which it was read. */
export function readFloor(context: Context): Promise<Floor> {
  const { services } = context;
  return context.read(async (tx, shopId) => {
    const now = services.now();
    const [counter] = await tx.select({ seq: shopCounter.seq }).from(shopCounter);
    const shop = await readShop(tx);
    const members = await tx.select().from(member).orderBy(asc(member.name), asc(member.id));
    const designs = await readDesigns(tx);
    const loaded = await loadBatches(tx, 'OPEN', now);
    const routes = new Map(loaded.map(({ floor }) => [floor.route.id, floor.route]));
    return {
      cursor: toCursor(counter?.seq ?? 0),
      now: now.toISOString(),
      shop,
      members: members.map(presentMember),
      designs,
      routes: [...routes.values()].map((route): Route => ({
        id: globalId('route', route.id),
        steps: route.steps.map(presentStep),
      })),
      batches: loaded.map((batch) => presentBatch(batch, now)),
      watchers: services.hub.watchers(shopId),
    };
  });
}

function presentStep(step: ModelStep): RouteStep {
  const { key, stage, name, kind, scope } = step;
  if (step.kind === 'WORK') {
    return {
      key,
      stage,
      name,
      kind,
      scope,
      verb: step.verb,
      setupMinutes: step.setupMinutes,
      pieceMinutes: step.pieceMinutes,
      pausable: step.pausable,
      people: step.people,
      skill: step.skill,
      station: step.station,
      takes: step.takes.map(({ resource, until }) => ({ resource, until })),
      minMinutes: 0,
      caution: step.caution,
    };
  }
  return {
    key,
    stage,
    name,
    kind,
    scope,
    verb: '',
    setupMinutes: 0,
    pieceMinutes: 0,
    pausable: false,
    people: 0,
    takes: [],
    hold: step.hold,
    after: step.after,
    minMinutes: step.minMinutes,
    maxMinutes: step.maxMinutes,
    source: step.source,
    referenceTenthsC: step.referenceTenthsC,
  };
}
