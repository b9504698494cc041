import { drawableStrips, readDesign, widthHint, type TypedDesign } from './design-draft';

const TYPED: TypedDesign = {
  name: 'Drift',
  length: '400',
  width: '280 mm',
  thickness: '38',
  strips: [
    { species: 'maple', width: '40' },
    { species: 'walnut', width: '1 in' },
  ],
  slices: 10,
  panelCount: 1,
  panelBoards: 4,
  blocksPerBoard: 1,
  panelClampCount: 6,
  blockClampCount: 4,
};

function fields(changes: Partial<TypedDesign>, unit: 'MILLIMETRE' | 'INCH' = 'MILLIMETRE') {
  return readDesign({ ...TYPED, ...changes }, unit).problems.map((problem) => problem.field);
}

describe('the design form', () => {
  it('gives what the API takes, lengths in nanometres', () => {
    const { input, problems } = readDesign(TYPED, 'MILLIMETRE');
    expect(problems).toEqual([]);
    expect(input).toMatchObject({ name: 'Drift', length: '400000000', width: '280000000' });
    expect(input?.strips).toEqual([
      { species: 'maple', width: '40000000' },
      { species: 'walnut', width: '25400000' },
    ]);
  });

  it('takes a length without a unit in the unit of the shop', () => {
    const inches = { length: '16', width: '11', thickness: '1 1/2' };
    const strips = [{ species: 'maple', width: '1 1/2' }];
    const { input } = readDesign({ ...TYPED, ...inches, strips }, 'INCH');
    expect(input).toMatchObject({ length: '406400000', thickness: '38100000' });
    expect(input?.strips[0]?.width).toBe('38100000');
  });

  it('says once what is wrong with a length, in the words for lengths', () => {
    const { problems } = readDesign({ ...TYPED, length: 'long' }, 'MILLIMETRE');
    expect(problems.map((problem) => problem.field)).toEqual(['length']);
    expect(problems[0]?.sentence).toContain('not a length');
  });

  it('leads to what is missing or out of bounds', () => {
    expect(fields({ name: ' ' })).toEqual(['name']);
    expect(fields({ slices: null })).toEqual(['slices']);
    expect(fields({ strips: [] })).toEqual(['strips']);
    expect(fields({ strips: [{ species: 'maple', width: '0' }] })).toEqual(['strips.0.width']);
    expect(fields({ panelClampCount: 41 })).toEqual(['panelClampCount']);
  });
});

describe('the preview of a design', () => {
  it('draws the strips that can be read', () => {
    const strips = [...TYPED.strips, { species: 'cherry', width: 'wide' }];
    expect(drawableStrips(strips, 'MILLIMETRE').map((strip) => strip.species)).toEqual([
      'maple',
      'walnut',
    ]);
  });

  it('says what the strips add up to, and when that is too little', () => {
    expect(widthHint({ ...TYPED, width: '60' }, 'MILLIMETRE')).toBe(
      'The strips add up to 65.4 mm.',
    );
    expect(widthHint(TYPED, 'MILLIMETRE')).toContain('less than the finished width of 280 mm');
    expect(widthHint({ ...TYPED, width: '120', blocksPerBoard: 2 }, 'MILLIMETRE')).not.toContain(
      'less',
    );
    expect(widthHint({ ...TYPED, width: '' }, 'MILLIMETRE')).toBe('The strips add up to 65.4 mm.');
  });

  it('says nothing while a strip cannot be read', () => {
    expect(
      widthHint({ ...TYPED, strips: [{ species: 'maple', width: '' }] }, 'MILLIMETRE'),
    ).toBeNull();
  });
});
