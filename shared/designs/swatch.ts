import { arcsInside, type Arc, type Rect } from './ring-arcs';
import { speciesTone } from './species';

/** The side of the square a swatch is drawn in, in its own units. */
export const SWATCH_SIZE = 100;
/** Cells smaller than this in either direction get no rings: they would only make the swatch grey. */
const SMALLEST_WITH_RINGS = 4;

export interface SwatchStrip {
  readonly species: string;
  /** Any unit, as long as it is the same for all: only the proportions count. */
  readonly width: bigint;
}

/** One end of one strip in one slice. */
export interface SwatchCell extends Rect {
  readonly species: string;
  readonly arcs: readonly Arc[];
}

/** What is drawn: one filled path for each tone, and all rings as one line. */
export interface SwatchDrawing {
  readonly fills: readonly { readonly tone: string; readonly d: string }[];
  readonly rings: string;
}

/**
 * A design's end grain, looked at from above: slices side by side, each of the same strips, every second one turned end
 * for end. The rings' centres are drawn by lot from the seed, so the same design always has the same face.
 */
export function swatchCells(
  strips: readonly SwatchStrip[],
  slices: number,
  seed: string,
): SwatchCell[] {
  const total = strips.reduce((sum, strip) => sum + strip.width, 0n);
  if (total <= 0n || slices < 1) return [];
  const draw = lots(seed);
  const width = SWATCH_SIZE / slices;
  const cells: SwatchCell[] = [];
  for (let slice = 0; slice < slices; slice += 1) {
    let before = 0n;
    for (const strip of slice % 2 === 0 ? strips : [...strips].reverse()) {
      const y = share(before, total);
      before += strip.width;
      const rect = { x: slice * width, y, width, height: share(before, total) - y };
      cells.push({ ...rect, species: strip.species, arcs: rings(rect, draw) });
    }
  }
  return cells;
}

/** The cells as few SVG paths, in a view box of SWATCH_SIZE by SWATCH_SIZE. */
export function drawSwatch(
  strips: readonly SwatchStrip[],
  slices: number,
  seed: string,
): SwatchDrawing {
  const cells = swatchCells(strips, slices, seed);
  const fills = new Map<string, string>();
  for (const cell of cells) {
    const tone = speciesTone(cell.species);
    fills.set(tone, (fills.get(tone) ?? '') + rectPath(cell));
  }
  return {
    fills: [...fills].map(([tone, d]) => ({ tone, d })),
    rings: cells.flatMap((cell) => cell.arcs.map(arcPath)).join(''),
  };
}

function share(part: bigint, total: bigint): number {
  return Number((part * 1_000_000n) / total) * (SWATCH_SIZE / 1_000_000);
}

/** Rings around a heart that lies just outside the cell, as in strips cut from beside the heart. */
function rings(rect: Rect, draw: () => number): Arc[] {
  const left = draw() < 0.5;
  const above = draw() < 0.5;
  const apart = 6 + draw() * 2;
  const first = draw() * apart;
  if (Math.min(rect.width, rect.height) < SMALLEST_WITH_RINGS) return [];
  const cx = left ? rect.x - 8 : rect.x + rect.width + 8;
  const cy = above ? rect.y - 12 : rect.y + rect.height + 12;
  const reach = Math.hypot(rect.width + 8, rect.height + 12);
  const arcs: Arc[] = [];
  for (let radius = 10 + first; radius < reach; radius += apart) {
    arcs.push(...arcsInside(rect, cx, cy, radius));
  }
  return arcs;
}

function rectPath({ x, y, width, height }: Rect): string {
  return `M${short(x)} ${short(y)}H${short(x + width)}V${short(y + height)}H${short(x)}Z`;
}

function arcPath({ cx, cy, radius, from, to }: Arc): string {
  const large = to - from > Math.PI ? 1 : 0;
  const at = (angle: number): string =>
    `${short(cx + radius * Math.cos(angle))} ${short(cy + radius * Math.sin(angle))}`;
  return `M${at(from)}A${short(radius)} ${short(radius)} 0 ${large} 1 ${at(to)}`;
}

function short(value: number): string {
  return String(Math.round(value * 100) / 100);
}

/** Numbers in [0, 1) that depend on the seed alone: a 32-bit hash of it, stepped and mixed. */
function lots(seed: string): () => number {
  let state = 2_166_136_261;
  for (const character of seed) {
    state = Math.imul(state ^ (character.codePointAt(0) ?? 0), 16_777_619);
  }
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}
