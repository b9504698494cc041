import { apiBatch } from './floor-fixture';
import { latestFact, mergeRows, snapshotRows } from './floor-rows';

const one = apiBatch({ id: 'b1', version: 3 });
const two = apiBatch({ id: 'b2', version: 1 });
const known = new Map([
  ['b1', one],
  ['b2', two],
]);

describe('mergeRows', () => {
  it('takes newer versions and new batches, and leaves the others their object', () => {
    const newer = apiBatch({ id: 'b1', version: 4 });
    const third = apiBatch({ id: 'b3' });
    const rows = mergeRows(known, [newer, third]);
    expect([rows.get('b1'), rows.get('b2'), rows.get('b3')]).toEqual([newer, two, third]);
    expect(rows.get('b2')).toBe(two);
  });

  it('takes a newer forecast of the same version', () => {
    const forecast = { readyAt: '', nextStartAt: null, slackMinutes: 5, slackDays: 0 };
    const planned = apiBatch({ id: 'b1', version: 3, forecast });
    expect(mergeRows(known, [planned]).get('b1')).toBe(planned);
  });

  it('lets nothing older in, however late it comes', () => {
    expect(mergeRows(known, [apiBatch({ id: 'b1', version: 2 })])).toBe(known);
  });
});

describe('snapshotRows', () => {
  it('drops what is not in it and keeps what is newer than it', () => {
    const rows = snapshotRows(known, [apiBatch({ id: 'b1', version: 2 })]);
    expect([...rows.keys()]).toEqual(['b1']);
    expect(rows.get('b1')).toBe(one);
  });
});

describe('latestFact', () => {
  it('is the last of all dates on the batch', () => {
    const untouched = { startedAt: null, finishedAt: null, cutAt: null };
    expect(latestFact({ releasedAt: null, runs: [] })).toBe(0);
    expect(latestFact({ releasedAt: 7, runs: [untouched] })).toBe(7);
    const runs = [
      { ...untouched, startedAt: 8, finishedAt: 9 },
      { ...untouched, cutAt: 11 },
    ];
    expect(latestFact({ releasedAt: 7, runs })).toBe(11);
  });
});
