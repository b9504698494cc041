import type { FloorBatch, FloorShop, StationUnit } from '#shared/floor/model';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import type { PlanInput, PlanPerson } from '#shared/plan/plan-input';
import {
  STAGES,
  type Route,
  type RouteStep,
  type StepScope,
  type StepTake,
} from '#shared/route/route';
import { DEFAULT_SKILLS, DEFAULT_WEEKLY } from '#shared/shop/defaults';
import type { Hours, HoursException, Span } from '#shared/time/hours';
import { MINUTE_MS, parseInstant } from '#shared/time/instant';
import { addDays, toLocal } from '#shared/time/zone';
import { aBatch, aRoute, aShop } from './floor';
import { aStep, aWait, EVER_OPEN, worked } from './plan';

/** Weekends on which clocks change, in some of the zones, and a plain week. */
const MOMENTS = [
  '2026-03-28T15:00:00Z',
  '2026-10-24T13:00:00Z',
  '2026-11-01T03:00:00Z',
  '2026-12-01T08:00:00Z',
];
const ZONES = ['Europe/Vienna', 'America/New_York', 'Australia/Lord_Howe', 'Asia/Kolkata'];

/** Numbers by a seed (mulberry32): a whole shop from one number, so that a failing one can be made again. */
class Dice {
  constructor(private state: number) {}

  /** A whole number from 0 to n - 1. */
  below(n: number): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let t = Math.imul(this.state ^ (this.state >>> 15), 1 | this.state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) % n;
  }

  chance(percent: number): boolean {
    return this.below(100) < percent;
  }

  of<T>(items: readonly T[]): T {
    const item = items[this.below(items.length)];
    if (item === undefined) throw new Error('Nothing to choose from.');
    return item;
  }

  times<T>(n: number, make: (i: number) => T): T[] {
    return Array.from({ length: n }, (_, i) => make(i));
  }
}

/** A shop with people, hours, stations, clamps and batches of any kind, some of them under way by the rules of the floor. */
export function randomInput(seed: number): PlanInput {
  const dice = new Dice(seed);
  const zone = dice.of(ZONES);
  const now = parseInstant(dice.of(MOMENTS)) + dice.below(5 * 24 * 60) * MINUTE_MS + dice.below(3);
  const today = toLocal(zone, now).date;
  const hours: Hours = { zone, weekly: weekOf(dice), exceptions: exceptionsOf(dice, today) };
  const shop = shopOf(dice, zone);
  const batches = dice.times(1 + dice.below(5), (i) => batchOf(dice, i, today));
  const picks = dice.times(dice.below(120), () => dice.below(10_000));
  return {
    now,
    shop,
    hours,
    people: dice.times(1 + dice.below(4), (i) => personOf(dice, i, today)),
    batches: worked(shop, batches, picks, now),
  };
}

function weekOf(dice: Dice): Span[][] {
  if (dice.chance(20)) return EVER_OPEN;
  if (dice.chance(40)) return DEFAULT_WEEKLY.map((day) => [...day]);
  return dice.times(7, () => spansOf(dice));
}

function spansOf(dice: Dice): Span[] {
  if (dice.chance(20)) return [];
  const from = dice.below(700);
  const to = from + 60 + dice.below(300);
  return dice.chance(50)
    ? [{ from, to }]
    : [
        { from, to },
        { from: to + 30, to: Math.min(1440, to + 400) },
      ];
}

function exceptionsOf(dice: Dice, today: string): HoursException[] {
  return dice.times(dice.below(3), (i) => ({
    date: addDays(today, i * 2 + dice.below(2)),
    spans: spansOf(dice),
  }));
}

function personOf(dice: Dice, i: number, today: string): PlanPerson {
  return {
    // The ones by whom work under way was begun are among them.
    id: ['maker', 'p1', 'p2', 'p3'][i] ?? `p${i}`,
    skills: dice.chance(70) ? DEFAULT_SKILLS : DEFAULT_SKILLS.filter(() => dice.chance(60)),
    weekly: dice.chance(30) ? weekOf(dice) : null,
    exceptions: dice.chance(30) ? exceptionsOf(dice, today) : [],
  };
}

function shopOf(dice: Dice, zone: string): FloorShop {
  const shop = aShop({ zone });
  const units: StationUnit[] = ['BATCH', 'PIECE', 'BOARD'];
  return {
    ...shop,
    stations: shop.stations.map((station) => ({
      ...station,
      unit: dice.chance(20) ? dice.of(units) : station.unit,
      capacity: dice.chance(30) ? 1 + dice.below(9) : station.capacity,
    })),
    clamps: shop.clamps.map((clamp) => ({ ...clamp, count: dice.below(14) })),
  };
}

function batchOf(dice: Dice, i: number, today: string): FloorBatch {
  const clamps = () => ({
    count: dice.below(6),
    length: BigInt(300 + dice.below(500)) * 1_000_000n,
  });
  return aBatch({
    id: `batch-${i}`,
    code: `CT-${String(i).padStart(3, '0')}`,
    boards: 1 + dice.below(7),
    needs: {
      panelCount: 1 + dice.below(2),
      panelBoards: 1 + dice.below(4),
      blocksPerBoard: 1 + dice.below(2),
      panelClamps: clamps(),
      blockClamps: clamps(),
    },
    route: dice.chance(40)
      ? aRoute(dice.of(DEFAULT_GLUES), dice.of(DEFAULT_FINISHES))
      : routeOf(dice),
    shipBy: dice.chance(80) ? addDays(today, dice.below(30) - 3) : null,
    releasedAt: null,
    assignedTo: dice.chance(30) ? 'p1' : null,
  });
}

/** Any steps in any scopes, with waits that count from any of those before and things taken until any of those after. */
function routeOf(dice: Dice): Route {
  const scopes: StepScope[] = ['BATCH', 'PANEL', 'BLOCK'];
  const count = 2 + dice.below(7);
  const steps: RouteStep[] = [];
  for (let i = 0; i < count; i++) {
    const stage = STAGES[Math.floor((i * STAGES.length) / count)] ?? 'FINISH';
    if (i > 0 && dice.chance(60)) {
      const minMinutes = dice.of([0, 30, 90, 12 * 60]);
      steps.push(
        aWait(`wait-${i}`, `step-${dice.below(i)}`, minMinutes, {
          stage,
          scope: dice.of(scopes),
          maxMinutes: dice.chance(40) ? minMinutes + dice.of([30, 120, 24 * 60]) : null,
        }),
      );
    }
    const takes: StepTake[] = [];
    for (const resource of ['CLAMPS', 'oil-rack', 'glue-bench']) {
      if (!dice.chance(20)) continue;
      takes.push({ resource, until: `step-${i + dice.below(Math.min(3, count - i))}` });
    }
    steps.push(
      aStep(`step-${i}`, {
        stage,
        scope: dice.of(scopes),
        setupMinutes: dice.below(60),
        pieceMinutes: dice.below(30),
        pausable: dice.chance(70),
        people: dice.chance(85) ? 1 : 2,
        skill: dice.chance(50) ? dice.of(DEFAULT_SKILLS) : null,
        station: dice.chance(50) ? dice.of(['planer', 'glue-bench', 'sanding-bench']) : null,
        takes,
      }),
    );
  }
  return { id: 'random', steps };
}
