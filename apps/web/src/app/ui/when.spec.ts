import { ago, clockTime, dateName, dayName, dayTime, localDate } from './when';

const ZONE = 'Europe/Vienna';
const NOW = '2026-12-01T13:06:00Z';

describe('when', () => {
  it('writes the clock of the shop, not of the device', () => {
    expect(clockTime(NOW, ZONE)).toBe('14:06');
    expect(clockTime(NOW, 'America/New_York')).toBe('08:06');
    expect(clockTime('2026-12-01T23:00:00Z', ZONE)).toBe('00:00');
  });

  it('adds the day only where it is another one', () => {
    expect(dayTime('2026-12-01T13:20:00Z', ZONE, NOW)).toBe('14:20');
    expect(dayTime('2026-12-02T06:40:00Z', ZONE, NOW)).toBe('Wed 07:40');
    expect(dayTime('2026-12-09T06:40:00Z', ZONE, NOW)).toBe('Wed 9 Dec 07:40');
    expect(dayTime('2027-01-12T06:40:00Z', ZONE, NOW)).toBe('Tue 12 Jan 2027 07:40');
  });

  it('follows the zone over midnight and over a change of the clock', () => {
    expect(localDate('2026-12-01T23:30:00Z', ZONE)).toBe('2026-12-02');
    expect(localDate('2026-12-01T23:30:00Z', 'America/New_York')).toBe('2026-12-01');
    expect(clockTime('2026-10-25T00:59:00Z', ZONE)).toBe('02:59');
    expect(clockTime('2026-10-25T01:00:00Z', ZONE)).toBe('02:00');
  });

  it('names calendar dates without any zone', () => {
    expect(dateName('2026-12-01')).toBe('Tue 1 Dec');
    expect(dateName('2027-01-04', '2026-12-01')).toBe('Mon 4 Jan 2027');
    expect(dayName('2026-09-30T12:00:00Z', ZONE)).toBe('Wed 30 Sep');
  });

  it('says how long ago', () => {
    expect(ago(NOW, Date.parse(NOW) + 59_000)).toBe('just now');
    expect(ago(NOW, Date.parse(NOW) + 4 * 60_000)).toBe('4 min ago');
    expect(ago(NOW, Date.parse(NOW) + 3 * 3_600_000)).toBe('3 h ago');
    expect(ago(NOW, Date.parse(NOW) + 50 * 3_600_000)).toBe('2 d ago');
  });
});
