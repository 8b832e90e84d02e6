import { describe, expect, it } from 'vitest';
import { add, cross, dot, length, scale, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob } from '../../src/model/job/index.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { reciprocalOf } from '../../src/statics/reciprocal/reciprocal.js';
import { mapped, trussOf } from '../helpers/truss.js';
import { K5, NESTED_CUBES, NESTED_TETRAHEDRA, type RankineCase, SIXTEEN_CELL } from './rankine-cases.js';

const CASES = [K5, NESTED_TETRAHEDRA, NESTED_CUBES, SIXTEEN_CELL];
const SIGNED = { ...defaultJob(), forces: { ...defaultJob().forces, sign: 1 as const } };

function read(c: RankineCase, change: (truss: Truss) => Truss = (t) => t) {
  const base = trussOf(c);
  const mark = (i: number): string => (i === c.outside ? 'outside' : `C${i}`);
  const truss: Truss = {
    ...base,
    cells: base.cells.map((cell, i) => ({ ...cell, mark: mark(i) })),
    reciprocal: { newtonPerArea: 1, vertices: c.vertices.map((at, i) => ({ cell: mark(i), at })) },
  };
  return reciprocalOf(topologyOf(change(truss)), SIGNED);
}

const near = (a: ArrayLike<number>, b: readonly number[], digits = 9): void => {
  expect(a.length).toBe(b.length);
  b.forEach((v, i) => {
    expect(a[i]).toBeCloseTo(v, digits);
  });
};

describe.each(CASES)('$name', (c) => {
  it('gives the forces of the independent solution, square polygons and closed nodes', () => {
    const result = read(c);
    expect(result.findings).toEqual([]);
    near(result.forces!, c.forces);
    expect(result.residuals!.maxAngle).toBeLessThan(1e-11);
    expect(result.residuals!.maxResidual).toBeLessThan(1e-10);
    expect(result.residuals!.maxClosure).toBeLessThan(1e-10);
  });

  it('has area vectors that sum to nought at every node (Minkowski)', () => {
    for (const node of read(c).diagram!.nodes) {
      const sum = node.faces.reduce<Vec3>((s, f) => add(s, f.area), [0, 0, 0]);
      expect(length(sum)).toBeLessThan(1e-10);
      // Each polygon's own vertices give the same area: the record can be drawn without the complex.
      expect(node.faces.length).toBeGreaterThan(2);
    }
  });

  it('does not care which way loops, struts and cells are listed, nor where the figure lies', () => {
    const result = read(c, (t) => ({
      ...t,
      faces: t.faces.map((f, i) => (i % 3 === 0 ? { ...f, nodes: [...f.nodes].reverse() } : f)),
      members: t.members.map((m, i) => (i % 2 === 0 ? { ...m, ends: [m.ends[1], m.ends[0]] } : m)),
      cells: [...t.cells].reverse().map((cell) => ({ ...cell, faces: [...cell.faces].reverse() })),
      nodes: t.nodes.map((n) => ({ ...n, at: add(n.at, [7, -3, 2]) })),
    }));
    near(result.forces!, c.forces);
  });

  it('turns with its diagram, and forces grow with the square of the diagram', () => {
    const k: Vec3 = scale([2, -1, 2], 1 / 3);
    const turn = (p: Vec3): Vec3 =>
      add(add(scale(p, Math.cos(1.1)), scale(cross(k, p), Math.sin(1.1))), scale(k, dot(k, p) * (1 - Math.cos(1.1))));
    const result = read(c, (t) => ({
      ...mapped(t, turn),
      reciprocal: {
        newtonPerArea: 2,
        vertices: t.reciprocal!.vertices.map((v) => ({ ...v, at: scale(turn(v.at), 3) })),
      },
    }));
    near(
      result.forces!,
      c.forces.map((t) => 18 * t),
      7,
    );
  });

  it('finds the same complex when "outside" is left out, and the same forces', () => {
    const result = read(c, (t) => ({ ...t, cells: t.cells.filter((cell) => cell.mark !== 'outside') }));
    near(result.forces!, c.forces);
  });
});

it('closed forms: point in a tetrahedron -sqrt 2 and 2 sqrt 3; cube in a cube -2, 2 and 2 sqrt 3', () => {
  const k5 = [...read(K5).forces!];
  K5.edges.forEach(([a, b], i) => {
    expect(k5[i]).toBeCloseTo(a === 4 || b === 4 ? 2 * Math.sqrt(3) : -Math.SQRT2, 10);
  });
  const cubes = [...read(NESTED_CUBES).forces!];
  NESTED_CUBES.edges.forEach(([a, b], i) => {
    expect(cubes[i]).toBeCloseTo(b! < 8 ? -2 : a! >= 8 ? 2 : 2 * Math.sqrt(3), 10);
  });
});

it('the function turned upside down gives the same forces: the sign is a bit of its own', () => {
  const result = read(NESTED_CUBES, (t) => ({
    ...t,
    reciprocal: {
      newtonPerArea: 1,
      vertices: t.reciprocal!.vertices.map((v) => ({ ...v, at: scale(v.at, -1) })),
    },
  }));
  near(result.forces!, NESTED_CUBES.forces);
});
