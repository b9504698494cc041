import { describe, expect, it } from 'vitest';
import { aShop, NOW } from '#test/factories/floor';
import {
  aBatchOf,
  aPerson,
  aRun,
  aStep,
  aWait,
  anInput,
  anOccupation,
  changed,
  moved,
  planned,
  vienna,
  type Planned,
} from '#test/factories/plan';
import { HOUR_MS, MINUTE_MS } from '#shared/time/instant';
import type { Placement, Plan, Problem, UnplannedReason } from '../model';
import type { PlanInput } from '../plan-input';
import { checkPlan } from './check';
import type { Rule } from './violation';

/*
 * Each rule by a plan that is right, and a change that makes it wrong: the checker must take the first and name the rule
 * for the second.
 */

const minutes = (n: number) => n * MINUTE_MS;

function right(over: Partial<PlanInput>): Planned {
  const made = planned(anInput(over));
  expect(checkPlan(made.problem, made.plan)).toEqual([]);
  return made;
}

function rules(problem: Problem, plan: Plan): Rule[] {
  return checkPlan(problem, plan).map(({ rule }) => rule);
}

const one = [aPerson('maker')];
const two = [aPerson('maker'), aPerson('other')];

describe('placement and facts', () => {
  const started = () =>
    right({
      people: two,
      batches: [
        aBatchOf([aStep('a'), aStep('b')], { runs: [aRun('a', { startedAt: NOW - minutes(30) })] }),
      ],
    });

  it('refuses what is missing, doubled, unknown or placed under another name', () => {
    const made = right({ people: one });
    const { plan, problem } = made;
    const [first] = plan.placements;
    if (!first) throw new Error('The plan is empty.');
    const others = plan.placements.slice(1);
    expect(rules(problem, { ...plan, placements: others })).toContain('PLACED_ONCE');
    expect(rules(problem, { ...plan, placements: [...plan.placements, first] })).toContain(
      'PLACED_ONCE',
    );
    for (const change of [{ activity: 'x/y/0' }, { batchId: 'x' }, { step: 'x' }, { piece: 7 }]) {
      expect(rules(problem, changed(made, first, change))).toContain('PLACED_ONCE');
    }
  });

  it('refuses another start or other people for what has started, and a start before now', () => {
    const made = started();
    expect(rules(made.problem, changed(made, made.at('a'), { start: NOW }))).toEqual(['FACT']);
    expect(rules(made.problem, changed(made, made.at('a'), { people: ['other'] }))).toEqual([
      'FACT',
    ]);
    const free = right({ people: one, batches: [aBatchOf([aStep('a')])] });
    const early = moved(free.at('a'), NOW - MINUTE_MS);
    expect(rules(free.problem, changed(free, free.at('a'), early))).toContain('FACT');
  });

  it('refuses to place what is done', () => {
    const done = right({
      people: one,
      batches: [
        aBatchOf([aStep('a'), aStep('b')], {
          runs: [aRun('a', { startedAt: NOW - HOUR_MS, finishedAt: NOW - 1 })],
        }),
      ],
    });
    const again = { ...done.at('b'), activity: 'batch-1/a/0', step: 'a' };
    const placements = [...done.plan.placements, again];
    expect(rules(done.problem, { ...done.plan, placements })).toContain('FACT');
  });

  it('lets facts alone be in two places, but no planned work beside them', () => {
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf([aStep('a'), aStep('b')], {
        id,
        code: `CT-00${i}`,
        runs: [aRun('a', { startedAt: NOW - minutes(10) })],
      }),
    );
    const made = right({ people: two, batches });
    expect(made.at('a').segments[0]).toEqual(made.at('a', 0, 'batch-2').segments[0]);
    const third = right({
      people: two,
      batches: [...batches, aBatchOf([aStep('c')], { id: 'batch-3', code: 'CT-003' })],
    });
    const mine = third.at('c', 0, 'batch-3');
    const beside = changed(third, mine, { ...moved(mine, NOW), people: ['maker'] });
    expect(rules(third.problem, beside)).toContain('TWO_PLACES');
  });
});

describe('durations and hours', () => {
  const long = () =>
    right({ people: one, batches: [aBatchOf([aStep('a', { setupMinutes: 5 * 60 })])] });
  const [morning, noon] = [vienna('2026-12-01 09:00'), vienna('2026-12-01 12:00')];
  const after = vienna('2026-12-01 13:00');

  it.each<[Rule, Partial<Placement>]>([
    ['DURATION', { segments: [] }],
    ['DURATION', { end: vienna('2026-12-01 15:01') }],
    ['DURATION', { start: morning + MINUTE_MS }],
    ['DURATION', { end: after, segments: [{ start: morning, end: noon }] }],
    ['HOURS', moved({ start: morning, end: 0 }, morning, 5 * HOUR_MS)],
    [
      'PAUSE',
      {
        end: vienna('2026-12-01 15:10'),
        segments: [
          { start: morning, end: noon },
          { start: after, end: after + HOUR_MS },
          { start: after + HOUR_MS + minutes(10), end: after + 2 * HOUR_MS + minutes(10) },
        ],
      },
    ],
    [
      'DURATION',
      {
        segments: [
          { start: after, end: after + 2 * HOUR_MS },
          { start: morning, end: noon },
        ],
      },
    ],
  ])('refuses %s', (rule, change) => {
    const made = long();
    expect(made.at('a').segments).toHaveLength(2);
    expect(rules(made.problem, changed(made, made.at('a'), change))).toContain(rule);
  });

  it('refuses work in hours in which only the shop is open', () => {
    const people = [
      aPerson('early', { exceptions: [{ date: '2026-12-01', spans: [{ from: 0, to: 630 }] }] }),
      aPerson('other'),
    ];
    const made = right({ people, batches: [aBatchOf([aStep('a', { setupMinutes: 120 })])] });
    expect(made.at('a').people).toEqual(['other']);
    expect(rules(made.problem, changed(made, made.at('a'), { people: ['early'] }))).toContain(
      'HOURS',
    );
  });

  it('refuses to interrupt what may not pause', () => {
    const steps = [aStep('a', { setupMinutes: 150 }), aStep('glue', { pausable: false })];
    const made = right({ people: one, batches: [aBatchOf(steps)] });
    const start = vienna('2026-12-01 11:30');
    const segments = [
      { start, end: noon },
      { start: after, end: after + minutes(30) },
    ];
    const plan = changed(made, made.at('glue'), { start, end: after + minutes(30), segments });
    expect(rules(made.problem, plan)).toEqual(['ONE_SPAN']);
  });
});

describe('order and waits', () => {
  const steps = (maxMinutes: number | null) => [
    aStep('a'),
    aWait('w', 'a', 30, { maxMinutes }),
    aStep('b'),
  ];

  it('refuses what starts before the step before it has ended, or its wait is over', () => {
    const made = right({ people: two, batches: [aBatchOf(steps(null))] });
    const { at, problem } = made;
    const soon = moved(at('b'), at('a').end - minutes(5));
    const plan = changed(made, at('b'), { ...soon, people: ['other'] });
    expect(new Set(rules(problem, plan))).toEqual(new Set(['ORDER']));
    const early = changed(made, at('b'), moved(at('b'), at('a').end + minutes(29)));
    expect(rules(problem, early)).toEqual(['MINIMUM']);
  });

  it('refuses what starts after a maximum, unless the plan names it, rightly', () => {
    const made = right({ people: two, batches: [aBatchOf(steps(45))] });
    const { at, problem } = made;
    const onTime = changed(made, at('b'), moved(at('b'), at('a').end + minutes(45)));
    expect(rules(problem, onTime)).toEqual([]);
    const late = changed(made, at('b'), moved(at('b'), at('a').end + minutes(50)));
    expect(rules(problem, late)).toEqual(['MAXIMUM']);
    const missed = {
      activity: 'batch-1/b/0',
      after: 'batch-1/a/0',
      wait: 'w',
      latestAt: at('a').end + minutes(45),
      overrunMinutes: 5,
    };
    expect(rules(problem, { ...late, missedMaxima: [missed] })).toEqual([]);
    const less = { ...missed, overrunMinutes: 4 };
    expect(rules(problem, { ...late, missedMaxima: [less] })).toEqual(['MAXIMUM']);
    expect(rules(problem, { ...onTime, missedMaxima: [missed] })).toEqual(['MAXIMUM']);
  });
});

describe('people', () => {
  const lift = () =>
    right({
      people: [...two, aPerson('sander', { skills: ['sanding'] })],
      batches: [aBatchOf([aStep('a', { people: 2, skill: 'gluing' })])],
    });

  it.each<[Rule, string[]]>([
    ['PEOPLE', ['maker']],
    ['PEOPLE', ['maker', 'maker']],
    ['PEOPLE', ['maker', 'stranger']],
    ['SKILL', ['maker', 'sander']],
  ])('refuses %s', (rule, people) => {
    const made = lift();
    expect(rules(made.problem, changed(made, made.at('a'), { people }))).toContain(rule);
  });

  it('refuses one person at two things', () => {
    const other = aBatchOf([aStep('b')], { id: 'batch-2', code: 'CT-002' });
    const made = right({ people: two, batches: [aBatchOf([aStep('a')]), other] });
    const people = made.at('a').people;
    expect(rules(made.problem, changed(made, made.at('b', 0, 'batch-2'), { people }))).toEqual([
      'TWO_PLACES',
    ]);
  });
});

describe('batches left out', () => {
  const fine = () => right({ people: one, batches: [aBatchOf([aStep('a')])] });
  const reasons: UnplannedReason[] = [
    { code: 'ROUTE', step: 'a' },
    { code: 'SKILL', step: 'a', skill: null, need: 1, have: 0 },
    { code: 'HOURS', step: 'a', minutes: 60, pausable: true },
    { code: 'STATION', step: 'a', station: 'planer', need: 2, capacity: 1 },
    { code: 'CLAMPS', step: 'a', need: 4, owned: 0, length: 1n },
    { code: 'HORIZON', step: 'none', piece: 0 },
  ];

  it.each(reasons)('refuses $code where it is not so', (reason) => {
    const { problem, plan } = fine();
    const unplanned = [{ batchId: 'batch-1', reason }];
    expect(rules(problem, { ...plan, placements: [], unplanned })).toEqual(['UNPLANNED']);
  });

  it('refuses a batch that is not there, and one named twice', () => {
    const { problem, plan } = fine();
    const reason = { code: 'HORIZON', step: 'a', piece: 0 } as const;
    const gone = [{ batchId: 'gone', reason }];
    expect(rules(problem, { ...plan, unplanned: gone })).toEqual(['UNPLANNED']);
    const twice = ['batch-1', 'batch-1'].map((batchId) => ({ batchId, reason }));
    expect(rules(problem, { ...plan, placements: [], unplanned: twice })).toEqual(['UNPLANNED']);
  });

  it('still holds what a batch that is left out holds', () => {
    const held = aBatchOf(
      [aStep('a', { takes: [{ resource: 's', until: 'b' }] }), aStep('b', { skill: 'welding' })],
      {
        runs: [aRun('a', { startedAt: NOW - HOUR_MS, finishedAt: NOW - 1 })],
        occupations: [anOccupation('s', 'a')],
      },
    );
    const shop = aShop({ stations: [{ key: 's', name: 's', unit: 'PIECE', capacity: 1 }] });
    const next = aBatchOf([aStep('c', { station: 's' })], { id: 'batch-2', code: 'CT-002' });
    const { problem, plan } = right({ people: one, shop, batches: [held, next] });
    expect(plan.unplanned.map(({ reason }) => reason.code)).toEqual(['SKILL', 'HELD']);
    const placements: Placement[] = [
      {
        activity: 'batch-2/c/0',
        batchId: 'batch-2',
        step: 'c',
        piece: 0,
        ...moved({ start: NOW, end: NOW + HOUR_MS }, NOW),
        people: ['maker'],
        clamps: [],
        reason: { code: 'NOW' },
      },
    ];
    const unplanned = plan.unplanned.slice(0, 1);
    expect(rules(problem, { ...plan, placements, unplanned })).toEqual(['STATION']);
  });
});
