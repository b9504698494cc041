import type { Instant } from '#shared/time/instant';

/** What was done since a mark, to be undone when a try leads nowhere. */
export class Journal {
  private readonly undo: (() => void)[] = [];

  mark(): number {
    return this.undo.length;
  }

  note(undo: () => void): void {
    this.undo.push(undo);
  }

  rollback(mark: number): void {
    while (this.undo.length > mark) this.undo.pop()?.();
  }

  /** Nothing noted so far can be undone any more. */
  commit(): void {
    this.undo.length = 0;
  }
}

/**
 * How much of something is in use, as a step function of time. Equal neighbours are always one step, so that adding and
 * then taking away the same gives the same function again.
 */
export class Profile {
  private readonly times: number[] = [-Infinity];
  private readonly used: number[] = [0];

  /** Adds an amount (negative: takes it away) over [from, to); `to` may be Infinity. */
  add(from: Instant, to: number, amount: number): void {
    if (from >= to || amount === 0) return;
    const first = this.split(from);
    const last = to === Infinity ? this.times.length : this.split(to);
    for (let i = first; i < last; i++) this.used[i] = this.usedAt(i) + amount;
    if (last < this.times.length) this.join(last);
    this.join(first);
  }

  /** The highest use at any moment of [from, to). */
  peak(from: Instant, to: number): number {
    if (from >= to) return 0;
    let highest = 0;
    for (let i = this.find(from); i < this.times.length && this.timeAt(i) < to; i++) {
      highest = Math.max(highest, this.usedAt(i));
    }
    return highest;
  }

  /** The end (perhaps Infinity) of the last step in [from, to) that uses more than the limit; null when none does. */
  lastAbove(from: Instant, to: number, limit: number): number | null {
    if (from >= to) return null;
    for (let i = this.findBefore(to); i >= 0; i--) {
      if (this.usedAt(i) > limit) return this.times[i + 1] ?? Infinity;
      if (this.timeAt(i) <= from) break;
    }
    return null;
  }

  /** The steps of [from, to), the last one first, whole: a step may begin earlier and end later. */
  *stepsBackward(from: Instant, to: number): Generator<{ from: number; to: number; used: number }> {
    if (from >= to) return;
    for (let i = this.findBefore(to); i >= 0; i--) {
      yield { from: this.timeAt(i), to: this.times[i + 1] ?? Infinity, used: this.usedAt(i) };
      if (this.timeAt(i) <= from) return;
    }
  }

  private timeAt(i: number): number {
    return this.times[i] ?? Infinity;
  }

  private usedAt(i: number): number {
    return this.used[i] ?? 0;
  }

  /** The step that contains an instant. */
  private find(at: number): number {
    let low = 0;
    let high = this.times.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.timeAt(middle) <= at) low = middle;
      else high = middle - 1;
    }
    return low;
  }

  /** The step that contains the moment just before an instant. */
  private findBefore(at: number): number {
    if (at === Infinity) return this.times.length - 1;
    const i = this.find(at);
    return this.timeAt(i) === at ? i - 1 : i;
  }

  private split(at: Instant): number {
    const i = this.find(at);
    if (this.timeAt(i) === at) return i;
    this.times.splice(i + 1, 0, at);
    this.used.splice(i + 1, 0, this.usedAt(i));
    return i + 1;
  }

  private join(i: number): void {
    if (i <= 0 || this.usedAt(i) !== this.usedAt(i - 1)) return;
    this.times.splice(i, 1);
    this.used.splice(i, 1);
  }
}
