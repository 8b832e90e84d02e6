/** A bed's usable area with its lower left corner at 0, 0; a circle fills its square. */
export interface Floor {
  readonly shape: 'rectangle' | 'circle';
  readonly width: number;
  readonly depth: number;
}

/** A placed box, mm. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly depth: number;
  readonly turned: boolean;
}

/** Round-off of sums of box sizes, mm. */
const SLACK = 1e-6;

/**
 * Where a box goes on a floor beside others, upright or turned by a quarter: the free place nearest the front left corner, or
 * nearest the middle of a circle. Candidate places touch the floor's edges or two boxes' sides, as in the bottom-left rule (Baker,
 * Coffman and Rivest 1980). null where there is none.
 */
export function placeOn(
  floor: Floor,
  taken: readonly Box[],
  size: { readonly width: number; readonly depth: number },
  spacing: number,
): Box | null {
  const centre = floor.width / 2;
  let best: Box | null = null;
  let bestCost = Number.POSITIVE_INFINITY;
  for (const turned of [false, true]) {
    const [width, depth] = turned ? [size.depth, size.width] : [size.width, size.depth];
    const round = floor.shape === 'circle';
    const xs = [0, ...(round ? [centre - width / 2] : [])];
    const ys = [0, ...(round ? [centre - depth / 2] : [])];
    for (const b of taken) {
      xs.push(b.x + b.width + spacing, ...(round ? [b.x - spacing - width, b.x] : []));
      ys.push(b.y + b.depth + spacing, ...(round ? [b.y - spacing - depth, b.y] : []));
    }
    for (const x of xs)
      for (const y of ys) {
        const cost = round ? Math.hypot(x + width / 2 - centre, y + depth / 2 - centre) : y + depth + 1e-3 * x;
        if (cost >= bestCost - SLACK) continue;
        const box = { x, y, width, depth, turned };
        if (!inside(floor, box) || taken.some((t) => overlap(t, box, spacing))) continue;
        best = box;
        bestCost = cost;
      }
  }
  return best;
}

function inside(floor: Floor, b: Box): boolean {
  if (floor.shape === 'rectangle')
    return (
      b.x >= -SLACK && b.y >= -SLACK && b.x + b.width <= floor.width + SLACK && b.y + b.depth <= floor.depth + SLACK
    );
  const r = floor.width / 2;
  return [b.x, b.x + b.width].every((x) => [b.y, b.y + b.depth].every((y) => Math.hypot(x - r, y - r) <= r + SLACK));
}

const overlap = (a: Box, b: Box, spacing: number): boolean =>
  a.x < b.x + b.width + spacing - SLACK &&
  b.x < a.x + a.width + spacing - SLACK &&
  a.y < b.y + b.depth + spacing - SLACK &&
  b.y < a.y + a.depth + spacing - SLACK;
