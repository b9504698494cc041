import type { Instant } from '#shared/time/instant';
import type { ClampStock, ClampTake } from './model';
import { Profile, type Journal } from './profile';

/** Clamps chosen for one piece, by class. */
export type ClampChoice = readonly { readonly key: string; readonly amount: number }[];

/**
 * Which clamps are in use when. A clamp stays on its piece from beginning to end, so a class can give what is free in it
 * through the whole time; clamps of one class are alike, so that counting them is enough.
 */
export class ClampShelf {
  private readonly classes: readonly { stock: ClampStock; profile: Profile }[];

  constructor(
    clamps: readonly ClampStock[],
    private readonly journal: Journal,
  ) {
    this.classes = [...clamps]
      .sort((a, b) => (a.length < b.length ? -1 : a.length > b.length ? 1 : 0))
      .map((stock) => ({ stock, profile: new Profile() }));
  }

  hold(key: string, amount: number, from: Instant, to: number): void {
    const profile = this.classes.find(({ stock }) => stock.key === key)?.profile;
    profile?.add(from, to, amount);
    this.journal.note(() => profile?.add(from, to, -amount));
  }

  /** The classes that are long enough for a need, the shortest first. */
  thatDo(need: ClampTake): string[] {
    return this.classes
      .filter(({ stock }) => stock.length >= need.length)
      .map(({ stock }) => stock.key);
  }

  /** Clamps that are free through all of [from, to), the shortest that will do; else when the last shortage in it ends. */
  choose(
    need: ClampTake,
    from: Instant,
    to: number,
  ): { choice: ClampChoice } | { shortUntil: number } {
    const thatDo = this.classes.filter(({ stock }) => stock.length >= need.length);
    const choice: { key: string; amount: number }[] = [];
    let missing = need.count;
    for (const { stock, profile } of thatDo) {
      const amount = Math.min(missing, Math.max(0, stock.count - profile.peak(from, to)));
      if (amount > 0) choice.push({ key: stock.key, amount });
      missing -= amount;
    }
    return missing <= 0 ? { choice } : { shortUntil: this.shortUntil(thatDo, need, from, to) };
  }

  /**
   * Goes back from the end and takes the least that is free in each class from there on: the step at which the sum falls
   * short must be over before anything can begin.
   */
  private shortUntil(
    thatDo: readonly { stock: ClampStock; profile: Profile }[],
    need: ClampTake,
    from: Instant,
    to: number,
  ): number {
    const steps = thatDo
      .flatMap(({ stock, profile }, index) =>
        [...profile.stepsBackward(from, to)].map((step) => ({
          ...step,
          index,
          free: Math.max(0, stock.count - step.used),
        })),
      )
      .sort((a, b) => b.to - a.to);
    const least = thatDo.map(({ stock }) => stock.count);
    for (const step of steps) {
      least[step.index] = Math.min(least[step.index] ?? 0, step.free);
      if (least.reduce((sum, free) => sum + free, 0) < need.count) return step.to;
    }
    return Infinity;
  }
}
