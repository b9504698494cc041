/** Numbers that are the same for the same seed (mulberry32, a public-domain generator). */
export class Random {
  constructor(private state: number) {}

  /** From 0 up to, but not including, 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let t = Math.imul(this.state ^ (this.state >>> 15), 1 | this.state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  }

  /** A whole number from 0 up to, but not including, a bound. */
  below(bound: number): number {
    return Math.floor(this.next() * bound);
  }

  chance(probability: number): boolean {
    return this.next() < probability;
  }

  pick<Item>(items: readonly Item[]): Item {
    const item = items[this.below(items.length)];
    if (item === undefined) throw new Error('There is nothing to pick from.');
    return item;
  }
}
