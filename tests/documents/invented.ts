import { cross, dot, mean, normalise, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';
import type { Face, Member, Truss } from '../../src/model/truss.js';

/**
 * An invented truss of 40 nodes and 80 struts: a dodecahedron within a larger one, vertices joined by spokes, stretched
 * and sheared by an affine map. Edges of equal direction carry equal and opposite force densities and the spokes balance
 * them, before and after the map (force densities are affine invariants). Lengths mm, forces N.
 */
export function inventedTruss(): Truss {
  const golden = (1 + Math.sqrt(5)) / 2;
  const corners: Vec3[] = [];
  for (const x of [-1, 1]) for (const y of [-1, 1]) for (const z of [-1, 1]) corners.push([x, y, z]);
  for (const a of [-1, 1])
    for (const b of [-1, 1]) {
      corners.push([0, a / golden, b * golden], [a / golden, b * golden, 0], [a * golden, 0, b / golden]);
    }
  const [big, small] = [260, 120];
  const map = ([x, y, z]: Vec3): Vec3 => [x + 0.25 * z + 520, 0.85 * y - 0.1 * x + 470, 0.8 * z + 380];
  const marks = (shell: string, i: number): string => `${shell}${i + 1}`;
  const nodes = [
    ...corners.map((c, i) => ({ mark: marks('A', i), at: map(scale(c, big)) })),
    ...corners.map((c, i) => ({ mark: marks('B', i), at: map(scale(c, small)) })),
  ];
  const at = new Map(nodes.map((n) => [n.mark, n.at]));
  const members: Member[] = [];
  const add = (a: string, b: string, density: number): void => {
    const length = Math.hypot(...subtract(at.get(a)!, at.get(b)!));
    members.push({
      mark: `S${members.length + 1}`,
      ends: [a, b],
      force: density * length,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: a[0] !== b[0] ? 'spoke' : a.startsWith('A') ? 'outer' : 'inner',
    });
  };
  const edge = 2 / golden;
  const pairs: [number, number][] = [];
  for (let i = 0; i < 20; i++)
    for (let j = i + 1; j < 20; j++)
      if (Math.abs(Math.hypot(...subtract(corners[i]!, corners[j]!)) - edge) < 1e-9) pairs.push([i, j]);
  const outer = -0.45;
  for (const [i, j] of pairs) add(marks('A', i), marks('A', j), outer);
  for (const [i, j] of pairs) add(marks('B', i), marks('B', j), (-outer * big) / small);
  // The edge vectors at a corner sum to a multiple of the corner itself, by symmetry.
  const [p, ...rest] = [corners[0]!, ...pairs.filter((pair) => pair.includes(0)).map(([, j]) => corners[j]!)];
  const sum = rest.reduce((total, q) => total + dot(subtract(q, p), p), 0) / dot(p, p);
  for (let i = 0; i < 20; i++) add(marks('A', i), marks('B', i), (outer * sum * big) / (big - small));
  return {
    nodes,
    members,
    faces: facesOf(corners, pairs, marks),
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
}

function facesOf(
  corners: readonly Vec3[],
  pairs: readonly (readonly [number, number])[],
  marks: (shell: string, i: number) => string,
): Face[] {
  const golden = (1 + Math.sqrt(5)) / 2;
  const faces: Face[] = [];
  for (const a of [-1, 1])
    for (const b of [-1, 1])
      for (const turn of [0, 1, 2]) {
        const raw: Vec3 = [0, a * golden, b];
        const normal = normalise([raw[turn % 3]!, raw[(turn + 1) % 3]!, raw[(turn + 2) % 3]!]);
        const reach = Math.max(...corners.map((c) => dot(c, normal)));
        const ring = corners.map((c, i) => ({ c, i })).filter(({ c }) => dot(c, normal) > reach - 1e-9);
        if (ring.length !== 5) continue;
        const middle = mean(ring.map(({ c }) => c));
        const u = normalise(subtract(ring[0]!.c, middle));
        const v = cross(normal, u);
        ring.sort(
          (p, q) =>
            Math.atan2(dot(subtract(p.c, middle), v), dot(subtract(p.c, middle), u)) -
            Math.atan2(dot(subtract(q.c, middle), v), dot(subtract(q.c, middle), u)),
        );
        faces.push({
          mark: `P${faces.length + 1}`,
          nodes: ring.map(({ i }) => marks('A', i)),
          panel: true,
          group: 'outer',
        });
      }
  for (const [i, j] of pairs)
    faces.push({
      mark: `Q${faces.length + 1}`,
      nodes: [marks('A', i), marks('A', j), marks('B', j), marks('B', i)],
      panel: faces.length < 20,
      group: 'web',
    });
  return faces;
}
