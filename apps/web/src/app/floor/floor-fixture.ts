import { DEFAULT_FINISHES, DEFAULT_GLUES } from '#shared/route/default-profiles';
import { DEFAULT_ROUTE } from '#shared/route/default-route';
import { resolveRoute } from '#shared/route/template';
import { DEFAULT_CLAMPS, DEFAULT_STATIONS } from '#shared/shop/defaults';
import type { ApiBatch, ApiFloor } from './floor-view';

/* An invented floor as the API sends it, for the specs beside it. Nothing of the app imports this. */

export const NOW = '2026-12-01T13:06:00.000Z';

type Run = Partial<ApiBatch['runs'][number]> & { step: string };

/** A run of a step; times are minutes from NOW, negative for the past. */
export function run(step: string, piece: number, started: number | null, finished?: number): Run {
  const at = (minutes: number | null | undefined) =>
    minutes === null || minutes === undefined
      ? null
      : new Date(Date.parse(NOW) + minutes * 60_000).toISOString();
  return { step, piece, startedAt: at(started), finishedAt: at(finished) };
}

export function apiBatch(more: Partial<Omit<ApiBatch, 'runs'>> & { runs?: Run[] } = {}): ApiBatch {
  const { runs = [], ...rest } = more;
  return {
    id: 'b1',
    code: 'CT-001',
    version: 1,
    designId: 'd1',
    boards: 8,
    panels: 2,
    blocks: 8,
    routeId: 'r1',
    dueDate: '2026-12-10',
    shipBy: '2026-12-08',
    place: 'BLANK',
    releasedAt: '2026-11-30T08:00:00.000Z',
    shippedAt: null,
    assignedTo: null,
    occupations: [],
    overrides: [],
    forecast: null,
    undo: null,
    ...rest,
    runs: runs.map((each) => ({
      piece: 0,
      startedAt: null,
      finishedAt: null,
      cutAt: null,
      cutBy: null,
      ...each,
      startedBy: each.startedAt ? 'm1' : null,
      finishedBy: each.finishedAt ? 'm1' : null,
    })),
  };
}

/** The runs of a batch of two panels whose strips were ripped `ago` minutes before NOW. */
export function ripped(ago: number): Run[] {
  return [run('mill', 0, -ago - 60, -ago - 30), run('rip', 0, -ago - 20, -ago)];
}

export function apiFloor(batches: ApiBatch[] = [apiBatch()]): ApiFloor {
  const [glue] = DEFAULT_GLUES;
  const [finish] = DEFAULT_FINISHES;
  if (!glue || !finish) throw new Error('There is no default glue or finish.');
  return {
    cursor: 'c1',
    now: NOW,
    watchers: 1,
    shop: {
      id: 's1',
      version: 1,
      name: 'Alder Lane Boards',
      zone: 'Europe/Vienna',
      stations: DEFAULT_STATIONS.map((station) => ({ ...station })),
      clamps: DEFAULT_CLAMPS.map(({ key, length, count }) => ({ key, length: `${length}`, count })),
      profiles: [{ name: glue.name, isDefault: true }],
      air: { at: NOW, temperatureTenthsC: 180, humidityPercent: 46 },
    },
    members: [
      { id: 'm1', name: 'Ines', initials: 'IR', roles: ['OWNER'] },
      { id: 'm2', name: 'Olu', initials: 'OL', roles: ['HELPER'] },
    ],
    designs: [
      {
        id: 'd1',
        name: 'Drift',
        slices: 6,
        strips: [
          { species: 'maple', width: '30000000' },
          { species: 'walnut', width: '20000000' },
        ],
        panelCount: 1,
        panelBoards: 4,
        blocksPerBoard: 1,
        panelClamps: { count: 5, length: '600000000' },
        blockClamps: { count: 3, length: '450000000' },
      },
    ],
    routes: [
      {
        id: 'r1',
        steps: resolveRoute(DEFAULT_ROUTE, glue, finish).map((step) => {
          const { key, stage, name, scope } = step;
          const same = { key, stage, name, scope };
          return step.kind === 'WORK'
            ? {
                ...same,
                kind: step.kind,
                verb: step.verb,
                setupMinutes: step.setupMinutes,
                pieceMinutes: step.pieceMinutes,
                pausable: step.pausable,
                people: step.people,
                skill: step.skill,
                station: step.station,
                takes: [...step.takes],
                hold: null,
                after: null,
                minMinutes: 0,
                maxMinutes: null,
                source: null,
                referenceTenthsC: null,
                caution: step.caution,
              }
            : {
                ...same,
                kind: step.kind,
                verb: '',
                setupMinutes: 0,
                pieceMinutes: 0,
                pausable: false,
                people: 0,
                skill: null,
                station: null,
                takes: [],
                hold: step.hold,
                after: step.after,
                minMinutes: step.minMinutes,
                maxMinutes: step.maxMinutes,
                source: step.source,
                referenceTenthsC: step.referenceTenthsC,
                caution: null,
              };
        }),
      },
    ],
    batches,
  };
}
