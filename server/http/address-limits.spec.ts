import { describe, expect, it } from 'vitest';
import { waitSeconds } from './address-limits';
import type { Services } from './services';

function servicesAt(clock: { now: number }): Services {
  return { now: () => new Date(clock.now) } as Services;
}

describe('waitSeconds', () => {
  it('lets as many through in a minute as it may, then says how long to wait', () => {
    const clock = { now: 1_000_000 };
    const services = servicesAt(clock);
    const call = () => waitSeconds(services, 'signIn', '192.0.2.1', 3);
    expect([call(), call(), call()]).toEqual([0, 0, 0]);
    clock.now += 20_000;
    expect(call()).toBe(40);
    clock.now += 40_000;
    expect(call()).toBe(0);
  });

  it('counts addresses and operations apart', () => {
    const services = servicesAt({ now: 0 });
    const call = (operation: string, address: string) =>
      waitSeconds(services, operation, address, 1);
    expect(call('signIn', 'a')).toBe(0);
    expect(call('signIn', 'b')).toBe(0);
    expect(call('signUp', 'a')).toBe(0);
    expect(call('signIn', 'a')).toBe(60);
  });

  it('forgets the oldest address rather than growing without end', () => {
    const services = servicesAt({ now: 0 });
    for (let n = 0; n <= 20_000; n++) waitSeconds(services, 'signIn', `${n}`, 1);
    expect(waitSeconds(services, 'signIn', '20000', 1)).toBe(60);
    expect(waitSeconds(services, 'signIn', '0', 1)).toBe(0);
  });
});
