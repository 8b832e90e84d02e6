import type { PanelEdge } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import type { PanelChoice } from './choice.js';
import { type FaceLoop, faceLoop, inward } from './face-loop.js';
import { edgeInset } from './inset.js';
import { movementStrain } from './movement.js';
import { dihedralAngle, openingAngle } from './neighbours.js';
import type { Patch } from './patches.js';
import type { PanelSetting } from './setting.js';
import { reachAlong, reachInSlab } from './strut-reach.js';

export interface Seats {
  readonly edges: readonly PanelEdge[];
  readonly insets: readonly number[];
  readonly movements: readonly number[];
  /** Heights of the panel's faces over the plane of the axes. */
  readonly low: number;
  readonly high: number;
}

/** Heights of the panel over the plane of the strut axes: in it, or resting on the strut that stands out most. */
function heights(setting: PanelSetting, loop: FaceLoop, choice: PanelChoice): readonly [number, number] {
  const t = choice.thickness;
  if (choice.seating === 'between') return [-t / 2, t / 2];
  const reach = Math.max(
    0,
    ...membersOf(setting.topology, loop).map((m) => {
      const section = m === null ? null : setting.sections[m]!;
      return section ? reachAlong(section, setting.axes[m!]!, loop.frame.z) : 0;
    }),
  );
  return choice.seating === 'over' ? [reach, reach + t] : [-reach - t, -reach];
}

/** The member along each edge of the loop, by index; null: none. */
function membersOf(topology: Topology, loop: FaceLoop): (number | null)[] {
  return loop.nodes.map((node, i) => {
    const next = loop.nodes[(i + 1) % loop.nodes.length]!;
    const bar = topology.barsAt[topology.nodeIndex.get(node)!]!.find((b) => b.far.mark === next);
    return bar ? bar.memberIndex : null;
  });
}

/** Insets, bevels and neighbours of a patch's edges. */
export function seatsOf(setting: PanelSetting, patch: Patch, loop: FaceLoop, choice: PanelChoice): Seats {
  const { topology, job } = setting;
  const [low, high] = heights(setting, loop, choice);
  const strain = movementStrain(job, choice.material);
  const insets: number[] = [];
  const movements: number[] = [];
  const edges = membersOf(topology, loop).map((m, i): PanelEdge => {
    const into = inward(loop, i);
    const section = m === null ? null : setting.sections[m]!;
    const axes = m === null ? null : setting.axes[m]!;
    const across =
      m === null
        ? siblingsAcross(setting, patch, loop, i)
        : neighboursAcross(setting, patch.face, m, { into, normal: loop.frame.z });
    const [a, b] = [loop.corners[i]!, loop.corners[(i + 1) % loop.corners.length]!];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    // The frame's origin is the middle of the corners: what grows, grows from about there.
    const movement = (strain * Math.abs(a[0] * b[1] - a[1] * b[0])) / (length || 1);
    const seat = edgeInset(
      {
        seating: choice.seating,
        thickness: choice.thickness,
        low,
        high,
        strutReach: section && axes ? reachInSlab(section, axes, into, loop.frame.z, low, high) : null,
        strutHalf: section && axes ? reachAlong(section, axes, into) : 0,
        dihedrals: across.map((n) => n.dihedral),
        // Two halves of one face share a gap between them; nothing else stands there.
        gap: m === null && across.length > 0 ? job.panels.gap_mm / 2 : job.panels.gap_mm,
        movement,
      },
      job.panels.edges,
    );
    insets.push(seat.inset);
    movements.push(movement);
    const nearest = across[0] ?? null;
    return {
      length,
      from: loop.nodes[i]!,
      to: loop.nodes[(i + 1) % loop.nodes.length]!,
      strut: m === null ? null : topology.truss.members[m]!.mark,
      neighbour: nearest?.mark ?? null,
      dihedral: nearest?.dihedral ?? null,
      bevel: seat.bevel,
      inset: seat.inset,
    };
  });
  return { edges, insets, movements, low, high };
}

/** Panels on the other side of a strut, the one that leaves the least room first. */
function neighboursAcross(
  setting: PanelSetting,
  f: number,
  member: number,
  own: { readonly into: ReturnType<typeof inward>; readonly normal: FaceLoop['frame']['z'] },
): { readonly mark: string; readonly dihedral: number }[] {
  const { topology, forms } = setting;
  const [from, to] = topology.truss.members[member]!.ends;
  return topology.facesAlong[member]!.flatMap((g) => {
    const face = topology.truss.faces[g]!;
    const form = forms[g]!;
    if (g === f || !face.panel || !form.normal) return [];
    const loop = faceLoop(topology, face.nodes, form.origin, form.normal);
    const i = loop.nodes.findIndex((mark, k) => {
      const next = loop.nodes[(k + 1) % loop.nodes.length]!;
      return (mark === from && next === to) || (mark === to && next === from);
    });
    if (i < 0) return [];
    return [{ mark: face.mark, dihedral: dihedralAngle(own, { into: inward(loop, i), normal: form.normal }) }];
  }).sort((a, b) => openingAngle(a.dihedral) - openingAngle(b.dihedral));
}

/** The other half of a divided face, across the edge that no strut runs along. */
function siblingsAcross(
  setting: PanelSetting,
  patch: Patch,
  loop: FaceLoop,
  i: number,
): { readonly mark: string; readonly dihedral: number }[] {
  const [a, b] = [loop.nodes[i]!, loop.nodes[(i + 1) % loop.nodes.length]!];
  const own = { into: inward(loop, i), normal: loop.frame.z };
  return patch.siblings.flatMap((other) => {
    if (other.mark === patch.mark || !other.form.normal) return [];
    const theirs = faceLoop(setting.topology, other.nodes, other.form.origin, other.form.normal);
    const k = theirs.nodes.findIndex((n, j) => n === b && theirs.nodes[(j + 1) % theirs.nodes.length] === a);
    if (k < 0) return [];
    return [{ mark: other.mark, dihedral: dihedralAngle(own, { into: inward(theirs, k), normal: other.form.normal }) }];
  });
}
