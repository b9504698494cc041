import { describe, expect, it } from 'vitest';
import type { FloorCommand } from '#shared/floor/model';
import { doneSentence, piecesName } from './command-words';

const step = (kind: 'START' | 'FINISH', pieces: number[]): FloorCommand => ({
  kind,
  step: 'glue-1',
  pieces,
  happenedAt: null,
  override: null,
});
const move = (to: 'SLICE' | 'SHIPPED'): FloorCommand => ({
  kind: 'MOVE',
  to,
  reason: null,
  happenedAt: null,
  override: null,
});
const glue = { stepName: 'glue-up', scope: 'PANEL' as const, personName: null };
const nothing = { stepName: null, scope: 'BATCH' as const, personName: null };

describe('doneSentence', () => {
  it.each([
    [step('START', [2]), glue, 'CT-014, panel 2: glue-up started.'],
    [step('FINISH', [1, 2, 3]), glue, 'CT-014, panels 1, 2 and 3: glue-up finished.'],
    [
      step('START', [0]),
      { ...glue, stepName: 'milling', scope: 'BATCH' as const },
      'CT-014: milling started.',
    ],
    [move('SLICE'), nothing, 'CT-014 is in Slice now.'],
    [move('SHIPPED'), nothing, 'CT-014 has left the shop.'],
    [
      { kind: 'ASSIGN', memberId: 'm' } as const,
      { ...nothing, personName: 'Olu' },
      'CT-014 is given to Olu.',
    ],
    [{ kind: 'ASSIGN', memberId: null } as const, nothing, 'CT-014 is given to no one.'],
  ])('says what was done: %#', (command, named, sentence) => {
    expect(doneSentence('CT-014', command, named)).toBe(sentence);
  });
});

describe('piecesName', () => {
  it('names one, several, all and the whole batch', () => {
    expect(piecesName('BLOCK', [4])).toBe('block 4');
    expect(piecesName('BLOCK', [1, 4])).toBe('blocks 1 and 4');
    expect(piecesName('PANEL', [1, 2], true)).toBe('both panels');
    expect(piecesName('BLOCK', [1, 2, 4], true)).toBe('all 3 blocks');
    expect(piecesName('BATCH', [0])).toBe('');
  });
});
