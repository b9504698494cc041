import type { Activity, Problem } from './model';

/** What comes before what in a problem, and what has to be laid together. */
export class Graph {
  private readonly byId: ReadonlyMap<string, Activity>;
  private readonly rank: ReadonlyMap<string, number>;
  private readonly batches = new Map<string, Activity[]>();
  /** Activities that must start within a maximum wait of another. */
  private readonly soonAfter = new Map<string, string[]>();

  constructor(problem: Problem) {
    this.byId = new Map(problem.activities.map((activity) => [activity.id, activity]));
    this.rank = new Map(problem.activities.map((activity, index) => [activity.id, index]));
    for (const activity of problem.activities) {
      add(this.batches, activity.batchId, activity);
      for (const link of activity.after) {
        if (link.maxMinutes !== null) add(this.soonAfter, link.activity, activity.id);
      }
    }
  }

  get(id: string): Activity | undefined {
    return this.byId.get(id);
  }

  ofBatch(batchId: string): readonly Activity[] {
    return this.batches.get(batchId) ?? [];
  }

  /**
   * What is free, not placed and comes before the given ones or is one of them, in the order of the route; with those
   * that are bound to follow one of these within a maximum wait, unless told otherwise.
   */
  upTo(
    ids: readonly string[],
    placed: ReadonlyMap<string, unknown>,
    withFollowers = true,
  ): Activity[] {
    const found = new Map<string, Activity>();
    const open = [...ids];
    for (let id = open.pop(); id !== undefined; id = open.pop()) {
      const activity = this.byId.get(id);
      if (activity?.state.kind !== 'FREE' || placed.has(id) || found.has(id)) continue;
      found.set(id, activity);
      for (const link of activity.after) open.push(link.activity);
      if (withFollowers) open.push(...(this.soonAfter.get(id) ?? []));
    }
    return this.inOrder([...found.values()]);
  }

  private inOrder(activities: Activity[]): Activity[] {
    return activities.sort((a, b) => (this.rank.get(a.id) ?? 0) - (this.rank.get(b.id) ?? 0));
  }
}

function add<T>(map: Map<string, T[]>, key: string, value: T): void {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
}
