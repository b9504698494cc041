import type { Activity, Link } from '../model';
import type { View } from './violation';

const MINUTE = 60_000;

/** What comes before, and the waits in between. Work that has started or is done did so as a fact. */
export function checkOrder(view: View): void {
  const missed = new Set<string>();
  for (const activity of view.activities.values()) {
    const placement = view.placements.get(activity.id);
    if (activity.state.kind !== 'FREE' || !placement) continue;
    for (const link of activity.after) {
      const isMissed = checkLink(view, activity, link, placement.start);
      if (isMissed) missed.add(missedKey(activity.id, link.activity, link.wait?.step));
    }
  }
  for (const { activity, after, wait, latestAt, overrunMinutes } of view.plan.missedMaxima) {
    if (!missed.has(missedKey(activity, after, wait))) {
      view.say('MAXIMUM', activity, 'is named as too late and is not');
      continue;
    }
    const start = view.placements.get(activity)?.start ?? Number.NaN;
    if (overrunMinutes !== Math.ceil((start - latestAt) / MINUTE)) {
      view.say('MAXIMUM', activity, 'is later than the plan says');
    }
  }
}

function checkLink(
  { plan, endOf, say }: View,
  { id }: Activity,
  link: Link,
  start: number,
): boolean {
  const end = endOf(link.activity);
  if (start < end) say('ORDER', id, `starts before ${link.activity} has ended`);
  else if (start < end + link.minMinutes * MINUTE) {
    say('MINIMUM', id, `starts too soon after ${link.activity}`);
  }
  if (link.maxMinutes === null) return false;
  const latest = end + link.maxMinutes * MINUTE;
  if (start <= latest) return false;
  const isNamed = plan.missedMaxima.some(
    (each) =>
      each.activity === id &&
      each.after === link.activity &&
      each.wait === link.wait?.step &&
      each.latestAt === latest,
  );
  if (!isNamed) say('MAXIMUM', id, `starts too late after ${link.activity}`);
  return true;
}

function missedKey(activity: string, after: string, wait: string | undefined): string {
  return JSON.stringify([activity, after, wait]);
}
