import { describe, expect, it } from 'vitest';
import { aBatch, HELPER, MAKER, minutes, NOW, OFFICE, OWNER } from '#test/factories/floor';
import {
  doneBefore,
  finish,
  move,
  overriding,
  start,
  WorkingFloor,
} from '#test/factories/working-floor';
import { applyChanges, invertChanges } from './apply';
import type { Actor } from './model';

const HELPER_2: Actor = { memberId: 'helper-2', roles: ['HELPER'] };

describe('taking a command back', () => {
  it('FORBIDDEN: is for the one who did it, and for makers', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill'), HELPER);
    expect(floor.undo(HELPER_2)).toBe('FORBIDDEN');
    expect(floor.undo(OFFICE)).toBe('FORBIDDEN');
    // Who has become office since moves nothing, not even back.
    expect(floor.undo({ ...HELPER, roles: ['OFFICE'] })).toBe('FORBIDDEN');
    expect(floor.undo(HELPER)).toBe('OK');
    for (const person of [MAKER, OWNER]) {
      floor.give(start('mill'), HELPER);
      expect(floor.undo(person)).toBe('OK');
    }
  });

  it('UNDO_TOO_LATE: for ten minutes', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill'));
    floor.wait(minutes(10));
    const inTime = floor.batches;
    expect(floor.undo()).toBe('OK');
    floor.batches = inTime;
    expect(floor.wait(1).undo()).toBe('UNDO_TOO_LATE');
  });

  it('UNDO_BUILT_ON: not once something was recorded on the batch since', () => {
    const floor = new WorkingFloor();
    floor.give(start('mill'));
    expect(floor.undo(MAKER, floor.first, false)).toBe('UNDO_BUILT_ON');
    // The rows tell as well.
    const moved = applyChanges(floor.first, {
      runs: [{ step: 'mill', piece: 0, before: null, after: null }],
      taken: [],
      released: [],
      fields: {},
      cut: [],
    });
    expect(floor.undo(MAKER, moved)).toBe('UNDO_BUILT_ON');
  });

  it('UNDO_BUILT_ON: not once somebody else has what it gave back, or had it meanwhile', () => {
    const second = aBatch({ id: 'batch-2', code: 'CT-002' });
    const floor = new WorkingFloor([aBatch(), second]);
    floor.give(start('mill'));
    floor.wait(minutes(30));
    floor.give(finish('mill'));
    expect(floor.code(start('mill'), MAKER, floor.second)).toBe('OK');
    floor.wait(minutes(1));
    floor.give(start('mill'), MAKER, floor.second);
    expect(floor.undo()).toBe('UNDO_BUILT_ON');
    floor.wait(minutes(1));
    floor.give(finish('mill'), MAKER, floor.second);
    expect(floor.undo()).toBe('UNDO_BUILT_ON');
  });

  it('restores what was: started, finished, moved, assigned', () => {
    const floor = new WorkingFloor([aBatch({ releasedAt: null })]);
    const commands = [
      start('mill'),
      finish('mill'),
      move('FIRST_GLUE_UP'),
      { kind: 'ASSIGN', memberId: 'helper' } as const,
      start('glue-1', [1, 2]),
      finish('glue-1', [1, 2]),
      move('SLICE', overriding),
    ];
    for (const command of commands) {
      floor.wait(minutes(1));
      const before = floor.first;
      floor.give(command);
      expect(floor.undo()).toBe('OK');
      const { overrides: _kept, occupations, ...rest } = floor.first;
      const { overrides: _before, occupations: had, ...was } = before;
      expect(rest).toEqual(was);
      // What was taken and given back at once counted for no time.
      expect(occupations.filter((o) => o.until !== o.since)).toEqual(had);
      floor.batches = [before];
      floor.give(command);
    }
  });

  it('frees what a start took, for the others at once', () => {
    const second = aBatch({ id: 'batch-2', code: 'CT-002' });
    const floor = new WorkingFloor([aBatch(), second]);
    floor.give(start('mill'));
    expect(floor.code(start('mill'), MAKER, floor.second)).toBe('STATION_FULL');
    floor.undo();
    expect(floor.code(start('mill'), MAKER, floor.second)).toBe('OK');
    expect(floor.code(start('mill'))).toBe('OK');
  });

  it('twice inverted is the same again', () => {
    const floor = new WorkingFloor([doneBefore(aBatch(), 'glue-1', NOW)]);
    const changes = floor.give(start('glue-1', [1]));
    const again = invertChanges(invertChanges(changes));
    const first = doneBefore(aBatch(), 'glue-1', NOW);
    expect(applyChanges(first, { ...again, released: [] })).toEqual(applyChanges(first, changes));
  });
});
