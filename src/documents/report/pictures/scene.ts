import { sizeOf } from '../../../model/topology.js';
import type { ViewNode, ViewStrut } from '../../kit/view/truss-view.js';
import type { PackRecords } from '../../records.js';

/** The truss as every picture of the report shows it: nodes with marks and supports, struts by their ends, no stroke yet. */
export interface Scene {
  readonly nodes: readonly ViewNode[];
  readonly struts: readonly Omit<ViewStrut, 'stroke'>[];
  /** Largest extent along an axis, mm. */
  readonly size: number;
}

export function sceneOf(records: PackRecords): Scene {
  const { truss, nodeIndex } = records.topology;
  const supported = new Set(truss.supports.map((s) => s.node));
  return {
    nodes: truss.nodes.map((n) => ({ mark: n.mark, at: n.at, support: supported.has(n.mark) })),
    struts: truss.members.map((m) => ({
      mark: m.mark,
      from: nodeIndex.get(m.ends[0])!,
      to: nodeIndex.get(m.ends[1])!,
      label: null,
    })),
    size: sizeOf(truss),
  };
}
