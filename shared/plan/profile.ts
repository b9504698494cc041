import type { Instant } from '#shared/time/instant';

/** How much of something is in use over time: a step function with binary search. */
export class Profile {
  private readonly times: Instant[] = [-Infinity];
  private readonly levels: number[] = [0];

  /** Adds units (negative to take them away again) in [start, end). */
  add(start: Instant, end: Instant, units: number): void {
    if (start >= end) return;
    const from = this.breakAt(start);
    const to = this.breakAt(end);
    for (let i = from; i < to; i++) this.levels[i] = (this.levels[i] ?? 0) + units;
  }

  /** The highest use in [start, end); at `start` when the interval is empty. */
  highest(start: Instant, end: Instant): number {
    let i = this.indexAt(start);
    let highest = this.levels[i] ?? 0;
    for (i += 1; i < this.times.length && (this.times[i] ?? Infinity) < end; i++) {
      highest = Math.max(highest, this.levels[i] ?? 0);
    }
    return highest;
  }

  /** The first time after `after` at which the use falls; null when it never does. */
  nextFall(after: Instant): Instant | null {
    for (let i = this.indexAt(after) + 1; i < this.times.length; i++) {
      if ((this.levels[i] ?? 0) < (this.levels[i - 1] ?? 0)) return this.times[i] ?? null;
    }
    return null;
  }

  /** The index of the piece that holds a time. */
  private indexAt(time: Instant): number {
    let low = 0;
    let high = this.times.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((this.times[middle] ?? 0) <= time) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  private breakAt(time: Instant): number {
    const i = this.indexAt(time);
    if (this.times[i] === time) return i;
    this.times.splice(i + 1, 0, time);
    this.levels.splice(i + 1, 0, this.levels[i] ?? 0);
    return i + 1;
  }
}
