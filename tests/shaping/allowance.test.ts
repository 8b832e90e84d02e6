import { expect, it } from 'vitest';
import { shapeHub } from '../../dist/shaping/shape-hub.js';
import { makeProbe, readStl } from '../tools/mesh-check.mjs';
import { checkHub, randomHub } from './random-hub.mjs';

/** Radius of a socket's bore half-way down, by halving between plastic and air on the STL: the mean over many directions. */
async function measured(made: ReturnType<typeof randomHub>) {
  const { bytes, shaped, faults } = await checkHub(made, { cross: true });
  expect(faults).toEqual([]);
  const m = shaped.pieces[0]!.placement;
  const solid = makeProbe(readStl(bytes!));
  const inside = (p: readonly number[]): boolean => {
    const q = p.map((v, k) => v + made.hub.at[k]! - m[4 * k + 3]!);
    return solid([0, 1, 2].map((k) => m[k]! * q[0]! + m[4 + k]! * q[1]! + m[8 + k]! * q[2]!));
  };
  return made.hub.sockets.map((s) => {
    const [nominal, t] = [(s.bore as number) / 2, s.setback! + 0.7 * s.depth];
    let [sum, rise] = [0, 0];
    for (let k = 0; k < 60; k++) {
      const [c, n] = [Math.cos((2 * Math.PI * k) / 60), Math.sin((2 * Math.PI * k) / 60)];
      const at = (r: number): number[] => [0, 1, 2].map((i) => s.direction[i]! * t + r * (s.y[i]! * c + s.z[i]! * n));
      let [air, plastic] = [nominal - 0.05, nominal + 0.5];
      for (let i = 0; i < 12; i++) {
        const r = (air + plastic) / 2;
        if (inside(at(r))) plastic = r;
        else air = r;
      }
      sum += air / 60;
    }
    // The print's upright is the third column of the placement.
    rise = Math.abs(m[2]! * s.direction[0]! + m[6]! * s.direction[1]! + m[10]! * s.direction[2]!);
    return { wider: 2 * (sum - nominal), rise };
  });
}

const special = (nodes: object) => ({
  system: 'socket',
  count: 4,
  least: 50,
  nodes: { process: 'filament', joint: 'glued', marks: false, vent_mm: 0, wall_mm: 2, ...nodes },
});

it('draws a bore wider by what it prints narrower: 0.2 mm upright, none level, in between by the square of the cosine', async () => {
  for (const seed of [5, 8]) {
    const made = randomHub(seed, special({}));
    if (made.hub.sockets.some((s) => typeof s.bore !== 'number')) continue;
    for (const { wider, rise } of await measured(made)) {
      // Bores are polygons round their circle: their mean radius is up to 0.02 mm more.
      const asked = 0.2 * rise * rise;
      expect(wider).toBeGreaterThan((asked > 0.04 ? asked : 0) - 0.01);
      expect(wider).toBeLessThan(asked + 0.05);
    }
  }
});

it('takes both allowances from the job, and leaves bores of other processes as they are', async () => {
  const both = randomHub(5, special({ allowance: { upright_mm: 0.3, lying_mm: 0.3 } }));
  for (const { wider } of await measured(both)) expect(wider).toBeCloseTo(0.32, 1);
  const resin = randomHub(5, special({ process: 'resin' }));
  for (const { wider } of await measured(resin)) expect(Math.abs(wider)).toBeLessThan(0.05);
});

it('takes a wall for what it comes out as: the plastic that closes the bore belongs to it', async () => {
  const made = randomHub(5, special({ wall_mm: 0.8, allowance: { upright_mm: 0.3, lying_mm: 0.3 } }));
  expect((await shapeHub(made.hub, made.job)).findings.map((f) => f.code)).not.toContain('wall-thin');
});
