import { describe, expect, it } from 'vitest';
import { aBatch, MAKER, minutes } from '#test/factories/floor';
import { finish, move, overriding, start, WorkingFloor } from '#test/factories/working-floor';
import { batchEventSentence, overrideSentence, type BatchEventFacts } from './event-words';

const { steps } = aBatch().route;
const say = (facts: Partial<BatchEventFacts> & { type: string }) =>
  batchEventSentence({
    personName: 'Olu',
    changes: null,
    steps,
    to: null,
    boards: null,
    reason: null,
    ...facts,
  });

describe('what happened to a batch', () => {
  it('being made, moved, sent back and taken back', () => {
    expect(say({ type: 'BATCH_MADE', boards: 12 })).toBe('Olu made the batch of 12 boards.');
    expect(say({ type: 'BATCH_MADE', boards: 1 })).toBe('Olu made the batch of 1 board.');
    expect(say({ type: 'BATCH_MADE', personName: null })).toBe('Someone made the batch.');
    expect(say({ type: 'BATCH_MOVED', to: 'SECOND_GLUE_UP' })).toBe(
      'Olu moved it to Second glue-up.',
    );
    expect(say({ type: 'BATCH_REWORKED', to: 'BLANK', reason: 'a strip was cupped' })).toBe(
      'Olu sent it back to Blank: “a strip was cupped”.',
    );
    expect(say({ type: 'COMMAND_UNDONE' })).toBe('Olu took the last command back.');
    expect(say({ type: 'SOMETHING_NEW' })).toBe('Olu changed it.');
  });

  it('work, with the pieces it was on', () => {
    const floor = new WorkingFloor();
    const mill = floor.give(start('mill'));
    expect(say({ type: 'STEP_STARTED', changes: mill })).toBe('Olu started milling.');
    floor.milled();
    const glue = floor.give(start('glue-1', [1, 2]));
    expect(say({ type: 'STEP_STARTED', changes: glue })).toBe(
      'Olu started glue-up on panels 1 and 2.',
    );
    floor.wait(minutes(25));
    const done = floor.give(finish('glue-1', [2]));
    expect(say({ type: 'STEP_FINISHED', changes: done })).toBe('Olu finished glue-up on panel 2.');
    expect(say({ type: 'STEP_FINISHED', changes: done, steps: [] })).toBe('Olu finished a step.');
  });

  it('an override, as part of what it was for', () => {
    const floor = new WorkingFloor().milled().glued().unclamped();
    const started = new WorkingFloor(floor.batches);
    started.now = floor.now;
    const changes = started.give(start('flatten-1', [2], overriding));
    expect(say({ type: 'STEP_STARTED', changes })).toBe(
      'Olu started flattening on panel 2, overriding a hold.',
    );
    const moved = floor.give(move('SLICE', overriding));
    expect(say({ type: 'BATCH_MOVED', changes: moved, to: 'SLICE' })).toBe(
      'Olu moved it to Slice, overriding 2 holds.',
    );
    const back = new WorkingFloor().milled().glued().give(move('BLANK', overriding));
    expect(say({ type: 'BATCH_REWORKED', changes: back, to: 'BLANK' })).toBe(
      'Olu sent it back to Blank, overriding 4 holds.',
    );
  });

  it('being given to somebody', () => {
    const given = new WorkingFloor().give({ kind: 'ASSIGN', memberId: MAKER.memberId });
    const type = 'BATCH_ASSIGNED';
    expect(say({ type, changes: given, assigneeName: 'Ines' })).toBe('Olu gave it to Ines.');
    expect(say({ type, changes: given })).toBe('Olu gave it to someone else.');
    const taken = new WorkingFloor().give({ kind: 'ASSIGN', memberId: null });
    expect(say({ type, changes: taken })).toBe('Olu gave it to no one.');
  });
});

describe('what the owner hears of an override', () => {
  it('names the piece, the hold and the reason', () => {
    const facts = {
      batchCode: 'CT-014',
      personName: 'Olu',
      hold: 'CURE',
      pieceKind: 'PANEL',
      piece: 2,
      reason: 'no time left',
    } as const;
    expect(overrideSentence(facts)).toBe(
      'Olu overrode a hold on panel 2 of CT-014 while it was curing: “no time left”',
    );
    expect(
      overrideSentence({ ...facts, personName: null, hold: null, pieceKind: 'BATCH', piece: 0 }),
    ).toBe('Someone overrode a hold on CT-014: “no time left”');
  });
});
