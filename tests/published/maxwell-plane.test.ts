import { describe, expect, it } from 'vitest';
import { add, cross, dot, length, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { reciprocalOf } from '../../src/statics/reciprocal/reciprocal.js';
import { mapped, trussOf } from '../helpers/truss.js';

// Figures of the kind of J. C. Maxwell, On reciprocal figures and diagrams of forces, Phil. Mag. 27 (1864) 250-261, worked by hand:
// the resolution beside each value is the source.

const job = (wishes: Partial<Job['forces']>): Job => ({
  ...defaultJob(),
  forces: { ...defaultJob().forces, source: 'reciprocal', ...wishes },
});
const read = (truss: Truss, wishes: Partial<Job['forces']> = {}) => reciprocalOf(topologyOf(truss), job(wishes));
const near = (a: ArrayLike<number>, b: readonly number[], digits = 9): void => {
  expect(a.length).toBe(b.length);
  b.forEach((v, i) => {
    expect(a[i]).toBeCloseTo(v, digits);
  });
};

/** Two rings of n nodes, the inner one turned by `turn`, radii 100 and r, joined node to node: outer, inner, radials. */
function rings(n: number, r: number, turn = 0, inner: (k: number) => number = () => r): Truss {
  const at = (radius: number, k: number, phase: number): number[] => [
    radius * Math.cos((2 * Math.PI * k) / n + phase),
    radius * Math.sin((2 * Math.PI * k) / n + phase),
  ];
  const all = Array.from({ length: n }, (_, k) => k);
  return trussOf({
    nodes: [...all.map((k) => at(100, k, 0)), ...all.map((k) => at(inner(k), k, turn))],
    edges: [
      ...all.map((k) => [k, (k + 1) % n]),
      ...all.map((k) => [n + k, n + ((k + 1) % n)]),
      ...all.map((k) => [k, n + k]),
    ],
  });
}

/** A rotation into space and a move: plane, but in no coordinate plane. */
const tilted = (p: Vec3): Vec3 => {
  const k: Vec3 = scale([2, 3, 6], 1 / 7);
  const [c, s] = [Math.cos(0.9), Math.sin(0.9)];
  return add(add(add(scale(p, c), scale(cross(k, p), s)), scale(k, dot(k, p) * (1 - c))), [500, -80, 33]);
};

describe('a triangle in a triangle', () => {
  // Outer corner: two sides at 30 degrees to the radius and the radial, 2 t cos 30 + s = 0, so s = -sqrt 3 t. Inner corner:
  // s = sqrt 3 t', so t' = -t.
  const wanted = [-1, -1, -1, 1, 1, 1, Math.sqrt(3), Math.sqrt(3), Math.sqrt(3)];

  it.each([
    ['as drawn', (t: Truss) => t],
    ['tilted into space', (t: Truss) => mapped(t, tilted)],
    ['ten times as large', (t: Truss) => mapped(t, (p) => scale(p, 10))],
  ])('has one lifting, one state of self-stress and the forces by hand: %s', (_, change) => {
    const result = read(change(rings(3, 40)), { fix: [{ strut: 'S0', force_N: -1 }] });
    near(result.forces!, wanted);
    expect(result.counts).toMatchObject({ dimension: 1, selfStressStates: 1, cells: 5 });
    expect(result.findings).toEqual([]);
    expect(result.concurrency.length).toBe(1);
    expect(result.concurrency[0]!.miss).toBeLessThan(1e-9);
    expect(result.residuals!.maxAngle).toBeLessThan(1e-9);
    expect(result.residuals!.maxClosure).toBeLessThan(1e-12);
  });

  it('turned, its radials miss one point and there is no equilibrium: the miss is three inradii of the triangle they make', () => {
    // A line from (R, 0) to r (cos f, sin f) passes the centre at d = R r sin f / sqrt(R² + r² - 2 R r cos f); three such lines by
    // symmetry enclose an equilateral triangle of inradius d and height 3 d.
    const [R, r, f] = [100, 40, 0.05];
    const miss = (3 * R * r * Math.sin(f)) / Math.sqrt(R * R + r * r - 2 * R * r * Math.cos(f));
    const result = read(rings(3, r, f), { sign: 1, largest_N: 1 });
    expect(result.concurrency[0]!.miss).toBeCloseTo(miss, 9);
    expect(result.counts).toMatchObject({ dimension: 0, selfStressStates: 0 });
    expect(result.forces).toBeNull();
    expect(result.findings.map((x) => x.code)).toEqual(['radials-not-concurrent', 'no-reciprocal']);
  });

  it('with parallel radials it stands too: they meet at infinity', () => {
    const prism = trussOf({
      nodes: [
        [0, 0],
        [100, 0],
        [50, 60],
        [0, 200],
        [100, 200],
        [50, 140],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 0],
        [3, 4],
        [4, 5],
        [5, 3],
        [0, 3],
        [1, 4],
        [2, 5],
      ],
    });
    const result = read(prism, { sign: 1, largest_N: 1 });
    expect(result.concurrency[0]).toMatchObject({ miss: 0, point: null });
    expect(result.counts).toMatchObject({ dimension: 1, selfStressStates: 1 });
    // Each triangle is cut off by three parallels: T at the two outer ones balanced by -2 T in the middle, where the prism is even.
    const [a, b, c] = result.forces!.slice(6);
    expect(a! / b!).toBeCloseTo(1, 9);
    expect(c! / a!).toBeCloseTo(-2, 9);
  });
});

describe('four radials between two rings: concurrency is neither needed nor enough', () => {
  it('a hipped roof of rectangles stands although its radials meet in two points', () => {
    // Lifting by hand: outer ring at 0, inner at 1, all four slopes 1 / 1.5. Fold at an outer or inner strut 2/3, at a hip
    // 2/3 sqrt 2; resolved at a corner: s = -sqrt 2 t.
    const roof = trussOf({
      nodes: [
        [3, 2],
        [-3, 2],
        [-3, -2],
        [3, -2],
        [1.5, 0.5],
        [-1.5, 0.5],
        [-1.5, -0.5],
        [1.5, -0.5],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
        [4, 5],
        [5, 6],
        [6, 7],
        [7, 4],
        [0, 4],
        [1, 5],
        [2, 6],
        [3, 7],
      ],
    });
    const result = read(roof, { fix: [{ strut: 'S0', force_N: -2 / 3 }] });
    near(result.forces!, [...Array(4).fill(-2 / 3), ...Array(4).fill(2 / 3), ...Array(4).fill((2 / 3) * Math.SQRT2)]);
    expect(result.counts).toMatchObject({ dimension: 1, selfStressStates: 1 });
    expect(result.findings).toEqual([]);
  });

  it('with concurrent radials and one inner node moved along its own there is no lifting; the least singular value says how near', () => {
    const even = read(rings(4, 40), { sign: 1, largest_N: 1 });
    expect(even.counts).toMatchObject({ dimension: 1, selfStressStates: 1 });
    const moved = read(
      rings(4, 40, 0, (k) => (k === 0 ? 55 : 40)),
      { sign: 1, largest_N: 1 },
    );
    expect(moved.counts).toMatchObject({ dimension: 0, selfStressStates: 0 });
    expect(moved.counts!.leastSingular).toBeGreaterThan(1e-3);
    expect(moved.findings.map((f) => f.code)).toEqual(['no-reciprocal']);
  });
});

it('two independent liftings: a square with both rings braced comes back to given forces', () => {
  // Complete graph on the corners and the middle of a square is not planar as a drawing only where diagonals cross; with a node in
  // the middle it is a wheel: V = 5, E = 8, s = 8 - 7 = 1 and the bars of a wheel are t on the rim, -sqrt 2 t in the spokes.
  const wheel = trussOf({
    nodes: [
      [1, 1],
      [-1, 1],
      [-1, -1],
      [1, -1],
      [0, 0],
    ],
    edges: [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
      [0, 4],
      [1, 4],
      [2, 4],
      [3, 4],
    ],
  });
  near(read(wheel, { fix: [{ strut: 'S1', force_N: 4 }] }).forces!, [4, 4, 4, 4, ...Array(4).fill(-4 * Math.SQRT2)]);
  // A wheel within a wheel on the same spokes' lines: two states; forces that mix them come back exactly.
  const double = trussOf({
    nodes: [
      ...[2, 1].flatMap((r) =>
        [0, 1, 2, 3].map((k) => [r * Math.cos((k * Math.PI) / 2), r * Math.sin((k * Math.PI) / 2)]),
      ),
      [0, 0],
    ],
    edges: [
      ...[0, 1, 2, 3].map((k) => [k, (k + 1) % 4]),
      ...[0, 1, 2, 3].map((k) => [4 + k, 4 + ((k + 1) % 4)]),
      ...[0, 1, 2, 3].map((k) => [k, 4 + k]),
      ...[0, 1, 2, 3].map((k) => [4 + k, 8]),
    ],
    // Rim -1, its spokes sqrt 2 (45 degrees); inner rim 3; inner spokes by resolution at an inner node: sqrt 2 = 3 sqrt 2 + s.
    forces: [
      ...Array(4).fill(-1),
      ...Array(4).fill(3),
      ...Array(4).fill(Math.SQRT2),
      ...Array(4).fill(-2 * Math.SQRT2),
    ],
  });
  const result = read(double);
  expect(result.counts).toMatchObject({ dimension: 2, selfStressStates: 2 });
  near(
    result.forces!,
    double.members.map((m) => m.force!),
  );
});

describe('loads in the plane open the outside (Bow)', () => {
  // King post: feet 4 apart, apex 2 high, P = 10 down at the apex. Feet carry 5 each; rafters -5 sqrt 2, tie 5, post 0.
  const kingPost = trussOf({
    nodes: [
      [0, 0, 0],
      [4, 0, 0],
      [2, 0, 2],
      [2, 0, 0],
    ],
    edges: [
      [0, 2],
      [1, 2],
      [0, 3],
      [3, 1],
      [2, 3],
    ],
    supports: [
      [0, 'xyz'],
      [1, 'yz'],
      [2, 'y'],
      [3, 'y'],
    ],
    loads: [[2, [0, 0, -10]]],
  });

  it.each([
    ['upright', (t: Truss) => t],
    ['renumbered', (t: Truss) => ({ ...t, nodes: [...t.nodes].reverse(), members: [...t.members].reverse() })],
  ])('a king post truss, %s', (_, change) => {
    const truss = change(kingPost);
    const { forces, findings, diagram, counts } = read(truss);
    const wanted: Record<string, number> = {
      S0: -5 * Math.SQRT2,
      S1: -5 * Math.SQRT2,
      S2: 5,
      S3: 5,
      S4: 0,
    };
    truss.members.forEach((m, i) => {
      expect(forces![i]).toBeCloseTo(wanted[m.mark]!, 9);
    });
    expect(findings).toEqual([]);
    expect(counts).toMatchObject({ dimension: 0, selfStressStates: 0, cells: 2 + 3 });
    for (const node of diagram!.nodes) {
      expect(length(node.residual)).toBeLessThan(1e-9);
      expect(length(node.closure)).toBeLessThan(1e-9);
    }
    const foot = diagram!.nodes.find((n) => n.mark === 'N0')!;
    expect(length(foot.faces.find((f) => f.strut === null)!.area)).toBeCloseTo(5, 9);
  });

  it('each strut of the diagram is a segment square to it, as long as its force', () => {
    const { diagram } = read(kingPost);
    diagram!.struts.forEach((s, m) => {
      const [a, b] = kingPost.members[m]!.ends.map((mark) => kingPost.nodes.find((n) => n.mark === mark)!.at);
      const [right, left] = s.loop.map((v) => diagram!.vertices[v]!.at);
      const segment = subtract(left!, right!);
      expect(length(segment)).toBeCloseTo(Math.abs(s.force), 9);
      expect(dot(segment, subtract(b!, a!))).toBeCloseTo(0, 9);
    });
  });

  it('an overhang that no support takes is missed', () => {
    const loose = { ...kingPost, supports: kingPost.supports.filter((s) => s.node !== 'N1') };
    expect(read(loose).findings.map((f) => f.code)).toContain('reciprocal-misses-loads');
  });
});

it('struts that cross without a node have no regions, unless the faces say what lies beside them', () => {
  // A square with both diagonals: self-stress by hand sides 1, diagonals -sqrt 2. As a tetrahedron seen from above its four faces
  // give the lifting.
  const square = {
    nodes: [
      [0, 0],
      [1, 0],
      [1, 1],
      [0, 1],
    ],
    edges: [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
      [0, 2],
      [1, 3],
    ],
  };
  const bare = read(trussOf(square), { sign: 1, largest_N: 1 });
  expect(bare.findings).toMatchObject([{ code: 'regions-not-found' }]);
  const faces = [
    [0, 1, 2],
    [0, 2, 3],
    [0, 1, 3],
    [1, 2, 3],
  ];
  const result = read(trussOf({ ...square, faces }), { fix: [{ strut: 'S0', force_N: 1 }] });
  near(result.forces!, [1, 1, 1, 1, -Math.SQRT2, -Math.SQRT2]);
  expect(result.findings).toEqual([]);
});
