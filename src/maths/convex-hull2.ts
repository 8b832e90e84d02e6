/** Convex hull of points in a plane, anticlockwise, no three in line; Andrew's monotone chain (Andrew 1979). Fewer than three corners: no area. */
export function convexHull2(points: readonly (readonly [number, number])[]): [number, number][] {
  const sorted = points.map((p): [number, number] => [p[0], p[1]]).sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const half = (list: readonly [number, number][]): [number, number][] => {
    const chain: [number, number][] = [];
    for (const p of list) {
      while (chain.length > 1 && turn(chain[chain.length - 2]!, chain[chain.length - 1]!, p) <= 0) chain.pop();
      chain.push(p);
    }
    chain.pop();
    return chain;
  };
  return [...half(sorted), ...half(sorted.reverse())];
}

const turn = (a: readonly [number, number], b: readonly [number, number], c: readonly [number, number]): number =>
  (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
