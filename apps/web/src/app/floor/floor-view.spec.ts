import { cardOf } from '#shared/floor/card';
import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import { resolveRoute } from '#shared/route/template';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toRoute, toSurroundings } from './floor-view';

describe('what the API sends', () => {
  it('gives the very route that the server judges with', () => {
    const [route] = apiFloor().routes;
    const [glue] = DEFAULT_GLUES;
    const [finish] = DEFAULT_FINISHES;
    expect(route && glue && finish).toBeTruthy();
    if (!route || !glue || !finish) return;
    expect(toRoute(route).steps).toEqual(resolveRoute(DEFAULT_ROUTE, glue, finish));
  });

  it('becomes instants and whole nanometres', () => {
    const around = toSurroundings(apiFloor());
    const batch = toBoardBatch(
      apiBatch({
        runs: [run('mill', 0, -60, -30)],
        occupations: [
          { resource: 'c600', isClamps: true, amount: 5, step: 'glue-1', piece: 1, since: NOW },
        ],
        overrides: [
          { id: 'o1', step: 'cure-1', piece: 1, by: 'm1', at: NOW, reason: 'market', seen: false },
        ],
      }),
      around,
    );
    expect(around.shop.clamps[0]?.length).toBe(600_000_000n);
    expect(batch?.floor.needs.panelClamps).toEqual({ count: 5, length: 600_000_000n });
    expect(batch?.floor.runs[0]).toMatchObject({
      startedAt: Date.parse(NOW) - 3_600_000,
      finishedAt: Date.parse(NOW) - 1_800_000,
      finishedBy: 'm1',
    });
    expect(batch?.floor.occupations[0]).toMatchObject({ since: Date.parse(NOW), until: null });
    expect(batch?.floor.overrides[0]).toMatchObject({ at: Date.parse(NOW), reason: 'market' });
  });

  it('can be read by the rules of the floor', () => {
    const around = toSurroundings(apiFloor());
    const batch = toBoardBatch(
      apiBatch({ runs: [...ripped(200), run('glue-1', 1, -50, -30)] }),
      around,
    );
    const card = batch && cardOf(batch.floor, Date.parse(NOW));
    expect(card?.place).toBe('FIRST_GLUE_UP');
    expect(card?.holds.map((hold) => hold.kind)).toEqual(['CLAMPED', 'CURE']);
    expect(card?.actions.map((action) => [action.step.key, action.piece])).toEqual([['glue-1', 2]]);
  });

  it('is not guessed where a route or a design is missing', () => {
    const around = toSurroundings(apiFloor());
    expect(toBoardBatch(apiBatch({ routeId: 'r9' }), around)).toBeNull();
    expect(toBoardBatch(apiBatch({ designId: 'd9' }), around)).toBeNull();
  });
});
