import { checkDuration } from './check-duration';
import { checkOrder } from './check-order';
import { checkClamps, checkStations } from './check-occupation';
import { checkPeople } from './check-people';
import { checkUnplanned } from './check-unplanned';
import type { Activity, Placement, Plan, Problem } from '../model';
import type { Rule, View, Violation } from './violation';

export type { Violation } from './violation';

/**
 * Every rule that a plan breaks, worked out from the problem alone: shares only the model with the planner.
 *
 * - All free or started work is placed once, unless its batch is named as unplanned; of such a batch any part may be.
 * - Facts stay: what is done is not placed, what has started keeps its start and its people, nothing free starts before now.
 * - Work lasts as long as it should, in the hours of all its people and the shop; it pauses only where those stop, and not
 *   at all when it may not.
 * - What comes before has ended, minimum waits are over, maximum waits are kept unless the plan names them as missed.
 * - No station holds more than it takes, no class of clamps has more in use than there are, through all of the time for
 *   which they are taken. Each piece has as many clamps of sufficient length as it needs, of classes that the plan names;
 *   as clamps of one class are alike, that there are always enough of each class means that they can be handed out.
 * - Facts alone may be over a capacity or have someone in two places; planned work may not add to it.
 */
export function checkPlan(problem: Problem, plan: Plan): Violation[] {
  const found: Violation[] = [];
  const say = (rule: Rule, activity: string, detail: string) => {
    found.push({ rule, activity, detail });
  };
  const view = viewOf(problem, plan, say);
  for (const activity of problem.activities) {
    const placement = view.placements.get(activity.id);
    if (!placement) {
      if (activity.state.kind !== 'DONE' && !view.unplanned.has(activity.batchId)) {
        say('PLACED_ONCE', activity.id, 'is not placed');
      }
      continue;
    }
    checkFacts(view, activity, placement);
    checkDuration(view, activity, placement);
  }
  checkOrder(view);
  checkPeople(view);
  checkStations(view);
  checkClamps(view);
  checkUnplanned(view);
  return found;
}

function viewOf(problem: Problem, plan: Plan, say: View['say']): View {
  const activities = new Map(problem.activities.map((activity) => [activity.id, activity]));
  const placements = new Map<string, Placement>();
  for (const placement of plan.placements) {
    const { activity: id } = placement;
    const activity = activities.get(id);
    if (!activity) say('PLACED_ONCE', id, 'is no part of the problem');
    else if (
      activity.batchId !== placement.batchId ||
      activity.step !== placement.step ||
      activity.piece !== placement.piece
    ) {
      say('PLACED_ONCE', id, 'is placed under another name');
    }
    if (placements.has(id)) say('PLACED_ONCE', id, 'is placed twice');
    placements.set(id, placement);
  }
  return {
    problem,
    plan,
    activities,
    placements,
    unplanned: new Set(plan.unplanned.map(({ batchId }) => batchId)),
    endOf: (id) => {
      const state = activities.get(id)?.state;
      return state?.kind === 'DONE' ? state.finishedAt : (placements.get(id)?.end ?? Infinity);
    },
    say,
  };
}

function checkFacts({ problem, say }: View, { id, state }: Activity, placement: Placement): void {
  switch (state.kind) {
    case 'DONE':
      say('FACT', id, 'is done and yet placed');
      return;
    case 'STARTED':
      if (placement.start !== state.startedAt) say('FACT', id, 'has started at another time');
      if (!sameTexts(placement.people, state.people)) say('FACT', id, 'is done by other people');
      return;
    case 'FREE':
      if (placement.start < problem.now) say('FACT', id, 'starts before now');
  }
}

function sameTexts(a: readonly string[], b: readonly string[]): boolean {
  return a.length === b.length && a.every((text) => b.includes(text));
}
