import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

/* WCAG 2.2: 1.4.3 text at least 4.5:1 on its ground, 1.4.11 controls and signs at least 3:1. */

const PALETTE = 'apps/web/src/theme/_palette.scss';
const GROUNDS = ['paper', 'surface'];

/** Text tone, and every ground it is written on. */
const TEXT: readonly [string, readonly string[]][] = [
  ['ink', [...GROUNDS, 'shade', 'resin-wash', 'spruce-wash', 'slate-wash', 'madder-wash']],
  ['quiet', [...GROUNDS, 'shade', 'resin-wash']],
  ['spruce', [...GROUNDS, 'spruce-wash']],
  ['on-spruce', ['spruce']],
  ['resin-ink', [...GROUNDS, 'resin-wash']],
  ['madder', [...GROUNDS, 'madder-wash', 'resin-wash']],
  ['on-madder', ['madder']],
  ['slate', [...GROUNDS, 'slate-wash']],
  ['leaf', [...GROUNDS, 'leaf-wash', 'resin-wash']],
];

/** Edges of controls, bars and signs. */
const SIGNS: readonly [string, readonly string[]][] = [
  ['control-line', [...GROUNDS, 'resin-wash']],
  ['resin', [...GROUNDS, 'resin-wash', 'resin-rest']],
  ['slate', [...GROUNDS, 'shade', 'resin-wash']],
];

function tones(): Map<string, [string, string]> {
  const entry = /'([\w-]+)':\s*\(\s*(#[0-9a-f]{6}),\s*(#[0-9a-f]{6})/g;
  const found = [...readFileSync(PALETTE, 'utf8').matchAll(entry)];
  return new Map(found.map(([, name, light, dark]) => [name ?? '', [light ?? '', dark ?? '']]));
}

function luminance(tone: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(tone.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [dark = 0, light = 0] = [luminance(one), luminance(other)].sort((a, b) => a - b);
  return (light + 0.05) / (dark + 0.05);
}

function tooFaint(pairs: typeof TEXT, least: number): string[] {
  const all = tones();
  return pairs.flatMap(([tone, grounds]) =>
    grounds.flatMap((ground) =>
      [0, 1].flatMap((scheme) => {
        const [front, back] = [all.get(tone)?.[scheme], all.get(ground)?.[scheme]];
        if (!front || !back) return [`${tone} on ${ground}: not in the palette`];
        const ratio = contrast(front, back);
        const where = `${tone} on ${ground}, ${scheme === 0 ? 'light' : 'dark'}`;
        return ratio < least ? [`${where}: ${ratio.toFixed(2)}`] : [];
      }),
    ),
  );
}

describe('the palette', () => {
  it('is read whole', () => {
    expect(tones().size).toBeGreaterThanOrEqual(20);
  });

  it('knows black on white', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  });

  it('keeps text legible in both schemes', () => {
    expect(tooFaint(TEXT, 4.5)).toEqual([]);
  });

  it('keeps edges and signs visible in both schemes', () => {
    expect(tooFaint(SIGNS, 3)).toEqual([]);
  });
});
