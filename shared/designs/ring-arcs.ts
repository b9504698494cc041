/** A rectangle in the drawing's units. */
export interface Rect {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** The part of a circle between two angles, in radians, drawn with growing angle. */
export interface Arc {
  readonly cx: number;
  readonly cy: number;
  readonly radius: number;
  readonly from: number;
  readonly to: number;
}

const TURN = 2 * Math.PI;

/** The pieces of a circle that lie inside a rectangle. */
export function arcsInside(rect: Rect, cx: number, cy: number, radius: number): Arc[] {
  const cuts = crossings(rect, cx, cy, radius);
  if (cuts.length === 0) {
    return inside(rect, cx + radius, cy) ? [{ cx, cy, radius, from: 0, to: TURN }] : [];
  }
  const arcs: Arc[] = [];
  cuts.forEach((from, index) => {
    const next = cuts[index + 1] ?? (cuts[0] ?? from) + TURN;
    const middle = (from + next) / 2;
    const isIn = inside(rect, cx + radius * Math.cos(middle), cy + radius * Math.sin(middle));
    if (isIn && next - from > 1e-6) arcs.push({ cx, cy, radius, from, to: next });
  });
  return arcs;
}

function inside(rect: Rect, x: number, y: number): boolean {
  return x >= rect.x && x <= rect.x + rect.width && y >= rect.y && y <= rect.y + rect.height;
}

/** Angles in [0, 2π) at which the circle meets an edge of the rectangle, sorted. */
function crossings(rect: Rect, cx: number, cy: number, radius: number): number[] {
  const angles: number[] = [];
  const add = (x: number, y: number): void => {
    angles.push((Math.atan2(y - cy, x - cx) + TURN) % TURN);
  };
  for (const x of [rect.x, rect.x + rect.width]) {
    const across = radius * radius - (x - cx) ** 2;
    if (across < 0) continue;
    for (const y of [cy - Math.sqrt(across), cy + Math.sqrt(across)]) {
      if (y >= rect.y && y <= rect.y + rect.height) add(x, y);
    }
  }
  for (const y of [rect.y, rect.y + rect.height]) {
    const along = radius * radius - (y - cy) ** 2;
    if (along < 0) continue;
    for (const x of [cx - Math.sqrt(along), cx + Math.sqrt(along)]) {
      if (x >= rect.x && x <= rect.x + rect.width) add(x, y);
    }
  }
  return angles.sort((a, b) => a - b);
}
