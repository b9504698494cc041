import { describe, expect, it } from 'vitest';
import { aBatch, aShop, NOW } from '#test/factories/floor';
import {
  aBatchOf,
  aPerson,
  aRun,
  aStep,
  aWait,
  anInput,
  anOccupation,
  planned,
  vienna,
} from '#test/factories/plan';
import { HOUR_MS, MINUTE_MS } from '#shared/time/instant';
import { checkPlan } from './check/check';
import type { PlanInput } from './plan-input';

/** Plans and checks: every case here must also pass the checker. */
function plan(over: Partial<PlanInput>) {
  const made = planned(anInput(over));
  expect(checkPlan(made.problem, made.plan)).toEqual([]);
  return made;
}

const one = [aPerson('maker')];

describe('order, waits and hours', () => {
  it('lays steps one after another from now on, and says why each is not earlier', () => {
    const { at } = plan({ people: one, batches: [aBatchOf([aStep('a'), aStep('b')])] });
    expect(at('a')).toMatchObject({ start: NOW, end: NOW + HOUR_MS, reason: { code: 'NOW' } });
    expect(at('b')).toMatchObject({
      start: NOW + HOUR_MS,
      reason: { code: 'PRECEDENCE', before: { step: 'a' } },
    });
  });

  it('starts on the next whole minute', () => {
    const { at } = plan({ now: NOW + 1, batches: [aBatchOf([aStep('a')])] });
    expect(at('a').start).toBe(NOW + MINUTE_MS);
  });

  it('lets a wait run through the night and takes the work up when the shop opens', () => {
    const steps = [aStep('a'), aWait('w', 'a', 12 * 60, { hold: 'CURE' }), aStep('b')];
    const { at } = plan({ people: one, batches: [aBatchOf(steps)] });
    expect(at('b').start).toBe(vienna('2026-12-02 08:00'));
    expect(at('b').reason).toEqual({
      code: 'HOURS',
      at: vienna('2026-12-02 08:00'),
      since: vienna('2026-12-01 22:00'),
      whose: 'SHOP',
      people: ['maker'],
    });
  });

  it('counts a wait from the step it names, not from the one before it', () => {
    const steps = [aStep('a'), aStep('b'), aWait('w', 'a', 90, { hold: 'CURE' }), aStep('c')];
    const { at } = plan({ people: one, batches: [aBatchOf(steps)] });
    expect(at('c')).toMatchObject({
      start: at('a').end + 90 * MINUTE_MS,
      reason: { code: 'WAIT', hold: 'CURE', wait: { step: 'w', piece: 0 } },
    });
  });

  it('pauses pausable work where hours stop and nowhere else', () => {
    const { at } = plan({
      people: one,
      batches: [aBatchOf([aStep('long', { setupMinutes: 8 * 60 })])],
    });
    expect(at('long').segments).toEqual([
      { start: vienna('2026-12-01 09:00'), end: vienna('2026-12-01 12:00') },
      { start: vienna('2026-12-01 13:00'), end: vienna('2026-12-01 17:00') },
      { start: vienna('2026-12-02 08:00'), end: vienna('2026-12-02 09:00') },
    ]);
  });

  it('puts what may not pause whole into one span', () => {
    const steps = [aStep('a', { setupMinutes: 150 }), aStep('glue', { pausable: false })];
    const { at } = plan({ people: one, batches: [aBatchOf(steps)] });
    expect(at('glue').start).toBe(vienna('2026-12-01 13:00'));
    expect(at('glue').reason).toMatchObject({ code: 'HOURS', whose: 'FIT' });
  });

  it('works only while both the shop and the person do', () => {
    const weekly = Array.from({ length: 7 }, () => [{ from: 600, to: 1260 }]);
    const late = plan({ people: [aPerson('p', { weekly })], batches: [aBatchOf([aStep('a')])] });
    expect(late.at('a')).toMatchObject({
      start: vienna('2026-12-01 10:00'),
      reason: { code: 'HOURS', whose: 'PEOPLE' },
    });
    const sick = plan({
      people: [aPerson('p', { exceptions: [{ date: '2026-12-01', spans: [] }] })],
      batches: [aBatchOf([aStep('a')])],
    });
    expect(sick.at('a').start).toBe(vienna('2026-12-02 08:00'));
  });

  it('opens for everyone without a week of their own on a day that the shop opens besides', () => {
    const { at } = plan({
      now: vienna('2026-12-04 17:00'),
      hours: {
        ...anInput().hours,
        exceptions: [{ date: '2026-12-05', spans: [{ from: 540, to: 720 }] }],
      },
      people: [aPerson('p', { exceptions: [{ date: '2026-12-07', spans: [] }] })],
      batches: [aBatchOf([aStep('a')])],
    });
    expect(at('a').start).toBe(vienna('2026-12-05 09:00'));
  });
});

describe('people', () => {
  it('gives one person one thing at a time, and names what they were at', () => {
    const other = aBatchOf([aStep('b')], { id: 'batch-2', code: 'CT-002' });
    const { at } = plan({ people: one, batches: [aBatchOf([aStep('a')]), other] });
    expect(at('b', 0, 'batch-2')).toMatchObject({
      start: NOW + HOUR_MS,
      reason: { code: 'PEOPLE', holders: [{ batchId: 'batch-1', step: 'a', piece: 0 }] },
    });
  });

  it('takes as many people as a step needs, with its skill, at a time when all are there', () => {
    const step = aStep('lift', { people: 2, skill: 'gluing', pausable: false });
    const people = [
      aPerson('a', { exceptions: [{ date: '2026-12-01', spans: [{ from: 780, to: 1020 }] }] }),
      aPerson('b', { skills: ['sanding'] }),
      aPerson('c', { exceptions: [{ date: '2026-12-01', spans: [{ from: 480, to: 870 }] }] }),
    ];
    const { at } = plan({ people, batches: [aBatchOf([step])] });
    expect(at('lift')).toMatchObject({ people: ['a', 'c'], start: vienna('2026-12-01 13:00') });
  });

  it('takes the person it is given to where that costs no time, else whoever has fewer skills', () => {
    const people = [aPerson('able'), aPerson('other', { skills: ['sanding'] })];
    const step = aStep('a', { skill: 'sanding' });
    expect(plan({ people, batches: [aBatchOf([step])] }).at('a').people).toEqual(['other']);
    const given = aBatchOf([step], { assignedTo: 'able' });
    expect(plan({ people, batches: [given] }).at('a').people).toEqual(['able']);
  });
});

describe('stations and clamps', () => {
  const station = (capacity: number, unit: 'BATCH' | 'PIECE' | 'BOARD') =>
    aShop({ stations: [{ key: 's', name: 'bench', unit, capacity }] });
  const people = ['p1', 'p2', 'p3'].map((id) => aPerson(id));

  it('has one batch after another where a station takes one', () => {
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf([aStep('a', { station: 's' })], { id, code: `CT-00${i}` }),
    );
    const { at } = plan({ people, shop: station(1, 'BATCH'), batches });
    expect(at('a', 0, 'batch-2')).toMatchObject({
      start: NOW + HOUR_MS,
      reason: { code: 'STATION', station: 's', holders: [{ batchId: 'batch-1' }] },
    });
  });

  it('takes the panels of one batch in turn at a station that takes one batch', () => {
    const steps = [aStep('a', { station: 's', scope: 'PANEL' })];
    const batch = aBatchOf(steps, { boards: 4 });
    const { at } = plan({ people, shop: station(1, 'BATCH'), batches: [batch] });
    expect(at('a', 2).start).toBe(at('a', 1).end);
  });

  it('counts boards where a station counts boards, until the step that takes them away has ended', () => {
    const steps = [
      aStep('oil', { takes: [{ resource: 's', until: 'wipe' }] }),
      aWait('soak', 'oil', 60),
      aStep('wipe'),
    ];
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf(steps, { id, code: `CT-00${i}`, boards: 3 }),
    );
    const roomy = plan({ people, shop: station(6, 'BOARD'), batches });
    expect(roomy.at('oil', 0, 'batch-2').start).toBe(NOW);
    const tight = plan({ people, shop: station(5, 'BOARD'), batches });
    // Wiped by noon; after the break the rack is free.
    expect(tight.at('wipe').end).toBe(vienna('2026-12-01 12:00'));
    expect(tight.at('oil', 0, 'batch-2').start).toBe(vienna('2026-12-01 13:00'));
  });

  const glue = [
    aStep('glue', { scope: 'PANEL', takes: [{ resource: 'CLAMPS', until: 'unclamp' }] }),
    aWait('clamped', 'glue', 60, { scope: 'PANEL', hold: 'CLAMPED' }),
    aStep('unclamp', { scope: 'PANEL', setupMinutes: 5 }),
  ];
  const clamps = (short: number, long: number) =>
    aShop({
      clamps: [
        { key: 'short', length: 600_000_000n, count: short },
        { key: 'long', length: 900_000_000n, count: long },
      ],
    });
  const needs = (count: number, millimetres: bigint) => ({
    ...aBatch().needs,
    panelBoards: 1,
    panelClamps: { count, length: millimetres * 1_000_000n },
  });

  it('has clamps taken until someone has taken them off, which may be next morning', () => {
    const now = vienna('2026-12-01 15:30');
    const batch = aBatchOf(glue, { boards: 2, needs: needs(4, 500n) });
    const { at } = plan({ now, people, shop: clamps(4, 0), batches: [batch] });
    expect(at('glue', 1).start).toBe(now);
    expect(at('unclamp', 1).start).toBe(vienna('2026-12-02 08:00'));
    expect(at('glue', 2)).toMatchObject({
      start: vienna('2026-12-02 08:05'),
      reason: { code: 'CLAMPS', holders: [{ step: 'glue', piece: 1 }] },
    });
  });

  it('lets long clamps stand in for short ones, mixed on one panel, and never the other way', () => {
    const batch = aBatchOf(glue, { boards: 2, needs: needs(4, 500n) });
    const mixed = plan({ people, shop: clamps(6, 2), batches: [batch] });
    expect(mixed.at('glue', 1).clamps).toEqual([{ key: 'short', amount: 4 }]);
    expect(mixed.at('glue', 2)).toMatchObject({
      start: NOW,
      clamps: [
        { key: 'short', amount: 2 },
        { key: 'long', amount: 2 },
      ],
    });
    const wide = aBatchOf(glue, { boards: 2, needs: needs(2, 700n) });
    const one = plan({ people, shop: clamps(9, 2), batches: [wide] });
    expect(one.at('glue', 2).start).toBe(one.at('unclamp', 1).end);
  });

  it('leaves out a batch that needs its panels in clamps all at once and has too few', () => {
    const takes = [{ resource: 'CLAMPS', until: 'off' }];
    // One after another on the bench, together in the clamps.
    const steps = [aStep('glue', { scope: 'PANEL', station: 's', takes }), aStep('off')];
    const { stations } = station(1, 'PIECE');
    const batch = aBatchOf(steps, { boards: 3, needs: needs(4, 500n) });
    const enough = { ...clamps(12, 0), stations };
    expect(plan({ people, shop: enough, batches: [batch] }).plan.unplanned).toEqual([]);
    const less = { ...clamps(11, 0), stations };
    const { plan: made } = plan({ people, shop: less, batches: [batch] });
    expect(made.unplanned).toMatchObject([{ batchId: 'batch-1', reason: { code: 'HELD' } }]);
  });

  it('gives clamps back after the step itself where only something else is kept for longer', () => {
    const takes = [
      { resource: 'CLAMPS', until: 'oil' },
      { resource: 's', until: 'wipe' },
    ];
    const steps = [aStep('oil', { scope: 'PANEL', takes }), aStep('wipe')];
    const shop = { ...clamps(4, 0), stations: station(3, 'PIECE').stations };
    const batch = aBatchOf(steps, { boards: 3, needs: needs(4, 500n) });
    const { at } = plan({ people, shop, batches: [batch] });
    expect(at('oil', 2).start).toBe(at('oil', 1).end);
  });

  it('lets blocks that wait for each other’s panels be glued in turn', () => {
    const steps = [
      aStep('plane', { scope: 'BLOCK' }),
      aStep('glue', { scope: 'BLOCK', takes: [{ resource: 'CLAMPS', until: 'off' }] }),
      aWait('fresh', 'plane', 0, { hold: 'FRESHNESS', maxMinutes: 30 }),
      aStep('off', { scope: 'BLOCK' }),
    ];
    const blockClamps = { count: 2, length: 500_000_000n };
    const batch = aBatchOf(steps, { boards: 3, needs: { ...aBatch().needs, blockClamps } });
    const { plan: made } = plan({ people, shop: clamps(2, 0), batches: [batch] });
    expect(made.unplanned).toEqual([]);
  });
});

describe('maximum waits', () => {
  const fresh = (maxMinutes: number) =>
    aWait('fresh', 'plane', 0, { hold: 'FRESHNESS', maxMinutes });

  it('delays the step that a maximum counts from when what follows cannot be in time', () => {
    const now = vienna('2026-12-01 16:00');
    const steps = [aStep('plane'), fresh(120), aStep('glue', { pausable: false })];
    const { at, plan: made } = plan({ now, people: one, batches: [aBatchOf(steps)] });
    expect(at('plane').start).toBe(vienna('2026-12-02 08:00'));
    expect(at('plane').reason).toMatchObject({ code: 'HOURS' });
    expect(at('glue').start).toBe(vienna('2026-12-02 09:00'));
    expect(made.missedMaxima).toEqual([]);
  });

  it('counts a block’s maximum from the first of its panels', () => {
    const steps = [
      aStep('plane', { scope: 'PANEL' }),
      { ...fresh(60), scope: 'BLOCK' as const },
      aStep('glue', { scope: 'BLOCK', pausable: false }),
    ];
    const needs = { ...aBatch().needs, panelCount: 2, panelBoards: 1 };
    const { at, plan: made } = plan({ people: one, batches: [aBatchOf(steps, { needs })] });
    expect(made.missedMaxima).toEqual([]);
    expect(at('glue', 1).start - at('plane', 1).end).toBeLessThanOrEqual(HOUR_MS);
  });

  it('keeps the try with the smallest overrun where nothing helps, and says so', () => {
    const steps = [aStep('plane'), fresh(30), aWait('w', 'plane', 90), aStep('glue')];
    const { plan: made, at } = plan({ people: one, batches: [aBatchOf(steps)] });
    expect(made.missedMaxima).toMatchObject([
      { activity: 'batch-1/glue/0', wait: 'fresh', overrunMinutes: 60 },
    ]);
    expect(at('plane').start).toBe(NOW);
  });

  it('takes a maximum that has been missed already as a fact', () => {
    const finished = { startedAt: NOW - 9 * HOUR_MS, finishedAt: NOW - 8 * HOUR_MS };
    const batch = aBatchOf([aStep('plane'), fresh(60), aStep('glue')], {
      runs: [aRun('plane', finished)],
    });
    const { plan: made, at } = plan({ people: one, batches: [batch] });
    expect(made.missedMaxima).toEqual([]);
    expect(at('glue').start).toBe(NOW);
  });
});

describe('work under way', () => {
  const started = (minutesAgo: number) => ({ startedAt: NOW - minutesAgo * MINUTE_MS });

  it('goes on for what is left of it, with whoever began it', () => {
    const batch = aBatchOf([aStep('a'), aStep('b')], { runs: [aRun('a', started(20))] });
    const { at } = plan({ batches: [batch] });
    expect(at('a')).toMatchObject({
      start: NOW - 20 * MINUTE_MS,
      end: NOW + 40 * MINUTE_MS,
      people: ['maker'],
      reason: { code: 'STARTED' },
    });
    expect(at('b').start).toBe(NOW + 40 * MINUTE_MS);
  });

  it('expects one more minute of work that has taken longer than it should', () => {
    const batch = aBatchOf([aStep('a', { setupMinutes: 10 })], { runs: [aRun('a', started(50))] });
    expect(plan({ batches: [batch] }).at('a').end).toBe(NOW + MINUTE_MS);
  });

  it('does one after another the panels that one person has started together', () => {
    const steps = [aStep('a', { scope: 'PANEL' })];
    const runs = [1, 2].map((piece) => ({ ...aRun('a', started(20)), piece }));
    const { at } = plan({ batches: [aBatchOf(steps, { boards: 4, runs })] });
    expect([at('a', 1).end, at('a', 2).end]).toEqual([NOW + 40 * MINUTE_MS, NOW + 100 * MINUTE_MS]);
  });

  it('holds what is taken until its release is planned, whatever batch comes first', () => {
    const held = aBatchOf(
      [aStep('oil', { takes: [{ resource: 's', until: 'wipe' }] }), aStep('wipe')],
      {
        id: 'batch-2',
        code: 'CT-002',
        shipBy: null,
        runs: [aRun('oil', { startedAt: NOW - HOUR_MS, finishedAt: NOW })],
        occupations: [anOccupation('s', 'oil')],
      },
    );
    const shop = aShop({ stations: [{ key: 's', name: 'rack', unit: 'BATCH', capacity: 1 }] });
    const first = aBatchOf([aStep('a', { station: 's' })]);
    const people = [aPerson('maker'), aPerson('other')];
    const { at } = plan({ shop, people, batches: [first, held] });
    expect(at('wipe', 0, 'batch-2').start).toBe(NOW);
    expect(at('a')).toMatchObject({ start: NOW + HOUR_MS, reason: { code: 'STATION' } });
  });

  it('takes an overridden wait as over', () => {
    const runs = [
      aRun('a', { startedAt: NOW - 2 * HOUR_MS, finishedAt: NOW - HOUR_MS }),
      { ...aRun('w', {}), startedBy: null, cutAt: NOW - 1, cutBy: 'maker' },
    ];
    const batch = aBatchOf([aStep('a'), aWait('w', 'a', 999), aStep('b')], { runs });
    expect(plan({ people: one, batches: [batch] }).at('b').start).toBe(NOW);
  });
});
