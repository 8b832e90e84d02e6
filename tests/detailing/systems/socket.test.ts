import { expect, it } from 'vitest';
import { boreHalf, sleevesOf } from '../../../src/detailing/systems/sleeve.js';
import { SOCKET_SYSTEM, sizeSocket, socketSetbacks } from '../../../src/detailing/systems/socket.js';
import type { BarEnd, Slab } from '../../../src/detailing/systems/system.js';
import { seededRandom } from '../../../src/maths/random.js';
import { add, addScaled, cross, dot, normalise, perpendicular, scale, type Vec3 } from '../../../src/maths/vec3.js';
import { materialNamed } from '../../../src/model/catalogue/resolve.js';
import { defaultJob, jobSchema } from '../../../src/model/job/index.js';
import type { HubPart, Point2, Socket } from '../../../src/model/parts.js';
import type { Section } from '../../../src/model/section.js';

const round = (diameter: number): Section => ({
  name: `r${diameter}`,
  shape: { kind: 'round', diameter },
  material: 'beech-dowel',
  measured: null,
});
const lath = (width: number, height: number): Section => ({
  name: `${width}x${height}`,
  shape: { kind: 'rectangle', width, height },
  material: 'beech-dowel',
  measured: null,
});

const bar = (strut: string, d: Vec3, section: Section = round(8)): BarEnd => {
  const direction = normalise(d);
  const y = perpendicular(direction);
  return {
    strut,
    farNode: `far-${strut}`,
    direction,
    y,
    z: cross(direction, y),
    section,
    joint: 'glued',
    detail: 'plain',
  };
};

const job = defaultJob();

const hubOf = (bars: readonly BarEnd[], at: Vec3 = [10, -20, 30]): HubPart => {
  const sockets = bars.map((b) => sizeSocket(b, job));
  const { setbacks } = socketSetbacks(sockets, job);
  return {
    mark: 'N1',
    at,
    system: 'socket',
    outward: [0, 0, 1],
    sockets: sockets.map((s, i): Socket => ({ ...s, setback: setbacks[i]! })),
    mass: null,
    material: materialNamed(job, 'PETG-print')!,
    makeable: true,
    revision: 'A',
  };
};

function randomBars(random: () => number, count: number, sections: readonly Section[]): BarEnd[] {
  const bars: BarEnd[] = [];
  while (bars.length < count) {
    const d: Vec3 = [random() * 2 - 1, random() * 2 - 1, random() * 2 - 1];
    if (dot(d, d) > 1 || dot(d, d) < 0.01) continue;
    const one = bar(`S${bars.length}`, d, sections[Math.floor(random() * sections.length)]!);
    if (bars.every((b) => dot(b.direction, one.direction) < Math.cos((25 * Math.PI) / 180))) bars.push(one);
  }
  return bars;
}

it('bores for the largest rod measured and the clearance of process and diameter', () => {
  // Clearances: derived from published fits of printed parts, Ø 8 in filament 0.40, Ø 12 in resin 0.30, Ø 6 in powder 0.35 mm.
  expect(sizeSocket(bar('S1', [1, 0, 0]), job).bore).toBeCloseTo(8.4, 12);
  expect(sizeSocket(bar('S1', [1, 0, 0], { ...round(8), measured: 8.25 }), job).bore).toBeCloseTo(8.65, 12);
  const resin = jobSchema.parse({ ...job, nodes: { process: 'resin' } });
  expect(sizeSocket(bar('S1', [1, 0, 0], round(12)), resin).bore).toBeCloseTo(12.3, 12);
  const powder = jobSchema.parse({ ...job, nodes: { process: 'powder' } });
  expect(sizeSocket(bar('S1', [1, 0, 0], round(6)), powder).bore).toBeCloseTo(6.35, 12);
  // Outdoors beech swells 0.4 % for each of 8 % of moisture: 0.256 mm on 8 mm.
  const outdoor = jobSchema.parse({ ...job, use: 'outdoor' });
  expect(sizeSocket(bar('S1', [1, 0, 0]), outdoor).bore).toBeCloseTo(8.4 + 0.256, 12);
});

it('refuses two bars nearer than the least angle by their names, and sets the others', () => {
  const a = (8 * Math.PI) / 180;
  const sockets = [bar('S1', [1, 0, 0]), bar('S2', [Math.cos(a), Math.sin(a), 0]), bar('S3', [0, 0, 1])].map((b) =>
    sizeSocket(b, job),
  );
  const { setbacks, tooClose } = socketSetbacks(sockets, job);
  expect(tooClose).toEqual([{ a: 'S1', b: 'S2', angle: expect.closeTo(a, 12) }]);
  expect(setbacks.slice(0, 2)).toEqual([null, null]);
  expect(setbacks[2]).toBeGreaterThan(0);
});

it('keeps every pair of bores apart by the web, sampled on their surfaces, and no setback can be lowered alone', () => {
  const random = seededRandom(3);
  for (let k = 0; k < 30; k++) {
    const hub = hubOf(randomBars(random, 3 + Math.floor(random() * 6), [round(6), round(10), lath(8, 14)]));
    const tight = hub.sockets.map(() => false);
    hub.sockets.forEach((a, i) => {
      hub.sockets.forEach((b, j) => {
        if (i === j) return;
        const web = Math.max(a.wall, b.wall);
        const sampled = closest(a, b);
        expect(sampled).toBeGreaterThan(web - 0.02);
        if (typeof a.bore === 'number' && typeof b.bore === 'number') {
          const lowered = closest({ ...a, setback: a.setback! - 0.3 }, b);
          if (lowered < web) tight[i] = true;
        } else tight[i] = true;
      });
    });
    hub.sockets.forEach((s, i) => {
      expect(tight[i] || s.setback! < 1.81).toBe(true);
    });
  }
});

/** Least distance between two bores by projection between the two convex solids, from several starts. */
function closest(a: Socket, b: Socket): number {
  let p: Vec3 = scale(a.direction, a.setback! + 50);
  let q: Vec3 = p;
  for (let k = 0; k < 4000; k++) {
    q = into(b, p);
    const next = into(a, q);
    if (Math.hypot(next[0] - p[0], next[1] - p[1], next[2] - p[2]) < 1e-9) break;
    p = next;
  }
  return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
}

function into(s: Socket, p: Vec3): Vec3 {
  const along = Math.max(dot(p, s.direction), s.setback!);
  let [a, b] = [dot(p, s.y), dot(p, s.z)];
  const half = boreHalf(s);
  if (typeof half === 'number') {
    const r = Math.hypot(a, b);
    if (r > half) {
      a *= half / r;
      b *= half / r;
    }
  } else {
    a = Math.max(-half[0], Math.min(half[0], a));
    b = Math.max(-half[1], Math.min(half[1], b));
  }
  return addScaled(addScaled(scale(s.direction, along), s.y, a), s.z, b);
}

it('covers every sleeve in a slab, and nothing where the slab misses the hub', () => {
  const random = seededRandom(5);
  for (let k = 0; k < 20; k++) {
    const hub = hubOf(randomBars(random, 5, [round(8), lath(8, 14)]));
    const x = normalise([random() - 0.5, random() - 0.5, random() - 0.5]);
    const y = perpendicular(x);
    const slab: Slab = { origin: [9, -19, 31], x, y, from: -1, to: 2 };
    const polygons = SOCKET_SYSTEM.outline(hub, slab, job);
    let hits = 0;
    for (const s of sleevesOf(hub.sockets))
      for (let i = 0; i < 300; i++) {
        const r = typeof s.outer === 'number' ? s.outer * Math.sqrt(random()) : 0;
        const angle = 2 * Math.PI * random();
        const [a, b] =
          typeof s.outer === 'number'
            ? [r * Math.cos(angle), r * Math.sin(angle)]
            : [s.outer[0] * (2 * random() - 1), s.outer[1] * (2 * random() - 1)];
        const along = scale(s.socket.direction, s.root + random() * (s.mouth - s.root));
        const p = add(hub.at, addScaled(addScaled(along, s.socket.y, a), s.socket.z, b));
        const away: Vec3 = [p[0] - slab.origin[0], p[1] - slab.origin[1], p[2] - slab.origin[2]];
        const h = dot(away, cross(x, y));
        if (h < slab.from || h > slab.to) continue;
        hits++;
        expect(polygons.some((polygon) => within(polygon, [dot(away, x), dot(away, y)]))).toBe(true);
      }
    expect(hits).toBeGreaterThan(0);
    expect(SOCKET_SYSTEM.outline(hub, { ...slab, from: 500, to: 503 }, job)).toEqual([]);
  }
});

function within(polygon: readonly Point2[], p: Point2): boolean {
  return polygon.every((a, i) => {
    const b = polygon[(i + 1) % polygon.length]!;
    return (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]) > -1e-6;
  });
}

it('gives stiffness and areas of a socket as worked by hand', () => {
  const hub = hubOf([bar('S1', [1, 0, 0]), bar('S2', [0, 1, 0])]);
  const s = hub.sockets[0]!;
  // Bore 8.4, wall 2, depth 14: sleeve area pi/4 (12.4² - 8.4²) = 65.35 mm², root pi/4 12.4² = 120.76 mm².
  const [strength] = SOCKET_SYSTEM.strength(hub, job);
  expect(strength!.wallArea).toBeCloseTo(65.35, 2);
  expect(strength!.rootArea).toBeCloseTo(120.76, 2);
  expect(strength!.bondArea).toBeCloseTo(Math.PI * 8.4 * 14 - 1.44, 6);
  const [stiffness] = SOCKET_SYSTEM.stiffness(hub, job);
  expect(stiffness!.axial).toBeCloseTo(2000 / (s.setback! / 120.763 + 14 / 3 / 65.345), 0);
});
