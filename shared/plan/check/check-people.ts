import type { Placement } from '../model';
import type { View } from './violation';

/** As many people as needed, each with the skill, none at two things at once. */
export function checkPeople(view: View): void {
  const { problem, activities, placements, say } = view;
  const people = new Map(problem.people.map((person) => [person.id, person]));
  for (const placement of placements.values()) {
    const activity = activities.get(placement.activity);
    if (activity?.state.kind !== 'FREE') continue;
    const ids = new Set(placement.people);
    if (ids.size !== activity.people || ids.size !== placement.people.length) {
      say('PEOPLE', activity.id, `has ${ids.size} people instead of ${activity.people}`);
    }
    for (const id of ids) {
      const person = people.get(id);
      if (!person) say('PEOPLE', activity.id, `is given to ${id}, who is not of the shop`);
      else if (activity.skill !== null && !person.skills.includes(activity.skill)) {
        say('SKILL', activity.id, `is given to ${id}, who lacks ${activity.skill}`);
      }
    }
  }
  for (const id of people.keys()) checkPerson(view, id);
}

/** Work that has started may overlap as it does; anything planned may overlap nothing. */
function checkPerson({ activities, placements, say }: View, person: string): void {
  const isFree = ({ activity }: Placement) => activities.get(activity)?.state.kind === 'FREE';
  const spans = [...placements.values()]
    .filter((placement) => placement.people.includes(person))
    .flatMap((placement) => placement.segments.map(({ start, end }) => ({ placement, start, end })))
    .sort((a, b) => a.start - b.start);
  let open: typeof spans = [];
  for (const span of spans) {
    open = open.filter((other) => other.end > span.start);
    for (const other of open) {
      if (isFree(span.placement) || isFree(other.placement)) {
        say('TWO_PLACES', span.placement.activity, `${person} is at ${other.placement.activity}`);
      }
    }
    open.push(span);
  }
}
