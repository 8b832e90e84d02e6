import { beforeAll, describe, expect, it } from 'vitest';
import { hubShape } from '../../../src/detailing/systems/hub-shape.js';
import { seededRandom } from '../../../src/maths/random.js';
import { addScaled, angleBetween, cross, normalise, perpendicular, scale, type Vec3 } from '../../../src/maths/vec3.js';
import { hasAccess } from '../../../src/planning/assembly/access.js';
import { hubFouls, strutFouls } from '../../../src/planning/assembly/fouls.js';
import { assemblySetting } from '../../../src/planning/assembly/setting.js';
import { HubSpace } from '../../../src/shaping/hub-space.js';
import { Bench, type Kernel, loadKernel, type Manifold } from '../../../src/shaping/kernel.js';
import { socketSolid } from '../../../src/shaping/socket-solid.js';
import { assembled } from '../../helpers/assembled.js';
import { trussOf } from '../../helpers/truss.js';

let kernel: Kernel;
beforeAll(async () => {
  kernel = await loadKernel();
});

const L = 300;
/** A node with struts in seeded directions of a cone, none within 20 degrees of another, to nodes of their own. */
function star(seed: number, count: number) {
  const random = seededRandom(seed);
  const directions: Vec3[] = [];
  while (directions.length < count) {
    const d: Vec3 = [1.4 * random() - 0.7, 1.4 * random() - 0.7, 1];
    const unit = normalise(d);
    if (directions.every((u) => angleBetween(u, unit) > (20 * Math.PI) / 180)) directions.push(unit);
  }
  const truss = trussOf({
    nodes: [[0, 0, 0], ...directions.map((d) => scale(d, L))],
    edges: directions.map((_, i) => [0, i + 1]),
  });
  return { directions, random, ...assembled(truss) };
}

/** The bar from a to b as a mesh. */
function bar(a: Vec3, b: Vec3, radius: number): Manifold {
  const axis = normalise([b[0] - a[0], b[1] - a[1], b[2] - a[2]]);
  const u = perpendicular(axis);
  const v = cross(axis, u);
  const ring = (at: Vec3): [number, number, number][] =>
    Array.from({ length: 48 }, (_, k) => {
      const t = (2 * Math.PI * k) / 48;
      return addScaled(addScaled(at, u, radius * Math.cos(t)), v, radius * Math.sin(t)) as [number, number, number];
    });
  return kernel.Manifold.hull([...ring(a), ...ring(b)]);
}

describe('a strut that tilts in its socket, against the mesh of the hub', () => {
  it('runs into the rest of the hub where a mesh of the strut cuts that mesh, and only there', () => {
    let hits = 0;
    let clear = 0;
    for (const seed of [1, 2, 3, 4]) {
      const { topology, parts, job, random } = star(seed, 5);
      const setting = assemblySetting(topology, parts, job);
      const hub = parts.hubs[0]!;
      const bench = new Bench(kernel);
      const space = new HubSpace(hubShape(hub, job));
      const solid = socketSolid(bench, space, { channels: [], cradles: [], chamfer: 0 });
      hub.sockets.forEach((s, i) => {
        const mouth = s.setback! + s.depth;
        const link = setting.links[i]!;
        for (let k = 0; k < 6; k++) {
          const turn = 2 * Math.PI * random();
          const side = addScaled(scale(s.y, Math.cos(turn)), s.z, Math.sin(turn));
          const size = 150 * random();
          // The far node is the loose one: it is drawn back and aside.
          const move = addScaled(scale(s.direction, 10), side, size);
          const found = strutFouls(setting, i + 1, link, move, () => false);
          const overlap = (radius: number): number => {
            let most = 0;
            for (let t = 1; t <= 4; t++) {
              const end = addScaled(scale(s.direction, L), side, (size * t) / 4);
              // From where its tilted end is out of its own sleeve.
              const rod = bar(scale(s.direction, mouth + 0.5 + (5 * size) / L), end, radius);
              const cut = kernel.Manifold.intersection([rod, solid]);
              most = Math.max(most, cut.volume());
              rod.delete();
              cut.delete();
            }
            return most;
          };
          // The bar of 8 mm, half a millimetre thinner and thicker: between the two either answer is right.
          if (overlap(3.5) > 0.05) {
            expect(found).toBe('N0');
            hits += 1;
          } else if (overlap(4.5) < 1e-6) {
            expect(found).toBeNull();
            clear += 1;
          }
        }
      });
      bench.clear();
    }
    expect(hits).toBeGreaterThan(5);
    expect(clear).toBeGreaterThan(50);
    expect(hits + clear).toBeGreaterThan(90);
  }, 120_000);
});

describe('what stands in the way', () => {
  // A strut comes down from N1 onto N0; another, clear of it in its place, crosses behind the hub that has to draw back.
  const behind = (gap: number) => {
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [0, 0, 300],
        [-300, 0, 300 + gap],
        [300, 0, 300 + gap],
      ],
      edges: [
        [0, 1],
        [2, 3],
      ],
    });
    const { topology, parts, job } = assembled(truss);
    const setting = assemblySetting(topology, parts, job);
    const reach = setting.roomAt(1)!.reach;
    return { setting, reach, travel: setting.links[0]!.travel };
  };

  it('a hub cannot draw back through a bar behind it, and can where the bar is farther than it goes', () => {
    const { reach, travel } = behind(100);
    expect(travel).toBeGreaterThan(8);
    // The top of a lone sleeve's hub lies between the node and its reach: the bar of 4 mm radius stands just behind, then well behind.
    const near = behind(6);
    expect(hubFouls(near.setting, 1, [0, 0, travel], () => true)).toBe('S1');
    const far = behind(reach + travel + 5);
    expect(hubFouls(far.setting, 1, [0, 0, travel], () => true)).toBeNull();
    expect(hubFouls(near.setting, 1, [0, 0, travel], () => false)).toBeNull();
  });

  it('a strut that swings passes no bar within its way', () => {
    // A bar across, 12 mm beside the strut's middle: a swing of 60 mm at the end moves the middle by 30.
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [0, 0, 300],
        [12, -200, 150],
        [12, 200, 150],
      ],
      edges: [
        [0, 1],
        [2, 3],
      ],
    });
    const { topology, parts, job } = assembled(truss);
    const setting = assemblySetting(topology, parts, job);
    const link = setting.links[0]!;
    expect(strutFouls(setting, 1, link, [60, 0, 10], () => true)).toBe('S1');
    expect(strutFouls(setting, 1, link, [-60, 0, 10], () => true)).toBeNull();
    expect(strutFouls(setting, 1, link, [4, 0, 10], () => true)).toBeNull();
    expect(strutFouls(setting, 1, link, [60, 0, 10], () => false)).toBeNull();
  });
});

describe('a hand and a driver', () => {
  /** A node with a strut along x, and others that stand round it. */
  const round = (others: readonly (readonly [number, number, number])[], fields: Record<string, unknown> = {}) => {
    const truss = trussOf({
      nodes: [[0, 0, 0], [300, 0, 0], ...others],
      edges: [
        [0, 1],
        ...others
          .slice(1)
          .map((_, i) => [i + 2, i + 3] as const)
          .filter((_, i) => i % 2 === 0),
      ],
    });
    const { topology, parts, job } = assembled(truss, fields);
    const setting = assemblySetting(topology, parts, job);
    return hasAccess(setting, parts.hubs[0]!, new Set(setting.links));
  };
  // A cage of bars about the node: two grids of bars 60 mm apart on the six sides of a cube of 200 mm.
  const cage = (pitch: number): [number, number, number][] => {
    const at: [number, number, number][] = [];
    for (let axis = 0; axis < 3; axis++)
      for (const side of [-100, 100])
        for (let u = -100; u <= 100; u += pitch)
          for (const across of [1, 2])
            for (const end of [-100, 100]) {
              const p = [0, 0, 0] as [number, number, number];
              p[axis] = side;
              p[(axis + across) % 3] = u;
              p[(axis + 3 - across) % 3] = end;
              at.push(p);
            }
    return at;
  };

  it('a hand of 80 mm does not pass a cage of bars 50 mm apart, and does where they are 200 mm apart', () => {
    expect(round(cage(50))).toBe(false);
    expect(round(cage(200))).toBe(true);
  });

  it('nor does a driver of 30 mm reach a pin between bars that leave it 20 mm, which a hand at the other side cannot help', () => {
    const pinned = { nodes: { joint: 'pinned' } };
    const free = round([], pinned);
    expect(free).toBe(true);
    // Bars along x close above and below the socket, on both sides that a driver may come from.
    const beside = (gap: number): [number, number, number][] =>
      [1, -1]
        .flatMap((s) =>
          [1, -1].flatMap((t): [number, number, number][] => [
            [-50, s * 60, t * gap],
            [200, s * 60, t * gap],
          ]),
        )
        .concat(
          [1, -1].flatMap((s) =>
            [1, -1].flatMap((t): [number, number, number][] => [
              [-50, t * gap, s * 60],
              [200, t * gap, s * 60],
            ]),
          ),
        );
    expect(round(beside(10), pinned)).toBe(false);
    expect(round(beside(40), pinned)).toBe(true);
  });
});
