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
  /** Whether the sheet shows this part alone, enlarged. */
  readonly enlarged: boolean;
}

/**
 * The struts of a view in parts whose labels stay legible: all in one where they can be, else by the truss's own groups
 * where each is small enough, else cut in two across the longer side of the view until each is.
 */
export function partsOf(camera: Camera, scene: Scene, rows: readonly MemberRow[]): Part[] {
  const all = rows.map((_, i) => i);
  if (rows.length <= LABELLED) return [{ name: '', members: all, enlarged: false }];
  const groups = new Map<string, number[]>();
  rows.forEach((row, i) => {
    const key = row.member.group ?? 'other struts';
    groups.set(key, [...(groups.get(key) ?? []), i]);
  });
  const sheets = Math.ceil(rows.length / LABELLED);
  if (groups.size > 1 && groups.size <= 2 * sheets && [...groups.values()].every((g) => g.length <= LABELLED))
    return [...groups].map(([name, members]) => ({ name, members, enlarged: false }));
  const at = scene.nodes.map((node) => project(camera, node.at));
  const middle = scene.ends.map(([a, b]) => [at[a]![0] + at[b]![0], at[a]![1] + at[b]![1]] as const);
  const parts = halved(all, middle);
  return parts.map((members, k) => ({ name: `part ${k + 1} of ${parts.length}`, members, enlarged: true }));
}

/** Cuts a list of struts in two at the median of their middles, across the longer side, as often as it takes. */
function halved(members: readonly number[], middle: readonly (readonly [number, number])[]): number[][] {
  if (members.length <= LABELLED) return [[...members]];
  const extent = ([0, 1] as const).map((axis) => {
    const values = members.map((i) => middle[i]![axis]);
    return Math.max(...values) - Math.min(...values);
  });
  const axis = extent[0]! >= extent[1]! ? 0 : 1;
  const order = [...members].sort((a, b) => middle[a]![axis] - middle[b]![axis] || a - b);
  const half = Math.ceil(order.length / 2);
  return [...halved(order.slice(0, half), middle), ...halved(order.slice(half), middle)];
}
