import { betterOffset } from './server-offset';

describe('betterOffset', () => {
  it('takes the first answer as it comes', () => {
    expect(betterOffset(null, 10_000, 400)).toBe(9_600);
  });

  it('prefers the answer that travelled least', () => {
    const slow = betterOffset(null, 10_000, 700);
    const quick = betterOffset(slow, 20_000, 10_050);
    expect(quick).toBe(9_950);
    expect(betterOffset(quick, 30_000, 20_600)).toBe(9_950);
  });

  it('believes a server whose clock was set back', () => {
    expect(betterOffset(9_950, 20_000, 40_000)).toBe(-20_000);
  });

  it('catches up after the device slept and its counter stood still', () => {
    expect(betterOffset(9_950, 3_610_000, 11_000)).toBe(3_599_000);
  });
});
