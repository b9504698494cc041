import type { Instant } from '#shared/time/instant';
import type { StationCapacity } from './model';
import { Profile, type Journal } from './profile';

/** Who is at a station when, against its capacity. */
export class StationLoad {
  private readonly all = new Profile();
  /** Where batches count once: how many of a batch's pieces are there. */
  private readonly own = new Map<string, Profile>();

  constructor(
    readonly of: StationCapacity,
    private readonly journal: Journal,
  ) {}

  hold(batchId: string, units: number, from: Instant, to: number): void {
    this.change(batchId, units, from, to);
    this.journal.note(() => this.change(batchId, -units, from, to));
  }

  giveBack(batchId: string, units: number, from: Instant, to: number): void {
    this.change(batchId, -units, from, to);
    this.journal.note(() => this.change(batchId, units, from, to));
  }

  /** Null when so many more units fit through all of [from, to), else when the last shortage in it ends. */
  shortUntil(batchId: string, units: number, from: Instant, to: number): number | null {
    if (!this.of.countsBatches) return this.all.lastAbove(from, to, this.of.capacity - units);
    const own = this.own.get(batchId);
    if (!own) return this.all.lastAbove(from, to, this.of.capacity - 1);
    // While the batch is there already, one more of its pieces takes nothing.
    for (const step of own.stepsBackward(from, to)) {
      if (step.used > 0) continue;
      const until = this.all.lastAbove(
        Math.max(from, step.from),
        Math.min(to, step.to),
        this.of.capacity - 1,
      );
      if (until !== null) return Math.min(until, step.to);
    }
    return null;
  }

  private change(batchId: string, units: number, from: Instant, to: number): void {
    if (from >= to) return;
    if (!this.of.countsBatches) {
      this.all.add(from, to, units);
      return;
    }
    let own = this.own.get(batchId);
    if (!own) {
      own = new Profile();
      this.own.set(batchId, own);
    }
    const amount = Math.sign(units);
    if (amount < 0) own.add(from, to, amount);
    for (const step of [...own.stepsBackward(from, to)]) {
      if (step.used > 0) continue;
      this.all.add(Math.max(from, step.from), Math.min(to, step.to), amount);
    }
    if (amount > 0) own.add(from, to, amount);
  }
}
