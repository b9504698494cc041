import { describe, expect, it } from 'vitest';
import { MOST_LINES, orderSchema, type OrderDraft } from './order-schema';

const LINE = { designId: 'design_1', count: 12 };
const ORDER: OrderDraft = {
  customerName: 'Nell Farrow',
  customerEmail: 'nell@example.com',
  clientReference: null,
  dueDate: '2026-12-24',
  lines: [LINE],
};

function issues(changes: object): string[] {
  const parsed = orderSchema.safeParse({ ...ORDER, ...changes });
  return parsed.success ? [] : parsed.error.issues.map((issue) => issue.path.join('.'));
}

describe('orderSchema', () => {
  it('takes an order as it is, and blanks as left out', () => {
    expect(orderSchema.parse(ORDER)).toEqual(ORDER);
    expect(
      orderSchema.parse({ ...ORDER, customerName: ' Nell ', customerEmail: '  ' }),
    ).toMatchObject({ customerName: 'Nell', customerEmail: null });
    expect(orderSchema.parse({ ...ORDER, customerEmail: undefined }).customerEmail).toBeNull();
  });

  it.each(['', '  ', 'x'.repeat(121), 'x'.repeat(10_000)])('refuses %s as a name', (name) => {
    expect(issues({ customerName: name })).toEqual(['customerName']);
  });

  it.each(['nell', 'nell@', '@example.com', 'a b@example.com', 'nell@example', 'a@b@example.com'])(
    'refuses %s as an e-mail address',
    (email) => {
      expect(issues({ customerEmail: email })).toEqual(['customerEmail']);
    },
  );

  it.each(['', '24.12.2026', '2026-02-30', '2026-13-01', '2026-12-24T00:00:00Z', '99999-01-01'])(
    'refuses %s as a day',
    (dueDate) => {
      expect(issues({ dueDate })).toEqual(['dueDate']);
    },
  );

  it('takes the day that only leap years have', () => {
    expect(issues({ dueDate: '2028-02-29' })).toEqual([]);
    expect(issues({ dueDate: '2027-02-29' })).toEqual(['dueDate']);
  });

  it.each([0, -1, 501, 1.5, Number.NaN, '3', null])('refuses %s as a count', (count) => {
    expect(issues({ lines: [{ ...LINE, count }] })).toEqual(['lines.0.count']);
  });

  it('refuses a line without a design, no lines, and too many', () => {
    expect(issues({ lines: [LINE, { ...LINE, designId: '' }] })).toEqual(['lines.1.designId']);
    expect(issues({ lines: [] })).toEqual(['lines']);
    expect(issues({ lines: Array.from({ length: MOST_LINES + 1 }, () => LINE) })).toEqual([
      'lines',
    ]);
  });

  it('refuses a reference that is too long', () => {
    expect(issues({ clientReference: 'x'.repeat(80) })).toEqual([]);
    expect(issues({ clientReference: 'x'.repeat(81) })).toEqual(['clientReference']);
  });
});
