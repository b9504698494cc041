import type { Actor, FloorBatch } from '#shared/floor/model';
import { dropVerdict, moveTo, overrideCautions } from './drop-verdict';
import { apiBatch, apiFloor, NOW, ripped, run } from './floor-fixture';
import { toBoardBatch, toSurroundings } from './floor-view';

const around = toSurroundings(apiFloor());
const curing = toBoardBatch(
  apiBatch({
    boards: 4,
    runs: [...ripped(900), run('glue-1', 1, -90, -70), run('unclamp-1', 1, -8, -5)],
  }),
  around,
)?.floor as FloorBatch;
const view = { shop: around.shop, batches: [curing], now: Date.parse(NOW) };
const maker: Actor = { memberId: 'm1', roles: ['MAKER'] };
const helper: Actor = { memberId: 'm2', roles: ['HELPER'] };

describe('dropVerdict', () => {
  it('refuses while the glue cures, and names the hold', () => {
    expect(dropVerdict(view, curing, 'SLICE', maker)).toMatchObject({
      kind: 'REFUSE',
      refusal: { code: 'HOLD_RUNNING', kind: 'CURE', piece: 1 },
    });
  });

  it('accepts once it has cured', () => {
    const later = { ...view, now: view.now + 12 * 3_600_000 };
    expect(dropVerdict(later, curing, 'SURFACE', maker).kind).toBe('REFUSE');
    expect(dropVerdict(later, curing, 'SECOND_GLUE_UP', maker)).toEqual({
      kind: 'ACCEPT',
      isRework: false,
    });
  });

  it('takes a move back as rework, and the own column as no move', () => {
    const later = { ...view, now: view.now + 12 * 3_600_000 };
    expect(dropVerdict(later, curing, 'BLANK', helper)).toEqual({ kind: 'ACCEPT', isRework: true });
    expect(dropVerdict(view, curing, 'FIRST_GLUE_UP', helper)).toEqual({ kind: 'HERE' });
  });

  it('refuses a move back too while the glue cures', () => {
    expect(dropVerdict(view, curing, 'BLANK', helper)).toMatchObject({
      kind: 'REFUSE',
      refusal: { code: 'HOLD_RUNNING' },
    });
    expect(overrideCautions(view, curing, moveTo('BLANK'), maker)).toEqual(['UNCURED_GLUE']);
  });

  it('refuses whoever moves no batches', () => {
    const office: Actor = { memberId: 'm3', roles: ['OFFICE'] };
    expect(dropVerdict(view, curing, 'BLANK', office)).toMatchObject({
      kind: 'REFUSE',
      refusal: { code: 'FORBIDDEN' },
    });
  });
});

describe('overrideCautions', () => {
  it('are those of the holds that would be cut, for those who may', () => {
    expect(overrideCautions(view, curing, moveTo('SLICE'), maker)).toEqual(['UNCURED_GLUE']);
    expect(overrideCautions(view, curing, moveTo('SLICE'), helper)).toBeNull();
  });

  it('are none where an override would not help', () => {
    expect(overrideCautions(view, curing, moveTo('READY'), maker)).toBeNull();
    expect(overrideCautions(view, curing, moveTo('FIRST_GLUE_UP'), maker)).toBeNull();
  });
});
