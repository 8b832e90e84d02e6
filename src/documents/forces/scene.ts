import { ROUND_OFF } from '../../model/tolerance.js';
import { GIVEN_CASE } from '../../model/truss.js';
import type { Units } from '../kit/units.js';
import { type Camera, project } from '../kit/view/camera.js';
import type { ViewArrow } from '../kit/view/marks/arrow.js';
import { strokeOfForce } from '../kit/view/stroke.js';
import type { ViewNode, ViewStrut } from '../kit/view/truss-view.js';
import type { MemberRow } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** Struts whose numbers one picture carries: more cannot be told apart on A4. */
const LABELLED = 52;

/** The truss as the force sheets show it. */
export interface Scene {
  readonly nodes: readonly ViewNode[];
  readonly ends: readonly (readonly [number, number])[];
  readonly arrows: readonly ViewArrow[];
  readonly strut: (row: MemberRow, i: number) => ViewStrut;
}

export function sceneOf(records: PackRecords, rows: readonly MemberRow[], largest: number, units: Units): Scene {
  const { truss, nodeIndex } = records.topology;
  const supported = new Set(truss.supports.map((s) => s.node));
  const ends = rows.map(({ member }) => [nodeIndex.get(member.ends[0])!, nodeIndex.get(member.ends[1])!] as const);
  return {
    nodes: truss.nodes.map((n) => ({ mark: n.mark, at: n.at, support: supported.has(n.mark) })),
    ends,
    arrows:
      records.forces?.source === 'analysis'
        ? []
        : truss.loads
            .filter((load) => load.case === GIVEN_CASE)
            .map((load) => ({
              node: nodeIndex.get(load.node)!,
              direction: load.force,
              length: 11,
              newton: Math.hypot(...load.force),
            }))
            .map(({ newton, ...arrow }) => ({
              ...arrow,
              label: `${units.force(newton).replace('+', '')} ${units.forceUnit}`,
            })),
    strut: (row, i) => ({
      mark: row.member.mark,
      from: ends[i]![0],
      to: ends[i]![1],
      stroke: strokeOfForce(row.force, largest, ROUND_OFF.forceScale.value * largest),
      label: null,
    }),
  };
}

/** What one sheet of a view shows in full. */
export interface Part {
  readonly name: string;
  readonly members: readonly number[];
}

/**
 * The struts of a view in parts whose labels stay legible: all in one where they can be, else by the truss's own groups
 * where each is small enough, else by depth, nearest first.
 */
export function partsOf(camera: Camera, scene: Scene, rows: readonly MemberRow[]): Part[] {
  const all = rows.map((_, i) => i);
  if (rows.length <= LABELLED) return [{ name: '', members: all }];
  const groups = new Map<string, number[]>();
  rows.forEach((row, i) => {
    const key = row.member.group ?? 'other struts';
    groups.set(key, [...(groups.get(key) ?? []), i]);
  });
  const sheets = Math.ceil(rows.length / LABELLED);
  if (groups.size > 1 && groups.size <= 2 * sheets && [...groups.values()].every((g) => g.length <= LABELLED))
    return [...groups].map(([name, members]) => ({ name, members }));
  const depth = scene.ends.map(
    ([a, b]) => project(camera, scene.nodes[a]!.at)[2] + project(camera, scene.nodes[b]!.at)[2],
  );
  const order = all.sort((a, b) => depth[b]! - depth[a]! || a - b);
  return Array.from({ length: sheets }, (_, k) => ({
    name: `layer ${k + 1} of ${sheets}${k === 0 ? ', nearest' : k === sheets - 1 ? ', farthest' : ''}`,
    members: order.slice(Math.round((k * rows.length) / sheets), Math.round(((k + 1) * rows.length) / sheets)),
  }));
}
