import type { Vec3 } from '../../src/maths/vec3.js';
import type { Truss } from '../../src/model/truss.js';

/** A truss from plain arrays, as published cases give them: nodes N0.., members S0.., faces F0.., cells C0... */
export function trussOf(parts: {
  readonly nodes: readonly (readonly number[])[];
  readonly edges: readonly (readonly number[])[];
  readonly faces?: readonly (readonly number[])[];
  readonly cells?: readonly (readonly number[])[];
  readonly forces?: readonly number[];
  readonly supports?: readonly (readonly [number, string])[];
  readonly loads?: readonly (readonly [number, Vec3])[];
  readonly panels?: boolean;
}): Truss {
  const node = (i: number): string => `N${i}`;
  return {
    nodes: parts.nodes.map((at, i) => ({ mark: node(i), at: [at[0]!, at[1]!, at[2] ?? 0] })),
    members: parts.edges.map(([a, b], i) => ({
      mark: `S${i}`,
      ends: [node(a!), node(b!)],
      force: parts.forces?.[i] ?? null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    })),
    faces: (parts.faces ?? []).map((loop, i) => ({
      mark: `F${i}`,
      nodes: loop.map(node),
      panel: parts.panels ?? false,
      group: null,
    })),
    cells: (parts.cells ?? []).map((faces, i) => ({ mark: `C${i}`, faces: faces.map((f) => `F${f}`) })),
    reciprocal: null,
    supports: (parts.supports ?? []).map(([i, fixed]) => ({
      node: node(i),
      fixed: { x: fixed.includes('x'), y: fixed.includes('y'), z: fixed.includes('z') },
    })),
    loads: (parts.loads ?? []).map(([i, force]) => ({ case: 'given', node: node(i), force })),
  };
}

/** Invented: one level rectangular panel, its first node at the origin, between four struts that carry 1 N each; mm. */
export const levelPanel = (width: number, height: number): Truss =>
  trussOf({
    nodes: [
      [0, 0, 0],
      [width, 0, 0],
      [width, height, 0],
      [0, height, 0],
    ],
    edges: [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
    ],
    faces: [[0, 1, 2, 3]],
    panels: true,
    forces: [1, 1, 1, 1],
  });

/** The same truss with every node moved by a map of space. */
export const mapped = (truss: Truss, move: (p: Vec3) => Vec3): Truss => ({
  ...truss,
  nodes: truss.nodes.map((n) => ({ ...n, at: move(n.at) })),
});
