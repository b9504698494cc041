import { describe, expect, it } from 'vitest';
import { aBatch, aShop, NOW } from '#test/factories/floor';
import {
  EVER_OPEN,
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
  type Planned,
} from '#test/factories/plan';
import { HOUR_MS, MINUTE_MS } from '#shared/time/instant';
import type { Plan, Problem } from '../model';
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

const two = [aPerson('maker'), aPerson('other')];

describe('stations and clamps', () => {
  const rack = aShop({ stations: [{ key: 's', name: 'rack', unit: 'BOARD', capacity: 5 }] });
  const oil = [
    aStep('oil', { takes: [{ resource: 's', until: 'wipe' }] }),
    aWait('soak', 'oil', 60),
    aStep('wipe'),
  ];

  it('refuses a station that holds too much, until what it holds is taken away', () => {
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf(oil, { id, code: `CT-00${i}`, boards: 3 }),
    );
    const people = ['p1', 'p2'].map((id) => aPerson(id));
    const made = right({ people, shop: rack, batches });
    const second = made.at('oil', 0, 'batch-2');
    // While the first soaks: nobody is at it, but its boards are on the rack.
    const early = changed(made, second, moved(second, made.at('oil').end));
    expect(rules(made.problem, early)).toContain('STATION');
  });

  it('counts batches once each where a station counts batches', () => {
    const shop = aShop({ stations: [{ key: 's', name: 's', unit: 'BATCH', capacity: 1 }] });
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf([aStep('a', { station: 's' })], { id, code: `CT-00${i}` }),
    );
    const made = right({ people: two, shop, batches });
    const second = made.at('a', 0, 'batch-2');
    const together = { ...moved(second, NOW), people: ['other'] };
    expect(rules(made.problem, changed(made, second, together))).toContain('STATION');
    const pieces = [
      aStep('a', { scope: 'PANEL', takes: [{ resource: 's', until: 'b' }] }),
      aStep('b'),
    ];
    const inOne = right({ people: two, shop, batches: [aBatchOf(pieces, { boards: 4 })] });
    expect(inOne.at('a', 2).start).toBe(inOne.at('a', 1).start);
  });

  it('blames no piece for a batch that is there as a fact, but what stays after it', () => {
    const shop = aShop({ stations: [{ key: 's', name: 's', unit: 'BATCH', capacity: 1 }] });
    const takes = [{ resource: 's', until: 'a' }];
    const batches = ['batch-1', 'batch-2'].map((id, i) =>
      aBatchOf([aStep('a', { scope: 'PANEL', takes })], {
        id,
        code: `CT-00${i}`,
        boards: 4,
        runs: [1, ...(i === 0 ? [] : [2])].map((piece) => ({
          ...aRun('a', { startedAt: NOW - minutes(50) }),
          piece,
          startedBy: id,
        })),
        occupations: [1, ...(i === 0 ? [] : [2])].map((piece) => ({
          resource: 's',
          isClamps: false,
          amount: 1,
          step: 'a',
          piece,
          since: NOW - minutes(50),
          until: null,
        })),
      }),
    );
    const people = ['batch-1', 'batch-2', 'free'].map((id) => aPerson(id));
    // One batch is there for 10 more minutes, the other for 70: two where one should be, as a fact.
    const made = right({ people, shop, batches });
    const piece = made.at('a', 2);
    expect(piece.start).toBe(NOW + minutes(70));
    const inside = { ...moved(piece, NOW, minutes(10)), people: ['free'] };
    expect(rules(made.problem, changed(made, piece, inside))).toEqual(['DURATION']);
    const outside = { ...moved(piece, NOW), people: ['free'] };
    expect(rules(made.problem, changed(made, piece, outside))).toEqual(['STATION']);
  });

  it('refuses what is taken while a fact holds it', () => {
    const held = aBatchOf([aStep('a', { station: 's' })], {
      runs: [aRun('a', { startedAt: NOW - minutes(10) })],
      occupations: [anOccupation('s', 'a')],
    });
    const shop = aShop({ stations: [{ key: 's', name: 's', unit: 'PIECE', capacity: 1 }] });
    const next = aBatchOf([aStep('a', { station: 's' })], { id: 'batch-2', code: 'CT-002' });
    const made = right({ people: two, shop, batches: [held, next] });
    const waiting = made.at('a', 0, 'batch-2');
    expect(waiting.start).toBe(NOW + minutes(50));
    const early = { ...moved(waiting, NOW + minutes(40)), people: ['other'] };
    expect(rules(made.problem, changed(made, waiting, early))).toEqual(['STATION']);
  });

  const glue = [
    aStep('glue', { scope: 'PANEL', takes: [{ resource: 'CLAMPS', until: 'unclamp' }] }),
    aWait('clamped', 'glue', 60, { scope: 'PANEL', hold: 'CLAMPED' }),
    aStep('unclamp', { scope: 'PANEL', setupMinutes: 5 }),
  ];
  const glued = () =>
    right({
      hours: { zone: 'Europe/Vienna', weekly: EVER_OPEN, exceptions: [] },
      people: ['p1', 'p2'].map((id) => aPerson(id)),
      shop: aShop({
        clamps: [
          { key: 'short', length: 600_000_000n, count: 4 },
          { key: 'long', length: 900_000_000n, count: 4 },
          { key: 'tiny', length: 100_000_000n, count: 40 },
        ],
      }),
      batches: [
        aBatchOf(glue, {
          boards: 2,
          needs: {
            ...aBatch().needs,
            panelBoards: 1,
            panelClamps: { count: 4, length: 500_000_000n },
          },
        }),
      ],
    });

  it.each<[Rule, { key: string; amount: number }[]]>([
    ['CLAMPS', []],
    ['CLAMPS', [{ key: 'long', amount: 3 }]],
    [
      'CLAMPS',
      [
        { key: 'long', amount: 5 },
        { key: 'tiny', amount: -1 },
      ],
    ],
    ['CLAMP_LENGTH', [{ key: 'tiny', amount: 4 }]],
    ['CLAMP_LENGTH', [{ key: 'none', amount: 4 }]],
    // All of the short ones are on the first panel.
    [
      'CLAMPS',
      [
        { key: 'short', amount: 1 },
        { key: 'long', amount: 3 },
      ],
    ],
  ])('refuses %s', (rule, clamps) => {
    const made = glued();
    expect(made.at('glue', 1).clamps).toEqual([{ key: 'short', amount: 4 }]);
    expect(rules(made.problem, changed(made, made.at('glue', 2), { clamps }))).toContain(rule);
  });

  it('takes clamps of several lengths on one piece', () => {
    const made = glued();
    const mixed = [
      { key: 'short', amount: 2 },
      { key: 'long', amount: 2 },
    ];
    const both = [1, 2].reduce<Plan>(
      (plan, piece) => changed({ ...made, plan }, made.at('glue', piece), { clamps: mixed }),
      made.plan,
    );
    expect(rules(made.problem, both)).toEqual([]);
  });

  it('counts clamps until they have been taken off, not until the wait is over', () => {
    const made = glued();
    const all = [{ key: 'short', amount: 4 }];
    const { problem, at } = made;
    const off = at('unclamp', 1);
    const later = moved(off, off.start + HOUR_MS);
    const second = at('glue', 2);
    // The second panel takes the same clamps as soon as the first is out of them.
    const start = off.end;
    const plan = changed(made, second, { ...moved(second, start), clamps: all });
    const last = at('unclamp', 2);
    const done = changed({ ...made, plan }, last, moved(last, start + 2 * HOUR_MS));
    expect(rules(problem, done)).toEqual([]);
    const late = changed({ ...made, plan: done }, off, later);
    expect(rules(problem, late)).toContain('CLAMPS');
  });
});
