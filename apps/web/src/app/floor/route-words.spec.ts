import { apiFloor } from './floor-fixture';
import { toSurroundings } from './floor-view';
import { sourceWords, standardWords } from './route-words';

const around = toSurroundings(apiFloor());
const steps = [...around.routes.values()].flatMap((route) => route.steps);
const step = (key: string) => {
  const found = steps.find((each) => each.key === key);
  if (!found) throw new Error(`The fixture's route has no ${key}.`);
  return found;
};

describe('the words of a route', () => {
  it('tell the standard time of work', () => {
    expect(standardWords(step('mill'))).toBe('15 min set-up + 6 min a board');
    expect(standardWords(step('glue-1'))).toBe('25 min a panel');
  });

  it('tell how long a wait is, at least and at most', () => {
    expect(standardWords(step('clamped-1'))).toBe('at least 1 h');
    expect(standardWords(step('fresh-faces-1'))).toBe('the next step within 1 d');
  });

  it('tell whose figure it is, and that a data sheet comes first', () => {
    expect(sourceWords(step('cure-1'), around.profiles)).toBe(
      'D3 white glue at 20 °C, default figures: data sheet first',
    );
    expect(sourceWords(step('cure-1'), [{ name: 'D3 white glue', isDefault: false }])).toBe(
      'D3 white glue at 20 °C',
    );
    expect(sourceWords(step('filler-cure'), around.profiles)).toBe('the shop');
    expect(sourceWords(step('mill'), around.profiles)).toBe('');
  });
});
