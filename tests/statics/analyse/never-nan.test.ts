import { expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { sayFinding } from '../../../src/model/findings/index.js';
import { analyseTruss } from '../../../src/statics/analyse/analyse-truss.js';
import { trussOf } from '../../helpers/truss.js';
import { inputOf, jobWith } from './input.js';

/** Every number anywhere in a record. */
function numbersIn(value: unknown, found: number[] = []): number[] {
  if (typeof value === 'number') found.push(value);
  else if (value instanceof Float64Array) found.push(...value);
  else if (Array.isArray(value)) for (const v of value) numbersIn(v, found);
  else if (typeof value === 'object' && value !== null) for (const v of Object.values(value)) numbersIn(v, found);
  return found;
}

it.each(Array.from({ length: 24 }, (_, i) => i))('odd trusses and jobs give findings, never NaN (seed %i)', (seed) => {
  const random = seededRandom(seed);
  const n = 2 + Math.floor(random() * 8);
  const nodes = Array.from(
    { length: n },
    () => [0, 1, 2].map(() => Math.round(random() * 4) * 250) as [number, number, number],
  );
  // Coincident nodes are a reader's fault; here only their struts are left out.
  const edges: [number, number][] = [];
  for (let a = 0; a < n; a++)
    for (let b = a + 1; b < n; b++)
      if (random() < 0.7 && nodes[a].some((v, k) => v !== nodes[b][k])) edges.push([a, b]);
  const supports = nodes
    .map((_, i) => [i, ['x', 'y', 'z'].filter(() => random() < 0.6).join('')] as const)
    .filter(([, f]) => f && random() < 0.6);
  const loop =
    n >= 4
      ? [
          [0, 1, 2],
          [1, 2, 3],
        ]
      : [];
  const truss = trussOf({
    nodes,
    edges,
    faces: loop,
    panels: true,
    supports: supports as [number, string][],
    loads: [[0, [1, -2, -30 * random()] as Vec3]],
  });
  const use = (['table', 'outdoor', 'overhead', 'display'] as const)[seed % 4];
  const job = jobWith({
    use,
    analysis: { joints: seed % 2 ? 'pinned' : 'rigid', secondOrder: seed % 3 === 0 },
    nodes: { joint: (['glued', 'pinned', 'seated', 'loose'] as const)[Math.floor(random() * 4)] },
    loads: {
      cases: [
        { name: 'snow', kind: 'snow', direction: 'vertical', nodes: [], misfit: [], pressure_kN_per_m2: 0.8 },
        { name: 'wind', kind: 'wind', direction: 'normal', nodes: [], misfit: [], pressure_kN_per_m2: -0.4 },
        { name: 'heat', kind: 'temperature', direction: 'vertical', nodes: [], misfit: [], temperature_K: 30 },
      ],
    },
  } as never);
  const given = random() < 0.5 ? Float64Array.from(edges, () => 100 * (random() - 0.5)) : null;
  const { solution, findings, equilibrium } = analyseTruss(inputOf(truss, job, given));
  for (const value of numbersIn([solution, equilibrium])) expect(Number.isFinite(value)).toBe(true);
  for (const f of findings) expect(sayFinding(f)).not.toMatch(/NaN|undefined|Infinity/);
  // What was not solved says why.
  if (solution.combinations.length === 0) expect(findings.length).toBeGreaterThan(0);
});
