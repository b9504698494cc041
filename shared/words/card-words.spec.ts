import { describe, expect, it } from 'vitest';
import { aBatch } from '#test/factories/floor';
import type { NextAction } from '#shared/floor/card';
import { HOLD_KINDS, PLACES, stepAt, type WorkStep } from '#shared/route/route';
import { MINUTE_MS, parseInstant } from '#shared/time/instant';
import {
  actionWords,
  holdWords,
  pieceName,
  pieceWords,
  placeWords,
  slackWords,
} from './card-words';

/** Tuesday, 14:00 in Berlin. */
const now = parseInstant('2026-12-01T13:00:00Z');
const { route } = aBatch();
const work = (key: string) => stepAt(route, key)?.step as WorkStep;
const say = (action: NextAction) => actionWords(action, 'Europe/Berlin', now);

describe('names', () => {
  it('of places and holds are all different', () => {
    expect(PLACES.map(placeWords)).toEqual([
      'Queued',
      'Blank',
      'First glue-up',
      'Slice',
      'Second glue-up',
      'Surface',
      'Sand',
      'Finish',
      'Ready to ship',
      'Shipped',
    ]);
    expect(HOLD_KINDS.map(holdWords)).toEqual([
      'acclimating',
      'in clamps',
      'curing',
      'filler curing',
      'soaking',
      'between coats',
      'finish curing',
      'faces fresh',
    ]);
  });

  it('of pieces', () => {
    expect(pieceName('PANEL', 2)).toBe('panel 2');
    expect(pieceName('BLOCK', 3)).toBe('block 3');
    expect(pieceName('BATCH', 0)).toBe('');
  });
});

describe('pieceWords', () => {
  it('counts holds, work under way and work to do', () => {
    expect(
      pieceWords([
        { count: 1, state: { kind: 'HOLD', hold: 'CLAMPED' } },
        { count: 2, state: { kind: 'HOLD', hold: 'CURE' } },
        { count: 1, state: { kind: 'WORKING', name: 'slicing' } },
        { count: 1, state: { kind: 'TODO', verb: 'glue' } },
      ]),
    ).toBe('1 in clamps, 2 curing, 1 in slicing, 1 to glue');
    expect(pieceWords([])).toBe('');
  });
});

describe('actionWords', () => {
  it.each<[NextAction, string]>([
    [{ kind: 'START', step: work('glue-1'), piece: 2, latestAt: null }, 'Start glue-up, panel 2'],
    [{ kind: 'FINISH', step: work('glue-2'), piece: 3, latestAt: null }, 'Finish glue-up, block 3'],
    [{ kind: 'FINISH', step: work('mill'), piece: 0, latestAt: null }, 'Finish milling'],
    [
      { kind: 'START', step: work('wipe-1'), piece: 0, latestAt: now + 100 * MINUTE_MS },
      'Wipe by 15:40',
    ],
    [
      { kind: 'START', step: work('glue-1'), piece: 1, latestAt: now + 24 * 60 * MINUTE_MS },
      'Glue by Wed 14:00, panel 1',
    ],
  ])('%#', (action, words) => {
    expect(say(action)).toBe(words);
  });
});

describe('slackWords', () => {
  it.each([
    [{ slackMinutes: 960, slackDays: 2 }, '2 d early'],
    [{ slackMinutes: 200, slackDays: 0 }, 'on the day'],
    [{ slackMinutes: 0, slackDays: 0 }, 'on the day'],
    [{ slackMinutes: -300, slackDays: 0 }, 'late by 5 h'],
    [{ slackMinutes: -1000, slackDays: -2 }, 'late by 2 d'],
    [{ slackMinutes: null, slackDays: null }, ''],
  ])('%o', (slack, words) => {
    expect(slackWords(slack)).toBe(words);
  });
});
