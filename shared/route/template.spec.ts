import { describe, expect, it } from 'vitest';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from './default-profiles';
import { DEFAULT_ROUTE } from './default-route';
import { rankOf, stagesOf, STAGES, stepAt, type Route, type WaitStep } from './route';
import { resolveRoute, type FinishProfile, type GlueProfile } from './template';

const [glue, strongGlue] = DEFAULT_GLUES as [GlueProfile, GlueProfile];
const [plainOil, dryingOil] = DEFAULT_FINISHES as [FinishProfile, FinishProfile];

const route = (finish = plainOil, by = glue): Route => ({
  id: 'r',
  steps: resolveRoute(DEFAULT_ROUTE, by, finish),
});
const keysIn = (of: Route, stage: string) =>
  of.steps.filter((step) => step.stage === stage).map((step) => step.key);
const waitIn = (of: Route, key: string) => stepAt(of, key)?.step as WaitStep;

describe('a batch’s own route', () => {
  it('lays the steps of a coat once for each coat, without a dwell after the last', () => {
    expect(keysIn(route(), 'FINISH')).toEqual([
      'oil-1',
      'soak-1',
      'wipe-1',
      'dwell-1',
      'oil-2',
      'soak-2',
      'wipe-2',
      'final-check',
    ]);
    expect(keysIn(route({ ...plainOil, coats: 1 }), 'FINISH')).toEqual([
      'oil-1',
      'soak-1',
      'wipe-1',
      'final-check',
    ]);
    const three = route({ ...plainOil, coats: 3 });
    expect(
      three.steps.filter((step) => step.kind === 'WAIT' && step.hold === 'DWELL'),
    ).toHaveLength(2);
  });

  it('numbers names, what waits count from, and what gives back', () => {
    const of = route({ ...plainOil, coats: 3 });
    expect(stepAt(of, 'oil-3')?.step).toMatchObject({
      name: 'oil coat 3',
      takes: [{ resource: 'oil-rack', until: 'wipe-3' }],
    });
    expect(waitIn(of, 'soak-3').after).toBe('oil-3');
    expect(waitIn(of, 'dwell-2').after).toBe('wipe-2');
    expect(JSON.stringify(of.steps)).not.toContain('#');
  });

  it('gives a hardening oil its full cure after the last coat, and a plain one none', () => {
    expect(stepAt(route(), 'finish-cure')).toBeNull();
    const hardening = route({ ...dryingOil, coats: 3 });
    expect(waitIn(hardening, 'finish-cure')).toMatchObject({
      hold: 'FINISH_CURE',
      after: 'wipe-3',
      minMinutes: dryingOil.fullCureMinutes,
      source: 'hardening oil',
    });
    expect(keysIn(hardening, 'FINISH').slice(-2)).toEqual(['finish-cure', 'final-check']);
  });

  it('takes its figures from the glue, the finish and the shop, and says from which', () => {
    const of = route(dryingOil, strongGlue);
    expect(waitIn(of, 'clamped-1')).toMatchObject({
      minMinutes: 90,
      maxMinutes: null,
      source: 'D4 white glue',
      referenceTenthsC: 200,
    });
    expect(waitIn(of, 'cure-2').minMinutes).toBe(16 * 60);
    expect(waitIn(of, 'soak-1')).toMatchObject({ minMinutes: 20, maxMinutes: 45 });
    expect(waitIn(of, 'filler-cure')).toMatchObject({ source: 'the shop', referenceTenthsC: null });
    expect(waitIn(route(), 'soak-1').maxMinutes).toBeNull();
  });

  it.each([
    ['plain oil', route()],
    ['hardening oil', route(dryingOil, strongGlue)],
    ['one coat', route({ ...dryingOil, coats: 1 })],
  ])('holds together: %s', (_name, of) => {
    const keys = of.steps.map((step) => step.key);
    expect(new Set(keys).size).toBe(keys.length);
    expect(stagesOf(of)).toEqual([...STAGES]);
    const ranks = of.steps.map((step) => rankOf(step.stage));
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b));
    for (const [index, step] of of.steps.entries()) {
      if (step.kind === 'WAIT') {
        const from = stepAt(of, step.after);
        // A wait counts from work before it, or no batch would ever get past it.
        expect(from?.step.kind, step.key).toBe('WORK');
        expect(from?.index, step.key).toBeLessThan(index);
        if (step.maxMinutes !== null) {
          expect(step.maxMinutes).toBeGreaterThanOrEqual(step.minMinutes);
        }
        continue;
      }
      for (const take of step.takes) {
        const giver = stepAt(of, take.until);
        expect(giver?.step.kind, take.until).toBe('WORK');
        expect(giver?.index).toBeGreaterThan(index);
      }
    }
    expect(of.steps.at(-1)?.key).toBe('final-check');
  });

  it('leaves the template as it is', () => {
    const before = JSON.stringify(DEFAULT_ROUTE);
    route(dryingOil);
    expect(JSON.stringify(DEFAULT_ROUTE)).toBe(before);
  });
});
