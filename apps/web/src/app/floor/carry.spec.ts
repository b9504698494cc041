import type { Place } from '#shared/route/route';
import { cardTowards, carryKey, type Carry } from './carry';

const PLACES: Place[] = ['QUEUED', 'BLANK', 'FIRST_GLUE_UP', 'SLICE'];
const CARD = { batchId: 'b1', place: 'BLANK' as Place };
const NEVER = () => false;
const carry = (over: Place): Carry => ({ batchId: 'b1', from: 'BLANK', over });
const press = (held: Carry | null, key: string, accepts: (place: Place) => boolean = NEVER) =>
  carryKey(held, key, CARD, PLACES, accepts);

describe('a card moved by the keyboard', () => {
  it('is grabbed with Space or Enter, and with nothing else', () => {
    const grabbed = { kind: 'GRABBED', carry: carry('BLANK') };
    expect(press(null, ' ')).toEqual(grabbed);
    expect(press(null, 'Enter')).toEqual(grabbed);
    expect(press(null, 'ArrowRight')).toEqual({ kind: 'NONE' });
  });

  it('goes over the places in order and stays inside them', () => {
    expect(press(carry('BLANK'), 'ArrowRight')).toEqual({
      kind: 'OVER',
      carry: carry('FIRST_GLUE_UP'),
    });
    expect(press(carry('BLANK'), 'ArrowLeft')).toMatchObject({ carry: carry('QUEUED') });
    expect(press(carry('QUEUED'), 'ArrowLeft')).toMatchObject({ carry: carry('QUEUED') });
    expect(press(carry('SLICE'), 'ArrowRight')).toMatchObject({ carry: carry('SLICE') });
    expect(press(carry('BLANK'), 'End')).toMatchObject({ carry: carry('SLICE') });
    expect(press(carry('BLANK'), 'Home')).toMatchObject({ carry: carry('QUEUED') });
  });

  it('is dropped only where it may go', () => {
    const over = carry('SLICE');
    expect(press(over, ' ', (place) => place === 'SLICE')).toEqual({
      kind: 'DROPPED',
      carry: over,
    });
    expect(press(over, ' ')).toEqual({ kind: 'REFUSED', carry: over });
  });

  it('is put back with Escape, by leaving, and by letting go where it was', () => {
    for (const key of ['Escape', 'Tab']) expect(press(carry('SLICE'), key).kind).toBe('CANCELLED');
    expect(press(carry('BLANK'), ' ').kind).toBe('CANCELLED');
  });

  it('leaves other keys to the page', () => {
    expect(press(carry('BLANK'), 'a')).toEqual({ kind: 'NONE' });
  });

  it('is another one when another handle is pressed', () => {
    const other: Carry = { batchId: 'b2', from: 'SLICE', over: 'SLICE' };
    expect(press(other, ' ')).toEqual({ kind: 'GRABBED', carry: carry('BLANK') });
  });
});

describe('cardTowards', () => {
  const columns = [['a', 'b', 'c'], [], ['d']];

  it('goes up and down a column and stops at its ends', () => {
    expect(cardTowards(columns, 'b', 'ArrowUp')).toBe('a');
    expect(cardTowards(columns, 'b', 'ArrowDown')).toBe('c');
    expect(cardTowards(columns, 'a', 'ArrowUp')).toBeNull();
    expect(cardTowards(columns, 'c', 'ArrowDown')).toBeNull();
  });

  it('goes across empty columns, as high as the other column is', () => {
    expect(cardTowards(columns, 'c', 'ArrowRight')).toBe('d');
    expect(cardTowards(columns, 'd', 'ArrowLeft')).toBe('a');
    expect(cardTowards(columns, 'd', 'ArrowRight')).toBeNull();
  });

  it('leads nowhere from a card that is gone, or with another key', () => {
    expect(cardTowards(columns, 'z', 'ArrowUp')).toBeNull();
    expect(cardTowards(columns, 'a', 'Enter')).toBeNull();
  });
});
