import { describe, expect, it } from 'vitest';
import { aBatch, hours } from '#test/factories/floor';
import { doneBefore, finish, start, WorkingFloor } from '#test/factories/working-floor';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import { stepAt, type Route, type WaitStep } from '#shared/route/route';
import { resolveRoute, type FinishProfile, type GlueProfile } from '#shared/route/template';
import { parseInstant } from '#shared/time/instant';

/*
 * Habits of the trade that the defaults are held against: all of them common practice, no source. Whoever changes a
 * default below them has to change this page first, and say why.
 */

/** Common practice, no source: glued in the afternoon, machined the next morning. */
const NIGHT_MINUTES = 12 * 60;
/** Common practice, no source: oil soaks about an hour before it is wiped. */
const ABOUT_AN_HOUR = { from: 45, to: 90 };
/** Common practice, no source: the second coat goes on a day after the first. */
const A_DAY_MINUTES = 24 * 60;
/** Common practice, no source: in this order, with gaps filled after the second. */
const SANDING = ['80 grit', '120 grit', 'filling gaps', '180 grit'];

const combinations = DEFAULT_GLUES.flatMap((glue) =>
  DEFAULT_FINISHES.map((finishing): [string, GlueProfile, FinishProfile, Route] => [
    `${glue.name}, ${finishing.name}`,
    glue,
    finishing,
    { id: 'r', steps: resolveRoute(DEFAULT_ROUTE, glue, finishing) },
  ]),
);
const waitsOf = (route: Route, hold: string) =>
  route.steps.filter((step): step is WaitStep => step.kind === 'WAIT' && step.hold === hold);

describe.each(combinations)('default route with %s', (_name, _glue, finishing, route) => {
  it('lets glue dry overnight before anything is machined (common practice, no source)', () => {
    const cures = waitsOf(route, 'CURE');
    expect(cures.map((cure) => cure.after)).toEqual(['glue-1', 'glue-2']);
    for (const cure of cures) {
      expect(cure.minMinutes).toBeGreaterThanOrEqual(NIGHT_MINUTES);
      const at = stepAt(route, cure.key)?.index ?? -1;
      const glued = stepAt(route, cure.after)?.index ?? -1;
      // Between gluing and the end of the cure only the clamps come off.
      const between = route.steps.slice(glued + 1, at).filter((step) => step.kind === 'WORK');
      expect(between.map((step) => step.name)).toEqual(['taking clamps off']);
    }
  });

  it('soaks, is wiped, and waits a day for the next coat (common practice, no source)', () => {
    const soaks = waitsOf(route, 'SOAK');
    expect(soaks).toHaveLength(finishing.coats);
    const dwells = waitsOf(route, 'DWELL');
    expect(dwells.map((dwell) => dwell.minMinutes >= A_DAY_MINUTES)).toEqual(
      Array.from({ length: finishing.coats - 1 }, () => true),
    );
    if (finishing.drying) {
      // One that hardens cannot soak that long: it must be off before it sets.
      for (const soak of soaks) expect(soak.maxMinutes).toBeLessThanOrEqual(60);
    } else {
      for (const soak of soaks) {
        expect(soak.minMinutes).toBeGreaterThanOrEqual(ABOUT_AN_HOUR.from);
        expect(soak.minMinutes).toBeLessThanOrEqual(ABOUT_AN_HOUR.to);
      }
    }
    const order = route.steps.filter((step) => step.stage === 'FINISH').map((step) => step.key);
    for (let coat = 1; coat <= finishing.coats; coat++) {
      const at = order.indexOf(`oil-${coat}`);
      expect(order.slice(at, at + 3)).toEqual([`oil-${coat}`, `soak-${coat}`, `wipe-${coat}`]);
    }
  });

  it('sands 80, 120, 180 and fills gaps after 120 (common practice, no source)', () => {
    const sanding = route.steps.filter((step) => step.stage === 'SAND' && step.kind === 'WORK');
    expect(sanding.map((step) => step.name)).toEqual(SANDING);
    const [filler] = waitsOf(route, 'FILLER_CURE');
    const last = stepAt(route, 'sand-180')?.index ?? -1;
    expect(filler?.after).toBe('fill');
    expect(stepAt(route, filler?.key ?? '')?.index).toBeLessThan(last);
  });

  it('flattens after the cure, and glues end grain while those faces are fresh', () => {
    const fresh = waitsOf(route, 'FRESHNESS');
    expect(fresh.map((wait) => wait.after)).toEqual(['rip', 'flatten-1']);
    for (const wait of fresh) expect(wait.maxMinutes).toBeLessThanOrEqual(A_DAY_MINUTES);
    const firstInSlice = route.steps.find((step) => step.stage === 'SLICE');
    expect(firstInSlice?.key).toBe('flatten-1');
  });
});

describe('the defaults', () => {
  it('say that they are defaults and that data sheets come first', () => {
    for (const profile of [...DEFAULT_GLUES, ...DEFAULT_FINISHES]) {
      expect(profile.isDefault).toBe(true);
      expect(profile.note).toMatch(/default/i);
      expect(profile.note).toMatch(/data sheet[^.]* comes first/);
    }
    expect(DEFAULT_ROUTE.isDefault).toBe(true);
    expect(DEFAULT_ROUTE.note).toMatch(/default/i);
    expect(DEFAULT_ROUTE.note).toMatch(/data sheets of your glue and your oil come first/);
  });

  it('name glues and oils by type and class', () => {
    const names = [...DEFAULT_GLUES, ...DEFAULT_FINISHES].map((profile) => profile.name);
    expect(names).toEqual([
      'D3 white glue',
      'D4 white glue',
      'food-grade mineral oil',
      'hardening oil',
    ]);
  });

  it('let a panel glued at five in the afternoon be planed the next morning, and not at night', () => {
    const afternoon = parseInstant('2026-12-01T16:00:00Z');
    const floor = new WorkingFloor([doneBefore(aBatch(), 'glue-1', afternoon - hours(2))]);
    floor.now = afternoon;
    floor.glued();
    floor.unclamped();
    expect(floor.code(start('flatten-1', [1]))).toBe('HOLD_RUNNING');
    floor.now = parseInstant('2026-12-01T23:00:00Z');
    expect(floor.code(start('flatten-1', [1]))).toBe('HOLD_RUNNING');
    floor.now = parseInstant('2026-12-02T07:00:00Z');
    expect(floor.code(start('flatten-1', [1]))).toBe('OK');
  });

  it('let oil be wiped after about an hour and coated again a day later', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'oil-1', aBatch().releasedAt ?? 0)]);
    floor.now = parseInstant('2026-12-04T08:00:00Z');
    floor.give(start('oil-1'));
    floor.give(finish('oil-1'));
    expect(floor.wait(hours(0.5)).code(start('wipe-1'))).toBe('HOLD_RUNNING');
    floor.wait(hours(1)).give(start('wipe-1'));
    floor.give(finish('wipe-1'));
    expect(floor.wait(hours(23)).code(start('oil-2'))).toBe('HOLD_RUNNING');
    expect(floor.wait(hours(1)).code(start('oil-2'))).toBe('OK');
  });
});
