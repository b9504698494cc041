import { readOrder, type TypedOrder } from './order-draft';

const TODAY = '2026-12-01';
const TYPED: TypedOrder = {
  customerName: ' Nell Farrow ',
  customerEmail: '',
  dueDate: '2026-12-24',
  lines: [{ designId: 'design_1', count: 12 }],
};

function fields(changes: Partial<TypedOrder>): (string | null | undefined)[] {
  return readOrder({ ...TYPED, ...changes }, TODAY).problems.map((problem) => problem.field);
}

describe('the order form', () => {
  it('gives what the API takes', () => {
    expect(readOrder(TYPED, TODAY)).toEqual({
      input: {
        customerName: 'Nell Farrow',
        customerEmail: null,
        dueDate: '2026-12-24',
        lines: [{ designId: 'design_1', count: 12 }],
      },
      problems: [],
    });
  });

  it('says what is missing, each beside its field', () => {
    const empty = { customerName: '', dueDate: '', lines: [{ designId: '', count: null }] };
    expect(fields(empty)).toEqual(['customerName', 'dueDate', 'lines.0.designId', 'lines.0.count']);
    expect(fields({ lines: [] })).toEqual(['lines']);
  });

  it('leads to the second line when that one is wrong', () => {
    const lines = [...TYPED.lines, { designId: 'design_2', count: 501 }];
    expect(fields({ lines })).toEqual(['lines.1.count']);
  });

  it('takes today as a due date and refuses yesterday', () => {
    expect(fields({ dueDate: TODAY })).toEqual([]);
    expect(fields({ dueDate: '2026-11-30' })).toEqual(['dueDate']);
  });
});
