import { describe, expect, it } from 'vitest';
import { batchSchema, batchSchemaOn } from './batch-schema';

const GOOD = { boards: 12, dueDate: '2026-12-01', idempotencyKey: 'k1' };

function issues(input: unknown, schema: typeof batchSchema = batchSchema): string[] {
  const parsed = schema.safeParse(input);
  return parsed.success ? [] : [...new Set(parsed.error.issues.map((i) => i.path.join('.')))];
}

describe('batchSchema', () => {
  it('takes a batch for a date, and one for stock', () => {
    expect(batchSchema.parse(GOOD)).toEqual(GOOD);
    const stock = { boards: 1, dueDate: null, idempotencyKey: null };
    expect(batchSchema.parse(stock)).toEqual(stock);
  });

  it('takes 1 and 200 boards, and nothing beyond or between', () => {
    for (const boards of [1, 200]) expect(issues({ ...GOOD, boards })).toEqual([]);
    for (const boards of [0, 201, -3, 1.5, Number.NaN, Infinity, '12', null, undefined]) {
      expect(issues({ ...GOOD, boards }), String(boards)).toEqual(['boards']);
    }
  });

  it('takes leap days and refuses days that are in no calendar', () => {
    for (const dueDate of ['2028-02-29', '2000-02-29', '2026-12-31']) {
      expect(issues({ ...GOOD, dueDate }), dueDate).toEqual([]);
    }
    for (const dueDate of [
      ...['2026-02-29', '2100-02-29', '2026-04-31', '2026-13-01', '2026-00-10', '2026-01-00'],
      ...['', '1 Dec', '2026-12-1', '2026-12-01T00:00:00Z', '9'.repeat(10_000), 20261201],
    ]) {
      expect(issues({ ...GOOD, dueDate }), String(dueDate).slice(0, 30)).toEqual(['dueDate']);
    }
  });

  it('refuses an empty and an overlong key', () => {
    expect(issues({ ...GOOD, idempotencyKey: '' })).toEqual(['idempotencyKey']);
    expect(issues({ ...GOOD, idempotencyKey: 'k'.repeat(81) })).toEqual(['idempotencyKey']);
  });

  it('knows of no past without a day, and refuses one with it', () => {
    const onTheDay = batchSchemaOn('2026-12-01');
    expect(issues(GOOD, onTheDay)).toEqual([]);
    expect(issues({ ...GOOD, dueDate: null }, onTheDay)).toEqual([]);
    expect(issues({ ...GOOD, dueDate: '2026-11-30' }, onTheDay)).toEqual(['dueDate']);
    expect(issues({ ...GOOD, dueDate: '2026-11-30' })).toEqual([]);
  });
});
