import { MINUTE_MS, type Instant } from '#shared/time/instant';
import { Bookings } from './bookings';
import { Lay, type Failure } from './lay';
import { Graph } from './graph';
import type { Activity, Held, MissedMaximum, Plan, Problem, UnplannedReason } from './model';
import { withHolders } from './holders';
import { unplannable } from './unplannable';

/**
 * A first plan by one forward pass: right rather than clever. Work under way goes on; then whatever holds clamps or
 * stations now is given its way to letting them go; then batch by batch, the earliest ship-by first, each step at its
 * earliest. Something that is taken until a later step ends is laid together with that step, so that clamps are counted
 * until someone has taken them off.
 *
 * Where a step would come after a maximum wait, the step that the wait counts from is moved later and the batch laid
 * again, a bounded number of times. Where none of these keeps the maximum, the try with the smallest overrun is kept and
 * named in `missedMaxima`. A batch for which there is no plan is named in `unplanned`; of such a batch only work under
 * way, and what gives back something that it holds, is placed.
 *
 * The same problem gives the same plan, to the byte.
 */
export function planForward(problem: Problem): Plan {
  const bookings = new Bookings(problem);
  const graph = new Graph(problem);
  const lay = new Lay(problem, bookings, graph);
  const unplanned = unplannable(problem, bookings.teams);
  const held = holdFacts(problem, bookings);
  const fail = (batchId: string, reason: UnplannedReason) => {
    if (!unplanned.has(batchId)) unplanned.set(batchId, reason);
  };
  for (const activity of problem.activities) {
    if (activity.state.kind !== 'STARTED') continue;
    if (!lay.goOn(activity)) fail(activity.batchId, hoursReason(activity));
  }
  freeHeld(problem, lay, graph, held, bookings);
  for (const batch of [...problem.batches].sort((a, b) => a.priority - b.priority)) {
    if (unplanned.has(batch.id)) continue;
    const failure = lay.layAll(graph.ofBatch(batch.id));
    if (failure) fail(batch.id, reasonOf(failure, problem, lay));
  }
  const placements = [...lay.placed.values()].sort(
    (a, b) => a.start - b.start || (a.activity < b.activity ? -1 : 1),
  );
  return {
    placements: withHolders(problem, placements),
    unplanned: problem.batches.flatMap(({ id }) => {
      const reason = unplanned.get(id);
      return reason ? [{ batchId: id, reason }] : [];
    }),
    missedMaxima: missedMaxima(problem, lay),
  };
}

interface OpenHold {
  held: Held;
  isFreed: boolean;
}

function holdFacts(problem: Problem, bookings: Bookings): OpenHold[] {
  for (const held of problem.held) bookings.holdFact(held);
  bookings.journal.commit();
  return problem.held
    .filter((held) => held.until === null)
    .map((held) => ({ held, isFreed: false }));
}

/**
 * Lays what gives back the things that are held now. One of them may need what another holds, so it goes round until no
 * round frees anything more; what is left stays held, for good as far as the plan can tell.
 */
function freeHeld(
  problem: Problem,
  lay: Lay,
  graph: Graph,
  holds: readonly OpenHold[],
  bookings: Bookings,
): void {
  const priority = new Map(problem.batches.map((batch) => [batch.id, batch.priority]));
  const order = [...holds].sort(
    (a, b) => (priority.get(a.held.batchId) ?? 0) - (priority.get(b.held.batchId) ?? 0),
  );
  for (let freed = true; freed;) {
    freed = false;
    for (const hold of order) {
      if (hold.isFreed) continue;
      const { release } = hold.held;
      const failed =
        lay.layAll(graph.upTo(release, lay.placed)) &&
        lay.layAll(graph.upTo(release, lay.placed, false));
      if (failed) continue;
      const at = lay.endOf(release);
      if (at === null) continue;
      bookings.freeFact(hold.held, Math.max(problem.now, at));
      bookings.journal.commit();
      hold.isFreed = true;
      freed = true;
    }
  }
}

function hoursReason({ step, minutes, pausable }: Activity): UnplannedReason {
  return { code: 'HOURS', step, minutes, pausable };
}

function reasonOf({ activity, isHeld }: Failure, problem: Problem, lay: Lay): UnplannedReason {
  const { step, piece } = activity;
  if (!isHeld) return { code: 'HORIZON', step, piece };
  const resources = new Set(activity.takes.map((take) => take.resource));
  const holders = problem.held
    .filter((held) => (held.isClamps ? activity.clamps !== null : resources.has(held.resource)))
    .filter((held) => held.until === null && lay.endOf(held.release) === null)
    .map(({ batchId, step: of, piece: on }) => ({ batchId, step: of, piece: on }));
  return { code: 'HELD', step, piece, holders };
}

function missedMaxima(problem: Problem, lay: Lay): MissedMaximum[] {
  return problem.activities.flatMap((activity) => {
    const placement = lay.placed.get(activity.id);
    if (activity.state.kind !== 'FREE' || !placement) return [];
    return activity.after.flatMap((link): MissedMaximum[] => {
      const end = lay.endOf([link.activity]);
      if (link.maxMinutes === null || link.wait === null || end === null) return [];
      const latestAt: Instant = end + link.maxMinutes * MINUTE_MS;
      if (placement.start <= latestAt) return [];
      return [
        {
          activity: activity.id,
          after: link.activity,
          wait: link.wait.step,
          latestAt,
          overrunMinutes: Math.ceil((placement.start - latestAt) / MINUTE_MS),
        },
      ];
    });
  });
}
