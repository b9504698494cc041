import { describe, expect, it } from 'vitest';
import { aBatch } from '#test/factories/floor';
import { anInput, vienna } from '#test/factories/plan';
import type { Reason, UnplannedReason } from './model';
import { ReasonWords } from './reason-words';

const words = new ReasonWords(
  anInput({ batches: [aBatch(), aBatch({ id: 'batch-2', code: 'CT-002' })] }),
);
const at = vienna('2026-12-02 07:40');
const ref = (step: string, piece: number, batchId = 'batch-1') => ({ batchId, step, piece });

describe('reasons in words', () => {
  it.each<[Reason, string | null]>([
    [{ code: 'NOW' }, null],
    [{ code: 'STARTED' }, null],
    [{ code: 'PRECEDENCE', at, before: ref('slice', 2) }, 'after slicing of panel 2'],
    [{ code: 'WAIT', at, hold: 'CURE', wait: ref('cure-1', 1) }, 'panel 1 is curing'],
    [{ code: 'WAIT', at, hold: 'SOAK', wait: ref('soak-1', 0) }, 'it is soaking'],
    [
      { code: 'STATION', at, station: 'planer', holders: [ref('mill', 0, 'batch-2')] },
      'the planer is taken by CT-002 (milling)',
    ],
    [
      { code: 'CLAMPS', at, holders: [1, 2, 3].map((piece) => ref('glue-1', piece)) },
      'the clamps are taken by glue-up of panel 1, glue-up of panel 2 and 1 more',
    ],
    [
      { code: 'PEOPLE', at, people: ['maker'], holders: [ref('trim', 0, 'batch-2')] },
      'whoever does it is at CT-002 (trimming)',
    ],
    [
      { code: 'HOURS', at, since: at - 1, whose: 'SHOP', people: [] },
      'the shop is closed until then',
    ],
    [
      { code: 'HOURS', at, since: at - 1, whose: 'PEOPLE', people: ['maker'] },
      'whoever does it is not at work until then',
    ],
    [
      { code: 'HOURS', at, since: at - 1, whose: 'FIT', people: ['maker'] },
      'it would not be done in one go before that',
    ],
    [
      { code: 'MAXIMUM', at, later: ref('glue-2', 1) },
      'glue-up of block 1 must follow soon enough',
    ],
  ])('%o', (reason, why) => {
    expect(words.reason('batch-1', reason)).toBe(why && `Not before Wed 07:40: ${why}.`);
  });

  it.each<[UnplannedReason, string]>([
    [
      { code: 'SKILL', step: 'mill', skill: 'machining', need: 1, have: 0 },
      'Milling needs someone with the skill machining; there is nobody.',
    ],
    [
      { code: 'SKILL', step: 'mill', skill: null, need: 3, have: 2 },
      'Milling needs 3 people; there are only 2.',
    ],
    [
      { code: 'HOURS', step: 'glue-1', minutes: 90, pausable: false },
      'Glue-up takes 1 h 30 min without a break, and no working span is that long.',
    ],
    [
      { code: 'HOURS', step: 'mill', minutes: 45, pausable: true },
      'Milling takes 45 min, and nobody who can do it works that long.',
    ],
    [
      { code: 'STATION', step: 'oil-1', station: 'oil-rack', need: 40, capacity: 36 },
      'Oil coat 1 needs 40 places at the oil rack; it has 36.',
    ],
    [
      { code: 'CLAMPS', step: 'glue-1', need: 7, owned: 6, length: 700_000_000n },
      'Glue-up needs 7 clamps of at least 700 mm for one piece; the shop has 6.',
    ],
    [
      { code: 'HELD', step: 'mill', piece: 0, holders: [ref('mill', 0, 'batch-2')] },
      'Milling has to wait for something that is taken, and no plan gives it back: CT-002 (milling).',
    ],
    [{ code: 'HORIZON', step: 'mill', piece: 0 }, 'No room was found for milling.'],
    [
      { code: 'ROUTE', step: 'cure-1' },
      'The route cannot be followed: cure refers to a step that is not there or comes at the wrong place.',
    ],
  ])('%o', (reason, sentence) => {
    expect(words.unplanned('batch-1', reason)).toBe(sentence);
  });
});
