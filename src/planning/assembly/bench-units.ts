import type { FaceForm } from '../../detailing/faces.js';
import { cross, dot, normalise, perpendicular, subtract } from '../../maths/vec3.js';
import type { BenchUnit } from '../../model/assembly.js';
import type { AssemblySetting } from './setting.js';
import { canSqueeze, loopLinks } from './start.js';

/** A unit is worth building on the bench from this many struts on: common practice, no source. */
const LEAST_STRUTS = 3;

/**
 * Flat faces that can be built on the bench, no hub in two of them: the largest first. Each with its mass, its size, and
 * whether it goes through the door and into the van, and how many people lift it.
 */
export function benchUnits(
  setting: AssemblySetting,
  forms: readonly FaceForm[],
  flatEnough: number,
): readonly BenchUnit[] {
  const { topology, job } = setting;
  const taken = new Set<number>();
  const units: BenchUnit[] = [];
  const order = topology.truss.faces.map((_, f) => f).sort((a, b) => forms[b]!.area - forms[a]!.area || a - b);
  for (const f of order) {
    const face = topology.truss.faces[f]!;
    const form = forms[f]!;
    const nodes = face.nodes.map((mark) => topology.nodeIndex.get(mark)!);
    if (!form.normal || form.flatness > flatEnough || nodes.some((n) => taken.has(n))) continue;
    const links = loopLinks(setting, nodes);
    if (!links || links.length < LEAST_STRUTS || !canSqueeze(links)) continue;
    for (const n of nodes) taken.add(n);
    const x = perpendicular(form.normal);
    const y = normalise(cross(form.normal, x));
    const out = nodes.map((n) => setting.roomAt(n)?.reach ?? 0);
    const size = least(
      nodes.map((n) => subtract(topology.truss.nodes[n]!.at, form.origin)).map((p) => [dot(p, x), dot(p, y)] as const),
      out,
    );
    const thick = 2 * Math.max(...out);
    const mass = nodes.reduce((sum, n) => sum + setting.hubMass[n]!, 0) + links.reduce((sum, l) => sum + l.mass, 0);
    const [short, long] = size;
    units.push({
      name: `U${String(units.length + 1).padStart(2, '0')}`,
      face: face.mark,
      hubs: face.nodes,
      struts: links.map((l) => topology.truss.members[l.strut]!.mark),
      mass_kg: mass,
      size_mm: [long, short],
      throughDoor: short <= Math.max(...job.assembly.door_mm) && thick <= Math.min(...job.assembly.door_mm),
      inVan: fits([long, short, thick], job.assembly.van_mm),
      people: Math.max(1, Math.ceil(mass / job.assembly.lift_kg)),
      lifted: Math.ceil(mass / job.assembly.lift_kg) <= job.assembly.people,
    });
  }
  return units;
}

/** [short, long] sides of the least rectangle round circles in a plane, of those along each line from one middle to the next. */
function least(points: readonly (readonly [number, number])[], radii: readonly number[]): readonly [number, number] {
  let best: readonly [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (let i = 0; i < points.length; i++) {
    const [a, b] = [points[i]!, points[(i + 1) % points.length]!];
    const turn = Math.atan2(b[1] - a[1], b[0] - a[0]);
    const [c, s] = [Math.cos(turn), Math.sin(turn)];
    const us = points.map(([px, py]) => c * px + s * py);
    const vs = points.map(([px, py]) => c * py - s * px);
    const extent = (at: readonly number[]): number =>
      Math.max(...at.map((p, k) => p + radii[k]!)) - Math.min(...at.map((p, k) => p - radii[k]!));
    const sides = [extent(us), extent(vs)].sort((p, q) => p - q) as [number, number];
    if (sides[0] * sides[1] < best[0] * best[1]) best = sides;
  }
  return best;
}

/** Goes into the van along its sides, whichever way it lies or stands. */
const fits = (size: readonly number[], van: readonly [number, number, number]): boolean => {
  const [room, sides] = [van, size].map((list) => [...list].sort((a, b) => b - a));
  return sides!.every((side, k) => side <= room![k]!);
};
