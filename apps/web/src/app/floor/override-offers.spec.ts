import { cardOf } from '#shared/floor/card';
import type { Actor, FloorBatch } from '#shared/floor/model';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings, type ApiBatch } from './floor-view';
import { overridesOf } from './override-offers';

const now = Date.parse(NOW);
const around = toSurroundings(apiFloor());
const maker: Actor = { memberId: 'm1', roles: ['MAKER'] };
const helper: Actor = { memberId: 'm2', roles: ['HELPER'] };
const floor = (more: Parameters<typeof apiBatch>[0]): FloorBatch => {
  const made = toBoardBatch(apiBatch(more), around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made.floor;
};
const offers = (batch: FloorBatch, others: FloorBatch[] = [], actor = maker) =>
  overridesOf(
    { shop: around.shop, batches: [batch, ...others], now },
    batch,
    cardOf(batch, now).holds,
    actor,
  ).map((offer) => offer.words);

const pressed = floor({
  boards: 4,
  runs: [...ripped(900), run('glue-1', 1, -50, -30)],
});
const cured = floor({
  boards: 4,
  runs: [...ripped(900), run('glue-1', 1, -90, -70), run('unclamp-1', 1, -8, -5)],
});
const busyPlaner: ApiBatch['occupations'] = [
  { resource: 'planer', isClamps: false, amount: 1, step: 'mill', piece: 0, since: NOW },
];
const milling = floor({
  id: 'b2',
  code: 'CT-002',
  runs: [run('mill', 0, 0)],
  occupations: busyPlaner,
});

describe('overridesOf', () => {
  it('offers to start the work that a hold keeps back', () => {
    expect(offers(pressed)).toEqual([
      'Override the hold (panel 1 in clamps): start taking clamps off …',
    ]);
    expect(offers(cured)).toEqual(['Override the hold (panel 1 curing): start flattening …']);
  });

  it('offers the move where the station is full', () => {
    expect(offers(cured, [milling])).toEqual([
      'Override the hold (panel 1 curing): move to Slice …',
    ]);
  });

  it('offers nothing to those who may not', () => {
    expect(offers(cured, [], helper)).toEqual([]);
  });
});
