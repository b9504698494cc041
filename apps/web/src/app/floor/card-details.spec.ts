import { cardOf } from '#shared/floor/card';
import type { FloorBatch } from '#shared/floor/model';
import { burned, fullWords, groupActions, groupWords, limitOf } from './card-details';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings } from './floor-view';

const ZONE = 'Europe/Vienna';
const now = Date.parse(NOW);
const minutes = (n: number) => now + n * 60_000;
const around = toSurroundings(apiFloor());
const floor = (...runs: ReturnType<typeof run>[]): FloorBatch => {
  const batch = toBoardBatch(apiBatch({ boards: 12, runs }), around);
  if (!batch) throw new Error('The fixture has no such route or design.');
  return batch.floor;
};
const groups = (batch: FloorBatch) => groupActions(batch, cardOf(batch, now).actions);

describe('what may be done next', () => {
  it('is one button for all panels that wait for the same', () => {
    const batch = floor(...ripped(60));
    expect(groups(batch)).toMatchObject([
      { kind: 'START', step: { key: 'glue-1' }, pieces: [1, 2, 3], isAll: true },
    ]);
    expect(groups(batch).map((group) => groupWords(group, ZONE, now))).toEqual([
      'Glue by Wed 13:06',
    ]);
  });

  it('finishes what is under way first and names the single piece', () => {
    const batch = floor(...ripped(60), run('glue-1', 2, -5));
    const words = groups(batch).map((group) => groupWords(group, ZONE, now));
    expect(words).toEqual(['Finish glue-up, panel 2', 'Glue by Wed 13:06']);
    expect(groups(batch)[1]).toMatchObject({ pieces: [1, 3], isAll: false });
  });

  it('does not ask for what is too late', () => {
    const batch = floor(...ripped(25 * 60));
    expect(groups(batch).map((group) => groupWords(group, ZONE, now))).toEqual(['Start glue-up']);
  });
});

describe('limitOf', () => {
  const batch = floor(...ripped(60));
  const hold = { ...cardOf(batch, now).limits[0]!, latestAt: minutes(11) };

  it('says until when, and how little is left in the last ten minutes', () => {
    expect(limitOf(batch, hold, ZONE, now)).toEqual({ words: 'glue by 14:17', isUrgent: false });
    expect(limitOf(batch, hold, ZONE, minutes(1))).toEqual({
      words: 'glue by 14:17, 10 min left',
      isUrgent: true,
    });
    expect(limitOf(batch, hold, ZONE, minutes(11))).toEqual({
      words: 'too late to glue since 14:17',
      isUrgent: true,
    });
    expect(limitOf(batch, { ...hold, latestAt: null }, ZONE, now)).toBeNull();
  });
});

describe('burned', () => {
  it('goes from nothing to all and no further', () => {
    const hold = { since: now, clearAt: minutes(60) };
    expect([-5, 0, 15, 60, 90].map((n) => burned(hold, minutes(n)))).toEqual([0, 0, 25, 100, 100]);
    expect(burned({ since: now, clearAt: now }, now)).toBe(100);
  });
});

describe('fullWords', () => {
  const full = {
    code: 'STATION_FULL',
    station: 'glue bench',
    capacity: 2,
    need: 1,
    free: 0,
  } as const;

  it('names what is full, who has it and until when', () => {
    const holder = { batchCode: 'CT-026', freeAt: minutes(64) };
    expect(fullWords({ ...full, holder }, ZONE, now)).toBe(
      'glue bench full until about 15:10 (CT-026)',
    );
    expect(fullWords({ ...full, holder: { ...holder, freeAt: null } }, ZONE, now)).toBe(
      'glue bench full: CT-026 has it',
    );
    const clamps = { code: 'CLAMPS_FULL', need: 5, free: 2, owned: 18, holder: null } as const;
    expect(fullWords(clamps, ZONE, now)).toBe('not enough clamps');
    expect(fullWords({ code: 'PIECES_EMPTY' }, ZONE, now)).toBeNull();
  });
});
