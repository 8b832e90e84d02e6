import { LEAST_WALL, measuredSize, sleeveWall } from '../detailing/systems/printing.js';
import { grow, type Half, largest, outlineOf } from '../detailing/systems/sleeve.js';
import type { Vec3 } from '../maths/vec3.js';
import type { Job } from '../model/job/index.js';
import type { Section } from '../model/section.js';
import type { ShapedPiece } from '../model/shaped.js';
import { addLettering, type Lettering, type TextSurface, textSize } from './engraving.js';
import { gaugeClearances, gaugeKind, gaugeSize, gaugeWalls } from './gauge-steps.js';
import { Bench, loadKernel, type Manifold } from './kernel.js';
import { layDown } from './lay-down.js';
import { letteringsFor } from './mark-places.js';
import { MeshBuilder } from './mesh-builder.js';
import { sidesFor } from './placed.js';

const PLATE = 2;
const FLOOR = 2;
const AISLE = 5;
/** Depth of a gauge's socket: enough to feel the fit, little enough to print in an hour; mm. */
const [SHALLOWEST, DEEPEST, DEPTH] = [6, 15, 1.2] as const;
/** A clearance is felt as well in a thinner wall than a socket's, mm. */
const MOST_WALL = 2.5;
/** A spigot's root inside its block, and air round the tube that is pushed over it, mm. */
const [PEG_ROOT, TUBE_AIR] = [1, 1] as const;

/**
 * The fit gauge of a section: sockets stepped in clearance, lying, upright and at 45 degrees, each with its clearance in hundredths
 * of a millimetre on top (of a tube that hubs go into: spigots instead of sockets), then walls of several thicknesses and letters of several heights, on one plate. Printed before anything
 * else in the hubs' own material; the value that fits goes back into the job. null where the kernel could not make it clean.
 */
export async function shapeGauge(section: Section, job: Job): Promise<ShapedPiece | null> {
  const bench = new Bench(await loadKernel());
  try {
    const solid = gaugeSolid(bench, section, job);
    return layDown(bench, solid, { up: [0, 0, 1], level: [1, 0, 0], contact: 0, stable: true }, [0, 0, 0], '');
  } finally {
    bench.clear();
  }
}

function gaugeSolid(bench: Bench, section: Section, job: Job): Manifold {
  const { Manifold } = bench.kernel;
  const peg = gaugeKind(section, job) === 'spigot';
  const size = gaugeSize(section, job);
  const clearances = gaugeClearances(section, job);
  const { shape } = section;
  const boreOf = (c: number): Half =>
    shape.kind === 'rectangle' ? [(shape.width + c) / 2, (shape.height + c) / 2] : (peg ? size - c : size + c) / 2;
  const wall = Math.min(sleeveWall(job, size), MOST_WALL);
  const widest = peg
    ? Math.max(grow(boreOf(clearances[0]!), 0) as number, measuredSize(section) / 2 + TUBE_AIR)
    : grow(boreOf(clearances[clearances.length - 1]!), wall);
  // Across: the pitch along x; up: the size along the other axis.
  const across = typeof widest === 'number' ? widest : widest[0];
  const up = typeof widest === 'number' ? widest : widest[1];
  const depth = Math.min(Math.max(DEPTH * size, SHALLOWEST), DEEPEST);
  const lettering = (letteringsFor(job, PLATE, LEAST_WALL[job.nodes['process']])[2] ??
    letteringsFor(job, PLATE, LEAST_WALL[job.nodes['process']])[0])!;
  const strip = lettering.capHeight + lettering.stroke + 2.5;
  const pitch = Math.max(2 * across, textSize('.00', lettering).width + 1.5);
  const width = clearances.length * pitch;

  const solids: Manifold[] = [];
  const cutters: Manifold[] = [];
  const letters = new MeshBuilder();
  const write = (text: string, x: number, y: number, z: number, l: Lettering = lettering): void =>
    addLettering(letters, bench.kernel, text, l, level(x, y, z));
  const box = (from: Vec3, to: Vec3): Manifold => {
    const cube = bench.hold(Manifold.cube([to[0] - from[0], to[1] - from[1], to[2] - from[2]]), 'block');
    const placed = bench.hold(cube.translate([from[0], from[1], from[2]]), 'block');
    bench.free(cube);
    return placed;
  };
  const bore = (half: Half, at: Vec3, d: Vec3, length: number): void => {
    // Half-widths lie along x and along d cross x.
    const v: Vec3 = [0, d[2], -d[1]];
    const mesh = new MeshBuilder();
    const outline = outlineOf(half, sidesFor(largest(half)));
    mesh.loft([
      { z: peg ? -PEG_ROOT : -length, outline },
      { z: peg ? length : 1, outline },
    ]);
    const local = bench.hold(new Manifold(new bench.kernel.Mesh(mesh.mesh())), 'bore');
    (peg ? solids : cutters).push(
      bench.hold(
        local.transform([1, 0, 0, 0, v[0], v[1], v[2], 0, d[0], d[1], d[2], 0, at[0], at[1], at[2], 1]),
        peg ? 'spigot' : 'bore',
      ),
    );
  };
  const aisle = AISLE + (peg ? depth : 0);
  const label = (c: number): string => c.toFixed(2).replace(/^0/, '');

  // Lying: mouths in the front face.
  let y = 0;
  const lyingHeight = PLATE + 2 * up;
  const lyingDepth = Math.max(depth + FLOOR, strip);
  solids.push(box([0, y, PLATE - 0.5], [width, y + lyingDepth, lyingHeight]));
  clearances.forEach((c, i) => {
    const x = (i + 0.5) * pitch;
    bore(boreOf(c), [x, y, PLATE + up], [0, -1, 0], depth);
    write(label(c), x, y + lyingDepth / 2, lyingHeight);
  });
  y += lyingDepth + aisle;

  // Upright: mouths on top, the strip of values behind.
  const uprightHeight = PLATE + depth + FLOOR;
  solids.push(box([0, y, PLATE - 0.5], [width, y + 2 * up + strip, uprightHeight]));
  clearances.forEach((c, i) => {
    const x = (i + 0.5) * pitch;
    bore(boreOf(c), [x, y + up, uprightHeight], [0, 0, 1], depth);
    write(label(c), x, y + 2 * up + strip / 2, uprightHeight);
  });
  y += 2 * up + strip + aisle;

  // At 45 degrees: mouths in a slope, the strip behind it.
  const slope = 2 * up * Math.SQRT1_2;
  const reach = (depth + up) * Math.SQRT1_2;
  const toe = PLATE + Math.max(1, reach - slope / 2 + FLOOR);
  const back = Math.max(slope / 2 + reach + FLOOR, slope + strip);
  const profile: [number, number][] = [
    [0, PLATE - 0.5],
    [back, PLATE - 0.5],
    [back, toe + slope],
    [slope, toe + slope],
    [0, toe],
  ];
  const corners = profile.flatMap(([py, pz]): Vec3[] => [
    [0, y + py, pz],
    [width, y + py, pz],
  ]);
  solids.push(bench.hold(Manifold.hull(corners.map((p) => [p[0], p[1], p[2]])), 'slope'));
  clearances.forEach((c, i) => {
    const x = (i + 0.5) * pitch;
    bore(boreOf(c), [x, y + slope / 2, toe + slope / 2], [0, -Math.SQRT1_2, Math.SQRT1_2], depth);
    write(label(c), x, y + slope + (back - slope) / 2, toe + slope);
  });
  y += back + aisle;

  // Walls that stand by themselves, their thickness in hundredths in front.
  const least = LEAST_WALL[job.nodes['process']];
  const wallLength = 8;
  gaugeWalls(job).forEach((t, i) => {
    const x = (i + 0.5) * pitch;
    write(t >= 1 ? t.toFixed(1) : label(t), x, y + strip / 2, PLATE);
    solids.push(box([x - t / 2, y + strip, PLATE - 0.5], [x + t / 2, y + strip + wallLength, PLATE + 10]));
  });
  y += strip + wallLength + 2;

  // Letters from the largest down.
  let x = 2;
  let tallest = 0;
  for (const l of letteringsFor(job, PLATE, least)) {
    const { width: w, height: h } = textSize(LETTERS, l);
    if (x > 2 && x + w > width - 1) {
      x = 2;
      y += tallest + 1.5;
      tallest = 0;
    }
    write(LETTERS, x + w / 2, y + (l.capHeight + l.stroke) / 2 + 1, PLATE, l);
    x += w + 3;
    tallest = Math.max(tallest, h);
  }
  y += tallest + 3;

  solids.push(box([-1.5, -0.01, 0], [width + 1.5, y, PLATE]));
  const whole = bench.hold(Manifold.union(solids), 'gauge');
  const text = bench.hold(new Manifold(new bench.kernel.Mesh(letters.mesh())), 'letters');
  return bench.hold(Manifold.difference([whole, ...cutters, text]), 'gauge');
}

/** Capitals and figures that are taken for each other. */
const LETTERS = 'S5B8';

/** Text on a level face, read from the front. */
const level =
  (x: number, y: number, z: number): TextSurface =>
  (u, v, height) => [x + u, y + v, z + height];
