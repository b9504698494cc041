import { describe, expect, it } from 'vitest';
import { NOW } from '#test/factories/floor';
import { aBatchOf, anInput, aPerson, aStep, aWait, planned, vienna } from '#test/factories/plan';
import { HOUR_MS } from '#shared/time/instant';
import type { FloorBatch } from '#shared/floor/model';
import type { Forecast } from './forecast';
import { forecasts } from './forecast';

/** One person; 60 minutes of work from Tuesday 09:00, then a wait. */
function forecastOf(waitMinutes: number, over: Partial<FloorBatch>): Forecast | undefined {
  const steps = [aStep('a'), aWait('w', 'a', waitMinutes, { hold: 'FINISH_CURE' })];
  const input = anInput({ people: [aPerson('p')], batches: [aBatchOf(steps, over)] });
  const { problem, plan } = planned(input);
  return forecasts(problem, plan, input.hours).get('batch-1');
}

describe('forecasts', () => {
  it('has a batch ready when its last wait is over, and says when its next step starts', () => {
    expect(forecastOf(90, { shipBy: null })).toEqual({
      batchId: 'batch-1',
      readyAt: vienna('2026-12-01 11:30'),
      nextStartAt: NOW,
      slackMinutes: null,
      slackDays: null,
    });
  });

  it.each([
    ['2026-12-01', 0, 6 * 60, 0],
    ['2026-12-03', 0, 6 * 60 + 2 * 8 * 60, 2],
    // Until Monday, over a weekend.
    ['2026-12-07', 0, 6 * 60 + 4 * 8 * 60, 4],
    // Sunday's work ended on Friday.
    ['2026-12-06', 0, 6 * 60 + 3 * 8 * 60, 3],
    ['2026-11-30', 0, -60 * 2, -1],
    // Ready at 17:00 sharp, and a minute later: that one leaves next morning.
    ['2026-12-01', 7 * 60, 0, 0],
    ['2026-12-01', 7 * 60 + 1, -1, -1],
    // Ready in the night before the day: in time.
    ['2026-12-02', 18 * 60, 8 * 60, 0],
    // Ready on Saturday for Friday: late, though no working time lies between.
    ['2026-12-04', 4 * 24 * 60, -1, -1],
  ])('for ship-by %s with %i minutes of waiting', (shipBy, wait, slackMinutes, slackDays) => {
    expect(forecastOf(wait, { shipBy })).toMatchObject({ slackMinutes, slackDays });
  });

  it('takes the last fact for a batch that is done, and forgets none', () => {
    const at = { startedAt: NOW - 2 * HOUR_MS, finishedAt: NOW - HOUR_MS };
    const run = { step: 'a', piece: 0, startedBy: 'p', finishedBy: 'p', cutAt: null, cutBy: null };
    expect(forecastOf(0, { shipBy: null, runs: [{ ...run, ...at }] })).toMatchObject({
      readyAt: NOW - HOUR_MS,
      nextStartAt: null,
    });
    expect(forecastOf(120, { shipBy: null, runs: [{ ...run, ...at }] })).toMatchObject({
      readyAt: NOW + HOUR_MS,
    });
  });

  it('has none for a batch without a plan', () => {
    const batches = [aBatchOf([aStep('a', { skill: 'welding' })])];
    const input = anInput({ batches });
    const { problem, plan } = planned(input);
    expect(forecasts(problem, plan, input.hours).size).toBe(0);
  });
});
