import { placeOf } from '#shared/floor/progress';
import { blockCountOf, panelCountOf } from '#shared/floor/pieces';
import { formatInstant } from '#shared/time/instant';
import type { Batch, HoldOverride } from '#server/generated/schema';
import { globalId } from '#server/http/global-id';
import type { LoadedBatch } from './load';

/** A batch as the API shows it. */
export function presentBatch(loaded: LoadedBatch, now: Date): Batch {
  const { floor, forecast, undo } = loaded;
  return {
    id: globalId('batch', floor.id),
    code: floor.code,
    version: floor.version,
    designId: globalId('design', loaded.designId),
    boards: floor.boards,
    panels: panelCountOf(floor.needs, floor.boards),
    blocks: blockCountOf(floor.needs, floor.boards),
    routeId: globalId('route', floor.route.id),
    dueDate: floor.dueDate,
    shipBy: floor.shipBy,
    place: placeOf(floor, now.getTime()),
    releasedAt: maybeInstant(floor.releasedAt),
    shippedAt: maybeInstant(floor.shippedAt),
    assignedTo: maybeMember(floor.assignedTo),
    runs: floor.runs.map((run) => ({
      step: run.step,
      piece: run.piece,
      startedAt: maybeInstant(run.startedAt),
      startedBy: maybeMember(run.startedBy),
      finishedAt: maybeInstant(run.finishedAt),
      finishedBy: maybeMember(run.finishedBy),
      cutAt: maybeInstant(run.cutAt),
      cutBy: maybeMember(run.cutBy),
    })),
    occupations: floor.occupations
      .filter((held) => held.until === null)
      .map((held) => ({
        resource: held.resource,
        isClamps: held.isClamps,
        amount: held.amount,
        step: held.step,
        piece: held.piece,
        since: formatInstant(held.since),
      })),
    overrides: floor.overrides.map((o): HoldOverride => ({
      id: globalId('override', o.id),
      step: o.step,
      piece: o.piece,
      by: globalId('member', o.by),
      at: formatInstant(o.at),
      reason: o.reason,
      seen: loaded.overridesSeen.has(o.id),
    })),
    forecast: forecast && {
      readyAt: forecast.readyAt.toISOString(),
      nextStartAt: forecast.nextStartAt?.toISOString() ?? null,
      slackMinutes: forecast.slackMinutes,
      slackDays: forecast.slackDays,
    },
    undo: undo && {
      event: undo.event,
      by: maybeMember(undo.by),
      until: undo.until.toISOString(),
    },
  };
}

function maybeInstant(at: number | null): string | null {
  return at === null ? null : formatInstant(at);
}

function maybeMember(id: string | null): string | null {
  return id === null ? null : globalId('member', id);
}
