import { describe, expect, it } from 'vitest';
import type { Refusal, RefusalCode } from '#shared/floor/refusal';
import { MINUTE_MS, parseInstant } from '#shared/time/instant';
import { CAUTION_ENDING } from './caution-words';
import { refusalSentence } from './refusal-words';

/** Tuesday, 14:00 in Berlin. */
const now = parseInstant('2026-12-01T13:00:00Z');
const at = (minutes: number) => now + minutes * MINUTE_MS;
const say = (refusal: Refusal) =>
  refusalSentence(refusal, { batchCode: 'CT-014', zone: 'Europe/Berlin', now });

const panel = { piece: 2, pieceKind: 'PANEL' } as const;
const batch = { piece: 0, pieceKind: 'BATCH' } as const;
const glue = { minMinutes: 45, source: 'D3 white glue', referenceTenthsC: 200 };
const bench = { code: 'STATION_FULL', station: 'glue bench', capacity: 2 } as const;
const freedBy = { batchCode: 'CT-019', freeAt: at(70) };

const cases: [Refusal, string][] = [
  [{ code: 'FORBIDDEN', what: 'MOVE' }, 'Your role moves no batches. Ask a maker.'],
  [
    { code: 'FORBIDDEN', what: 'OVERRIDE' },
    'Only an owner or a maker may override a hold. Ask one of them, or wait.',
  ],
  [{ code: 'FORBIDDEN', what: 'UNDO' }, 'Only whoever did it, or a maker, can take it back.'],
  [{ code: 'BATCH_GONE' }, 'CT-014 has left the shop.'],
  [{ code: 'ALREADY_THERE', place: 'SLICE' }, 'CT-014 stands in Slice already.'],
  [{ code: 'NOT_ON_ROUTE', place: 'SURFACE' }, 'The route of CT-014 has no surface.'],
  [{ code: 'STEP_UNKNOWN', step: 'polish' }, 'The route of CT-014 has no work called “polish”.'],
  [
    { code: 'PIECE_UNKNOWN', step: 'glue-up', piece: 7, pieces: 4 },
    'CT-014 has 4 pieces for glue-up, and none with the number 7.',
  ],
  [
    { code: 'PIECE_UNKNOWN', step: 'milling', piece: 1, pieces: 1 },
    'CT-014 has 1 piece for milling, and none with the number 1.',
  ],
  [{ code: 'PIECES_EMPTY' }, 'Say which panel or block it is.'],
  [
    { code: 'ALREADY_STARTED', stepName: 'glue-up', ...panel },
    'Panel 2 of CT-014: glue-up is under way already.',
  ],
  [{ code: 'ALREADY_FINISHED', stepName: 'milling', ...batch }, 'CT-014: milling is done already.'],
  [
    { code: 'NOT_STARTED', stepName: 'glue-up', piece: 3, pieceKind: 'BLOCK' },
    'Block 3 of CT-014: glue-up was not started. Start it first.',
  ],
  [
    { code: 'STEP_BEFORE', stepName: 'slicing', beforeName: 'flattening', ...panel },
    'Slicing comes after flattening of panel 2 of CT-014. Finish that first.',
  ],
  [
    { code: 'STEP_BEFORE', stepName: 'glue-up', beforeName: 'glue-up', ...panel },
    'The next comes after glue-up of panel 2 of CT-014. Finish that first.',
  ],
  [
    { code: 'STEP_BEFORE', stepName: 'ripping', beforeName: 'milling', ...batch },
    'Ripping comes after milling of CT-014. Finish that first.',
  ],
  [
    { code: 'HOLD_RUNNING', kind: 'CLAMPED', clearAt: at(20), ...panel, ...glue },
    'Panel 2 of CT-014 is in clamps until 14:20. The glue (D3 white glue) needs 45 min at 20 °C.',
  ],
  [
    { code: 'HOLD_RUNNING', kind: 'CURE', clearAt: at(1200), ...panel, ...glue, minMinutes: 720 },
    'Panel 2 of CT-014 is curing until Wed 10:00. The glue (D3 white glue) needs 12 h at 20 °C.',
  ],
  [
    {
      code: 'HOLD_RUNNING',
      kind: 'FILLER_CURE',
      clearAt: at(20),
      ...batch,
      minMinutes: 120,
      source: 'the shop',
      referenceTenthsC: null,
    },
    'CT-014 is filler curing until 14:20. The filler needs 2 h.',
  ],
  [
    {
      code: 'HOLD_RUNNING',
      kind: 'DWELL',
      clearAt: at(20),
      ...batch,
      minMinutes: 1440,
      source: 'hardening oil',
      referenceTenthsC: 205,
    },
    'CT-014 is between coats until 14:20. The finish (hardening oil) needs 1 d at 20.5 °C.',
  ],
  [
    { code: 'HOLD_RUNNING', kind: 'ACCLIMATION', clearAt: at(20), ...batch, ...glue },
    'CT-014 is acclimating until 14:20. The wood needs 45 min in the shop’s air.',
  ],
  [
    { code: 'HOLD_AHEAD', kind: 'CURE', beforeName: 'glue-up', minMinutes: 720, source: 'D3' },
    'CT-014 has glue-up before it, and that needs its time afterwards: 12 h curing. Do glue-up first.',
  ],
  [
    { ...bench, need: 1, free: 0, holder: freedBy },
    'The glue bench is full (2 of 2). CT-019 should free it first, at 15:10 at the earliest.',
  ],
  [
    { ...bench, need: 2, free: 1, holder: { ...freedBy, freeAt: null } },
    'The glue bench has room for 1 more, and CT-014 needs 2. CT-019 has it.',
  ],
  [
    { ...bench, need: 1, free: 0, holder: { ...freedBy, freeAt: at(-10) } },
    'The glue bench is full (2 of 2). CT-019 had it until 13:50.',
  ],
  [{ ...bench, need: 1, free: 0, holder: null }, 'The glue bench is full (2 of 2).'],
  [
    { ...bench, need: 3, free: 0, holder: freedBy },
    'The glue bench takes 2 at once, and CT-014 needs 3. Start fewer at once, or make more room.',
  ],
  [
    { code: 'CLAMPS_FULL', need: 4, free: 0, owned: 12, holder: freedBy },
    'CT-014 needs 4 clamps that are long enough, and none is free. CT-019 should free some first, at 15:10 at the earliest.',
  ],
  [
    { code: 'CLAMPS_FULL', need: 4, free: 1, owned: 12, holder: null },
    'CT-014 needs 4 clamps that are long enough, and 1 is free.',
  ],
  [
    { code: 'CLAMPS_FULL', need: 8, free: 6, owned: 7, holder: freedBy },
    'CT-014 needs 8 clamps that are long enough, and the shop has 7. Start fewer pieces at once, or add clamps.',
  ],
  [{ code: 'IN_THE_FUTURE' }, 'This is later than now. Say when it happened.'],
  [
    { code: 'TOO_LONG_AGO', minutes: 120 },
    'You can say what happened up to 2 h ago. Ask a maker to record it.',
  ],
  [
    { code: 'TOO_LONG_AGO', minutes: 60 * 24 * 31 },
    'You can say what happened up to 31 d ago. Say it as of then.',
  ],
  [
    { code: 'BEFORE_THE_FACT_BEFORE', earliest: at(-10) },
    'What comes before it was at 13:50. It cannot have happened earlier.',
  ],
  [
    { code: 'REASON_MISSING', what: 'OVERRIDE' },
    'Write why the hold is overridden, in 3 to 500 characters. It stays on the batch.',
  ],
  [
    { code: 'REASON_MISSING', what: 'REWORK' },
    'Write why the batch goes back, in 3 to 500 characters.',
  ],
  [
    { code: 'CAUTION_FIRST', caution: 'UNCURED_GLUE' },
    `Read this first: A joint that has not cured can open in the machine and throw pieces. ${CAUTION_ENDING}`,
  ],
  [
    { code: 'NOTHING_TO_OVERRIDE' },
    'No hold on CT-014 stands in the way. Do it without an override.',
  ],
  [{ code: 'SHIPPED_STAYS' }, 'CT-014 has left the shop and stays there.'],
  [{ code: 'UNDO_TOO_LATE' }, 'Ten minutes have passed. Move it back instead, and say why.'],
  [
    { code: 'UNDO_BUILT_ON' },
    'Something has been built on it since, so it cannot be taken back. Move the batch instead.',
  ],
];

describe('what a person reads about a refusal', () => {
  it.each(cases)('%#: %o', (refusal, sentence) => {
    expect(say(refusal)).toBe(sentence);
  });

  it('is there for every code', () => {
    // The compiler asks for every code here, so a new one cannot be forgotten.
    const all: Record<RefusalCode, true> = {
      FORBIDDEN: true,
      BATCH_GONE: true,
      ALREADY_THERE: true,
      NOT_ON_ROUTE: true,
      STEP_UNKNOWN: true,
      PIECE_UNKNOWN: true,
      PIECES_EMPTY: true,
      ALREADY_STARTED: true,
      ALREADY_FINISHED: true,
      NOT_STARTED: true,
      STEP_BEFORE: true,
      HOLD_RUNNING: true,
      HOLD_AHEAD: true,
      STATION_FULL: true,
      CLAMPS_FULL: true,
      IN_THE_FUTURE: true,
      TOO_LONG_AGO: true,
      BEFORE_THE_FACT_BEFORE: true,
      REASON_MISSING: true,
      CAUTION_FIRST: true,
      NOTHING_TO_OVERRIDE: true,
      SHIPPED_STAYS: true,
      UNDO_TOO_LATE: true,
      UNDO_BUILT_ON: true,
    };
    const said = new Set(cases.map(([refusal]) => refusal.code));
    expect([...said].sort()).toEqual(Object.keys(all).sort());
  });

  it('reads the clock in the shop’s zone', () => {
    const refusal: Refusal = { code: 'BEFORE_THE_FACT_BEFORE', earliest: now };
    const context = { batchCode: 'CT-014', zone: 'America/St_Johns', now };
    expect(refusalSentence(refusal, context)).toContain(' 09:30.');
  });
});
