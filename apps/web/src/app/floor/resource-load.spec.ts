import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings, type ApiBatch } from './floor-view';
import { loadWords, resourcesOf, stageLoad } from './resource-load';

const around = toSurroundings(apiFloor());
const routes = [...around.routes.values()];
const floor = (batch: ApiBatch) => {
  const made = toBoardBatch(batch, around);
  if (!made) throw new Error('The fixture has no such route or design.');
  return made.floor;
};
const held = (resource: string, step: string, piece: number, amount: number, isClamps = false) => ({
  resource,
  isClamps,
  amount,
  step,
  piece,
  since: '2026-12-01T12:00:00.000Z',
});
const load = (stage: Parameters<typeof stageLoad>[0], batches: ApiBatch[]) =>
  stageLoad(stage, around.shop, routes, batches.map(floor), Date.parse(NOW));

describe('stageLoad', () => {
  it('names the resources of each stage, clamps first', () => {
    expect(resourcesOf('BLANK', routes)).toEqual(['planer', 'table-saw']);
    expect(resourcesOf('FIRST_GLUE_UP', routes)).toEqual(['CLAMPS', 'glue-bench']);
    expect(resourcesOf('FINISH', routes)).toEqual(['oil-rack', 'finishing-bench']);
  });

  it('tells clamps under work from clamps that hold', () => {
    const gluing = apiBatch({
      runs: [...ripped(300), run('glue-1', 1, -90, -60), run('glue-1', 2, -10)],
      occupations: [
        held('c600', 'glue-1', 1, 5, true),
        held('c600', 'glue-1', 2, 5, true),
        held('glue-bench', 'glue-1', 2, 1),
      ],
    });
    const { resources, bar } = load('FIRST_GLUE_UP', [gluing]);
    expect(bar).toEqual({ worked: 5, held: 5, capacity: 18 });
    expect(resources.map(loadWords)).toEqual(['clamps 10 of 18', 'bench 1 of 2']);
  });

  it('counts a batch once on a station that takes whole batches', () => {
    const slicing = apiBatch({
      runs: [run('flatten-1', 1, -10), run('flatten-1', 2, -5)],
      occupations: [held('planer', 'flatten-1', 1, 1), held('planer', 'flatten-1', 2, 1)],
    });
    const { resources, bar } = load('SLICE', [slicing]);
    expect(bar).toEqual({ worked: 1, held: 0, capacity: 2 });
    expect(resources.map(loadWords)).toEqual(['planer busy', 'saw free']);
  });

  it('shows the rack where boards wait', () => {
    const oiled = apiBatch({
      runs: [run('oil-1', 0, -90, -60)],
      occupations: [held('oil-rack', 'oil-1', 0, 8)],
    });
    const { resources, bar } = load('FINISH', [oiled]);
    expect(bar).toEqual({ worked: 0, held: 8, capacity: 36 });
    expect(resources.map(loadWords)).toEqual(['oil rack 8 of 36', 'bench free']);
  });
});

describe('loadWords', () => {
  it('says full where a number would have to be compared', () => {
    expect(loadWords({ name: 'glue bench', used: 2, capacity: 2 })).toBe('bench full');
    expect(loadWords({ name: 'sanding bench', used: 0, capacity: 2 })).toBe('bench free');
    expect(loadWords({ name: 'clamps', used: 18, capacity: 18 })).toBe('clamps full');
  });
});
