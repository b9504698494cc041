import type { Instant } from '#shared/time/instant';
import type { ActivityRef, Placement } from './model';

/** How often one activity is moved later for the sake of one maximum wait, and for all of a list together. */
const MOST_OF_ONE = 16;
const MOST_OF_LIST = 100;

interface Shift {
  /** Not to start before. */
  readonly at: Instant;
  /** For the sake of. */
  readonly later: ActivityRef;
}

/** Starts moved later so that something further on keeps its maximum wait, while one list is laid. */
export class MaximumShifts {
  private readonly shifts = new Map<string, Shift | null>();
  private readonly tries = new Map<
    string,
    { count: number; least: number; best: Shift | null; isOver: boolean }
  >();
  private left = MOST_OF_LIST;

  of(activity: string): Shift | null {
    return this.shifts.get(activity) ?? null;
  }

  /**
   * Moves an activity later by the overrun of what follows it. True: lay again from it. False: that has been tried often
   * enough; it stands where the overrun was least, and the maximum is missed.
   */
  shift(before: Placement, later: ActivityRef, overrun: number): boolean {
    const key = `${before.activity}>${later.step}/${later.piece}`;
    const standing = this.of(before.activity);
    const tries = this.tries.get(key) ?? { count: 0, least: Infinity, best: null, isOver: false };
    this.tries.set(key, tries);
    if (tries.isOver) return false;
    if (overrun < tries.least) {
      tries.least = overrun;
      tries.best = standing;
    }
    if (tries.count < MOST_OF_ONE && this.left > 0) {
      tries.count += 1;
      this.left -= 1;
      this.shifts.set(before.activity, { at: before.start + overrun, later });
      return true;
    }
    tries.isOver = true;
    if (tries.best === standing) return false;
    this.shifts.set(before.activity, tries.best);
    return true;
  }
}
