import { clampWords, panelWords, sizeWords, stripWords } from './design-words';

const SIZE = { length: '406400000', width: '279400000', thickness: '38100000' };

describe('a design in words', () => {
  it('says its size in the shop’s unit', () => {
    expect(sizeWords(SIZE, 'MILLIMETRE')).toBe('406.4 × 279.4 × 38.1 mm');
    expect(sizeWords(SIZE, 'INCH')).toBe('16 × 11 × 1 1/2 in');
  });

  it('says strips that follow one another alike once', () => {
    const strips = [
      { species: 'maple', width: '40000000' },
      { species: 'maple', width: '40000000' },
      { species: 'walnut', width: '20000000' },
      { species: 'maple', width: '40000000' },
    ];
    expect(stripWords({ slices: 10, strips }, 'MILLIMETRE')).toBe(
      '10 slices of 2 × maple 40, walnut 20, maple 40 mm',
    );
  });

  it('says what is glued for how many boards', () => {
    const one = { panelCount: 1, panelBoards: 4, blocksPerBoard: 1 };
    expect(panelWords(one)).toBe('1 panel for 4 boards');
    expect(panelWords({ panelCount: 2, panelBoards: 1, blocksPerBoard: 2 })).toBe(
      '2 panels for each board, 2 blocks a board',
    );
  });

  it('says how many clamps from which length on', () => {
    expect(clampWords({ count: 6, length: '300000000' }, 'MILLIMETRE')).toBe('6 from 300 mm on');
    expect(clampWords({ count: 0, length: '300000000' }, 'MILLIMETRE')).toBe('none');
  });
});
