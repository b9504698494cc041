import { readPairing } from './pairing-draft';

describe('a code read off a display', () => {
  it('is taken with spaces, hyphens and small letters', () => {
    expect(readPairing({ code: ' k7m-2qx ', name: ' Glue bench ' })).toEqual({
      code: 'K7M2QX',
      name: 'Glue bench',
      problems: [],
    });
  });

  it.each(['', 'K7M2Q', 'K7M2QXY', 'K7M2Q!', 'Ä7M2QX'])('is refused as %s', (code) => {
    const { problems } = readPairing({ code, name: 'Glue bench' });
    expect(problems.map((problem) => problem.field)).toEqual(['code']);
  });

  it('wants a name', () => {
    const { problems } = readPairing({ code: 'K7M2QX', name: '  ' });
    expect(problems.map((problem) => problem.field)).toEqual(['name']);
  });
});
