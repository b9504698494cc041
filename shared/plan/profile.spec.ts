import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ClampShelf } from './clamp-shelf';
import { Journal, Profile } from './profile';
import { StationLoad } from './station-load';

const SEED = 20261203;
const RUNS = process.env['DEEP'] === '1' ? 20_000 : 500;
const END = 30;

const span = fc
  .tuple(fc.integer({ min: 0, max: END }), fc.integer({ min: 0, max: END }))
  .map(([a, b]) => ({ from: Math.min(a, b), to: Math.max(a, b) }));
const use = fc.record({ span, amount: fc.integer({ min: 1, max: 4 }), who: fc.nat({ max: 2 }) });
const uses = fc.array(use, { maxLength: 12 });

/** The same by plain counting, minute by minute. */
function counted(all: readonly { span: { from: number; to: number }; amount: number }[]): number[] {
  return Array.from({ length: END + 1 }, (_, t) =>
    all
      .filter(({ span: { from, to } }) => from <= t && t < to)
      .reduce((sum, { amount }) => sum + amount, 0),
  );
}

describe(`capacity over time, against plain counting (seed ${SEED})`, () => {
  it('finds peaks and the end of the last shortage, and takes back what was added', () => {
    fc.assert(
      fc.property(uses, uses, span, fc.nat({ max: 8 }), (kept, undone, { from, to }, limit) => {
        const profile = new Profile();
        for (const { span: s, amount } of kept) profile.add(s.from, s.to, amount);
        for (const { span: s, amount } of undone) profile.add(s.from, s.to, amount);
        for (const { span: s, amount } of undone) profile.add(s.from, s.to, -amount);
        const minutes = counted(kept);
        expect(profile.peak(from, to)).toBe(Math.max(0, ...minutes.slice(from, to)));
        const last = minutes.slice(from, to).findLastIndex((n) => n > limit);
        const until = profile.lastAbove(from, to, limit);
        if (last < 0) expect(until).toBeNull();
        else {
          expect(until).toBeGreaterThan(from + last);
          const end = until ?? 0;
          expect(minutes.slice(from + last, end).every((n) => n > limit)).toBe(true);
        }
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });

  it('counts each batch once where a station counts batches', () => {
    fc.assert(
      fc.property(uses, uses, span, fc.nat({ max: 2 }), (kept, undone, { from, to }, who) => {
        const journal = new Journal();
        const load = new StationLoad(
          { key: 's', station: 's', capacity: 2, countsBatches: true },
          journal,
        );
        for (const each of kept)
          load.hold(`${each.who}`, each.amount, each.span.from, each.span.to);
        const mark = journal.mark();
        for (const each of undone) {
          load.hold(`${each.who}`, each.amount, each.span.from, each.span.to);
        }
        journal.rollback(mark);
        const fits = Array.from({ length: to - from }, (_, i) => from + i).every((t) => {
          const here = kept.filter(({ span: s }) => s.from <= t && t < s.to);
          const there = new Set(here.map((each) => each.who));
          // More than fit may be there as a fact; one more piece of a batch that is there changes nothing.
          return there.has(who) || there.size < 2;
        });
        const until = load.shortUntil(`${who}`, 1, from, to);
        expect(until === null).toBe(fits);
        if (until !== null) expect(until).toBeGreaterThan(from);
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });

  it('chooses clamps that are free through all of a time, or says until when they are short', () => {
    const stocks = [
      { key: 'a', length: 1n, count: 4 },
      { key: 'b', length: 2n, count: 3 },
      { key: 'c', length: 3n, count: 2 },
    ];
    fc.assert(
      fc.property(uses, span, fc.nat({ max: 9 }), (kept, { from, to }, count) => {
        fc.pre(from < to);
        const shelf = new ClampShelf(stocks, new Journal());
        for (const { who, amount, span: s } of kept) {
          shelf.hold(stocks[who]?.key ?? '', amount, s.from, s.to);
        }
        const free = stocks.slice(1).map((stock, i) => {
          const minutes = counted(kept.filter(({ who }) => who === i + 1)).slice(from, to);
          return Math.max(0, stock.count - Math.max(0, ...minutes));
        });
        const chosen = shelf.choose({ count, length: 2n, until: [] }, from, to);
        const enough = free.reduce((sum, n) => sum + n, 0) >= count;
        expect('choice' in chosen).toBe(enough);
        if ('choice' in chosen) {
          const amounts = ['b', 'c'].map(
            (key) => chosen.choice.find((each) => each.key === key)?.amount ?? 0,
          );
          // The shorter ones first.
          const short = Math.min(count, free[0] ?? 0);
          expect(amounts).toEqual([short, count - short]);
          return;
        }
        // Nothing that begins before the shortage is over, and lasts as long, has enough either.
        expect(chosen.shortUntil).toBeGreaterThan(from);
        for (let later = from; later < Math.min(chosen.shortUntil, to); later++) {
          expect('choice' in shelf.choose({ count, length: 2n, until: [] }, later, to)).toBe(false);
        }
      }),
      { numRuns: RUNS, seed: SEED },
    );
  });
});
