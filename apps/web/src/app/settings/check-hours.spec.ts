import { checkHours, onForm } from './check-hours';

const span = (fromMinute: number, toMinute: number) => ({ fromMinute, toMinute });
const CLOSED = Array.from({ length: 7 }, () => []);
const fields = (...hours: Parameters<typeof checkHours>) =>
  checkHours(...hours).map((problem) => problem.field);

describe('checkHours', () => {
  it('takes a usual week, nights until the end of the day and days off', () => {
    const weekly = [[span(480, 720), span(780, 1_440)], ...CLOSED.slice(1)];
    const exceptions = [{ date: '2026-12-25', spans: [], reason: null }];
    expect(checkHours(weekly, exceptions)).toEqual([]);
  });

  it('points at the span that ends before it begins', () => {
    const weekly = [[span(480, 720), span(780, 700)], ...CLOSED.slice(1)];
    expect(fields(weekly, [])).toContain('weekly.0.1');
  });

  it('points at the day whose spans overlap, weekly or on a date', () => {
    const both = [span(480, 720), span(700, 900)];
    expect(fields([...CLOSED.slice(1), both], [])).toEqual(['weekly.6']);
    const exceptions = [{ date: '2026-12-24', spans: both, reason: null }];
    expect(fields(CLOSED, exceptions)).toEqual(['exceptions.0.spans']);
  });

  it('refuses a date twice and a date that does not exist', () => {
    const on = (date: string) => ({ date, spans: [], reason: null });
    expect(fields(CLOSED, [on('2026-12-24'), on('2026-12-24')])).toEqual(['exceptions']);
    expect(fields(CLOSED, [on('2026-02-30')])).toEqual(['exceptions.0.date']);
  });

  it('names the ends of a span as the form does', () => {
    expect(onForm([{ field: 'weekly.0.1.to', sentence: 'x' }])).toEqual([
      { field: 'weekly.0.1.toMinute', sentence: 'x' },
    ]);
  });
});
