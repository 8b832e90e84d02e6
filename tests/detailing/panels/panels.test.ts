import { describe, expect, it } from 'vitest';
import { axesOfStruts } from '../../../src/detailing/axes.js';
import { faceForms } from '../../../src/detailing/faces.js';
import { detailPanels } from '../../../src/detailing/panels/detail-panels.js';
import { sectionsOf } from '../../../src/detailing/sections.js';
import { signedArea, toRing } from '../../../src/maths/polygon/ring.js';
import { add, cross, dot, normalise, scale, subtract, type Vec3 } from '../../../src/maths/vec3.js';
import type { HubPart, PanelPart } from '../../../src/model/parts.js';
import { topologyOf } from '../../../src/model/topology.js';
import type { Truss } from '../../../src/model/truss.js';
import { readJob } from '../../../src/readers/job.js';

/** A closed shell: vertices, and faces as the planes that hold at least three of them with all others on one side. */
function shellOf(vertices: readonly Vec3[]): Truss {
  const faces: string[][] = [];
  const n = vertices.length;
  const seen = new Set<string>();
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++)
      for (let k = j + 1; k < n; k++) {
        const normal = normalise(cross(subtract(vertices[j]!, vertices[i]!), subtract(vertices[k]!, vertices[i]!)));
        const d = vertices.map((v) => dot(normal, subtract(v, vertices[i]!)));
        if (d.some((x) => x > 1e-6) && d.some((x) => x < -1e-6)) continue;
        const on = d.flatMap((x, q) => (Math.abs(x) <= 1e-6 ? [q] : []));
        if (seen.has(on.join())) continue;
        seen.add(on.join());
        const middle = scale(
          on.reduce<Vec3>((s, q) => add(s, vertices[q]!), [0, 0, 0]),
          1 / on.length,
        );
        const x = normalise(subtract(vertices[on[0]!]!, middle));
        const y = cross(normal, x);
        const angle = (q: number): number =>
          Math.atan2(dot(subtract(vertices[q]!, middle), y), dot(subtract(vertices[q]!, middle), x));
        faces.push([...on].sort((a, b) => angle(a) - angle(b)).map((q) => `N${q}`));
      }
  const edges = new Map<string, [string, string]>();
  for (const f of faces)
    f.forEach((a, i) => {
      const b = f[(i + 1) % f.length]!;
      edges.set([a, b].sort().join(), [a, b]);
    });
  return truss(
    vertices.map((at, i) => ({ mark: `N${i}`, at })),
    [...edges.values()],
    faces,
  );
}

const truss = (
  nodes: Truss['nodes'],
  members: readonly (readonly [string, string])[],
  faces: readonly (readonly string[])[],
): Truss => ({
  nodes,
  members: members.map((ends, i) => ({
    mark: `S${i}`,
    ends,
    force: null,
    section: null,
    area: null,
    modulus: null,
    roll: null,
    group: null,
  })),
  faces: faces.map((f, i) => ({ mark: `F${i}`, nodes: f, panel: true, group: null })),
  cells: [],
  reciprocal: null,
  supports: [],
  loads: [],
});

/** Panels without hubs unless a radius is given: then every hub is a square of that half-width round its node. */
function panelsOf(t: Truss, wish: object = {}, hub = 0) {
  const { job } = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 't', truss: 't.json', ...wish }),
    'job.json',
  );
  const topology = topologyOf(t);
  const { forms } = faceForms(topology, { flatnessWarn: 0.5, flatnessStop: null });
  const { sections } = sectionsOf(t, job!);
  const axes = axesOfStruts(topology, job!, forms);
  const hubs = hub > 0 ? t.nodes.map((n) => ({ mark: n.mark, at: n.at }) as unknown as HubPart) : [];
  return detailPanels({
    topology,
    job: job!,
    forms,
    sections,
    axes,
    hubs,
    hubOutline: (h, slab) => {
      const d = subtract(h.at, slab.origin);
      const [u, v] = [dot(d, slab.x), dot(d, slab.y)];
      return [
        [
          [u - hub, v - hub],
          [u + hub, v - hub],
          [u + hub, v + hub],
          [u - hub, v + hub],
        ],
      ];
    },
  });
}

const G = (1 + Math.sqrt(5)) / 2;
const signs = (a: number, b: number, c: number): Vec3[] => {
  const out = new Map<string, Vec3>();
  for (const x of [a, -a])
    for (const y of [b, -b])
      for (const z of [c, -c]) out.set([x, y, z].map((v) => (v + 0).toFixed(9)).join(), [x + 0, y + 0, z + 0]);
  return [...out.values()];
};
const even = (a: number, b: number, c: number): Vec3[] => [...signs(a, b, c), ...signs(b, c, a), ...signs(c, a, b)];
const all = (a: number, b: number, c: number): Vec3[] => {
  const out = new Map([...even(a, b, c), ...even(b, a, c)].map((v) => [v.map((x) => x.toFixed(9)).join(), v]));
  return [...out.values()];
};
const big = (v: readonly Vec3[]): Vec3[] => v.map((p) => scale(p, 200));

describe('dihedral angles', () => {
  // Published to the minute: Cundy and Rollett, Mathematical Models, 2nd ed., tables I and II (from memory).
  const solids: [string, Vec3[], Record<string, string>][] = [
    [
      'tetrahedron',
      [
        [1, 1, 1],
        [1, -1, -1],
        [-1, 1, -1],
        [-1, -1, 1],
      ],
      { '3-3': '70°32′' },
    ],
    ['cube', signs(1, 1, 1), { '4-4': '90°00′' }],
    ['octahedron', even(1, 0, 0), { '3-3': '109°28′' }],
    ['dodecahedron', [...signs(1, 1, 1), ...even(0, 1 / G, G)], { '5-5': '116°34′' }],
    ['icosahedron', even(0, 1, G), { '3-3': '138°11′' }],
    ['cuboctahedron', even(1, 1, 0), { '3-4': '125°16′' }],
    ['truncated octahedron', all(0, 1, 2), { '6-6': '109°28′', '4-6': '125°16′' }],
    ['truncated cube', all(Math.SQRT2 - 1, 1, 1), { '8-8': '90°00′', '3-8': '125°16′' }],
    ['rhombicuboctahedron', all(1, 1, 1 + Math.SQRT2), { '3-4': '144°44′', '4-4': '135°00′' }],
    ['icosidodecahedron', [...even(0, 0, 2 * G), ...even(1, G, G * G)], { '3-5': '142°37′' }],
  ];
  for (const [name, vertices, published] of solids)
    it(`of the ${name} are those published`, () => {
      const { panels } = panelsOf(shellOf(big(vertices)));
      const corners = new Map(panels.map((p) => [p.mark, p.edges.length]));
      const found: Record<string, Set<string>> = {};
      for (const p of panels)
        for (const e of p.edges) {
          const key = [p.edges.length, corners.get(e.neighbour!)!].sort((a, b) => a - b).join('-');
          const minutes = Math.round((e.dihedral! * 180 * 60) / Math.PI);
          (found[key] ??= new Set()).add(`${Math.floor(minutes / 60)}°${String(minutes % 60).padStart(2, '0')}′`);
        }
      expect(Object.fromEntries(Object.entries(found).map(([k, v]) => [k, [...v].join()]))).toEqual(published);
    });
});

describe('outlines', () => {
  const cube = shellOf(big(signs(1, 1, 1)));

  it('of a cube are squares inside the struts, on their faces, seen from outside, never mirrored', () => {
    const { panels, findings } = panelsOf(cube);
    expect(findings.filter((f) => f.level === 'stop')).toEqual([]);
    expect(panels.length).toBe(6);
    for (const p of panels) {
      expect(dot(p.frame.z, p.frame.origin)).toBeCloseTo(200, 9);
      const c = cross(p.frame.x, p.frame.y);
      for (const k of [0, 1, 2]) expect(c[k]).toBeCloseTo(p.frame.z[k]!, 12);
      expect(signedArea(toRing(p.outline))).toBeGreaterThan(0);
      // Strut 8 mm, gap 1 mm, acrylic 7.5e-5 x 15 K x 200 mm from the middle.
      const inset = 4 + 1 + 7.5e-5 * 15 * 200;
      expect(Math.sqrt(signedArea(toRing(p.outline)))).toBeCloseTo(400 - 2 * inset, 4);
      for (const q of p.outline) {
        const at = add(p.frame.origin, add(scale(p.frame.x, q[0]), scale(p.frame.y, q[1])));
        expect(Math.max(...at.map(Math.abs))).toBeCloseTo(200, 9);
      }
    }
  });

  it('over the struts meet at the bisecting plane and rest on the struts', () => {
    const { panels } = panelsOf(cube, { panels: { seating: 'over' } });
    const p = panels[0]!;
    expect(dot(p.frame.z, p.frame.origin)).toBeCloseTo(204, 9);
    const back = (0.5 + 7.5e-5 * 15 * 200) * Math.SQRT2;
    expect(Math.sqrt(signedArea(toRing(p.outline)))).toBeCloseTo(400 + 2 * (4 - back), 3);
  });

  it('keep clear of the hubs at every corner, straight, round and along them', () => {
    const half = 20;
    for (const corner of ['straight', 'round', 'follow'])
      for (const p of panelsOf(cube, { panels: { corner, holdBy: 'none' } }, half).panels)
        for (const [x, y] of p.outline)
          for (const cx of [-200, 200])
            for (const cy of [-200, 200]) {
              const out = Math.hypot(Math.max(0, Math.abs(x - cx) - half), Math.max(0, Math.abs(y - cy) - half));
              expect(out).toBeGreaterThan(1 - 1e-3);
            }
  });

  it('are the same wherever the shell stands and however its nodes are numbered', () => {
    const areas = (t: Truss): number[] =>
      panelsOf(t)
        .panels.map((p) => p.area)
        .sort((a, b) => a - b);
    const before = areas(cube);
    const turned: Truss = {
      ...cube,
      nodes: cube.nodes.map((n) => ({ ...n, at: add([1000, -500, 70], [n.at[1], n.at[2], n.at[0]]) })),
    };
    for (const [i, a] of areas(turned).entries()) expect(a).toBeCloseTo(before[i]!, 1);
    const renumbered: Truss = { ...cube, nodes: [...cube.nodes].reverse(), faces: [...cube.faces].reverse() };
    for (const [i, a] of areas(renumbered).entries()) expect(a).toBeCloseTo(before[i]!, 1);
  });

  it('name what is wrong: nothing left, nothing that holds, a hazard that cannot be waived', () => {
    const small = shellOf(signs(6, 6, 6));
    expect(panelsOf(small).findings.some((f) => f.code === 'panel-vanishes')).toBe(true);
    expect(
      panelsOf(cube, { panels: { holdBy: 'none' } }).findings.filter((f) => f.code === 'panel-not-held').length,
    ).toBe(6);
    expect(
      panelsOf(cube, { panels: { material: 'unobtainium' } }).findings.filter(
        (f) => f.code === 'panel-material-unknown',
      ).length,
    ).toBe(6);
  });
});

describe('a face out of flat', () => {
  const quad = (lift: number): Truss =>
    truss(
      [
        { mark: 'A', at: [0, 0, 0] },
        { mark: 'B', at: [400, 0, lift] },
        { mark: 'C', at: [400, 300, 0] },
        { mark: 'D', at: [0, 300, lift] },
      ],
      [
        ['A', 'B'],
        ['B', 'C'],
        ['C', 'D'],
        ['D', 'A'],
      ],
      [['A', 'B', 'C', 'D']],
    );
  const made = (t: Truss, notFlat: string, more: object = {}) => panelsOf(t, { panels: { notFlat, ...more } });

  it('is flagged and not made', () => {
    const { panels, findings } = made(quad(10), 'flag');
    expect(panels[0]!.outline).toEqual([]);
    expect(findings.find((f) => f.code === 'panel-not-flat')!.value).toBeCloseTo(5, 1);
  });

  it('is split into two flat panels that meet at a gap', () => {
    const { panels } = made(quad(10), 'split');
    expect(panels.map((p) => p.mark)).toEqual(['F0-1', 'F0-2']);
    for (const p of panels) {
      expect(p.flatness).toBeLessThan(1e-9);
      const cut = p.edges.find((e) => e.strut === null)!;
      expect(cut.neighbour).toBe(p.mark === 'F0-1' ? 'F0-2' : 'F0-1');
      expect(p.makeable).toBe(true);
    }
  });

  it('is folded along one diagonal, its pattern as large as its two halves', () => {
    const { panels } = made(quad(10), 'fold', { holdBy: 'none' });
    expect(panels.length).toBe(1);
    const p: PanelPart = panels[0]!;
    expect(Math.abs(p.fold!.angle)).toBeGreaterThan(0.05);
    const halves = made(quad(10), 'split', { holdBy: 'none' }).panels;
    const gap = 2 * 0.5 + 0.1;
    const sum = halves.reduce((s, h) => s + h.area, 0);
    expect(p.area).toBeGreaterThan(sum);
    expect(p.area).toBeLessThan(sum + 520 * 2 * gap);
  });

  it('is bent where the sheet bears it: pure twist gives E t κ / 2(1 + ν), κ = 4 h / a b', () => {
    const { panels } = made(quad(2), 'bend');
    const kappa = (4 * 1) / (400 * 300);
    expect(panels[0]!.bendStress!).toBeCloseTo((2855 * 3 * kappa) / (2 * 1.37), 2);
    expect(made(quad(200), 'bend').findings.some((f) => f.code === 'panel-bends-too-much')).toBe(true);
  });
});
