import type { Topology } from '../../model/topology.js';
import type { ReciprocalResult } from './result.js';

const DEGREES = 180 / Math.PI;

/** What check.json says of the reciprocal figure, under its key `reciprocal`; null: there is neither a complex nor a second source of forces. */
export interface ReciprocalReport {
  /** `space`: forces are areas; `plane`: lengths. null where no diagram was settled. */
  readonly kind: 'space' | 'plane' | null;
  readonly source: 'file' | 'found' | 'lifting' | null;
  readonly decidedBy: string | null;
  readonly sign: 1 | -1 | null;
  readonly newtonPerUnit: number | null;
  /** V - E + F - C = 0, `cells` with the unbounded one or its open parts. */
  readonly complex: {
    readonly nodes: number;
    readonly edges: number;
    readonly faces: number;
    readonly cells: number;
  } | null;
  /** Independent diagrams beside the states of self-stress, and how many of those the diagrams span. */
  readonly dimension: number | null;
  readonly selfStressStates: number | null;
  readonly reached: number | null;
  readonly leastSingularValue: number | null;
  readonly maxAngle_deg: number | null;
  readonly maxClosure_N: number | null;
  readonly maxResidual_N: number | null;
  readonly maxRelative: number | null;
  readonly vertices: readonly { readonly cell: string; readonly at: readonly number[] }[];
  readonly struts: readonly { readonly mark: string; readonly force_N: number; readonly angle_deg: number }[];
  readonly nodes: readonly {
    readonly node: string;
    readonly closure_N: readonly number[];
    readonly residual_N: readonly number[];
  }[];
  readonly concurrency: readonly {
    readonly struts: readonly string[];
    readonly miss_mm: number;
    readonly limit_mm: number;
    readonly point: readonly number[] | null;
  }[];
  /** Two sources of forces: first - second = self-stress part + remainder, strut by strut. */
  readonly differences: readonly {
    readonly first: string;
    readonly second: string;
    readonly largest_N: number;
    readonly relative: number;
    readonly struts: readonly {
      readonly mark: string;
      readonly difference_N: number;
      readonly selfStress_N: number;
      readonly remainder_N: number;
    }[];
  }[];
}

export function reciprocalReport(topology: Topology, result: ReciprocalResult | null): ReciprocalReport | null {
  if (!result || (!result.counts && result.comparisons.length === 0)) return null;
  const { counts, diagram, residuals } = result;
  const { members } = topology.truss;
  return {
    kind: diagram?.kind ?? null,
    source: diagram?.source ?? null,
    decidedBy: result.decidedBy,
    sign: diagram?.sign ?? null,
    newtonPerUnit: diagram?.newtonPerUnit ?? null,
    complex: counts && { nodes: counts.nodes, edges: counts.edges, faces: counts.faces, cells: counts.cells },
    dimension: counts?.dimension ?? null,
    selfStressStates: counts?.selfStressStates ?? null,
    reached: counts?.reached ?? null,
    leastSingularValue: counts?.leastSingular ?? null,
    maxAngle_deg: residuals ? residuals.maxAngle * DEGREES : null,
    maxClosure_N: residuals ? residuals.maxClosure : null,
    maxResidual_N: residuals ? residuals.maxResidual : null,
    maxRelative: residuals ? residuals.maxRelative : null,
    vertices: (diagram?.vertices ?? []).map((v) => ({ cell: v.cell, at: [...v.at] })),
    struts: (diagram?.struts ?? []).map((s) => ({ mark: s.mark, force_N: s.force, angle_deg: s.angle * DEGREES })),
    nodes: (diagram?.nodes ?? []).map((n) => ({
      node: n.mark,
      closure_N: [...n.closure],
      residual_N: [...n.residual],
    })),
    concurrency: result.concurrency.map((c) => ({
      struts: [...c.struts],
      miss_mm: c.miss,
      limit_mm: c.limit,
      point: c.point && [...c.point],
    })),
    differences: result.comparisons.map((c) => ({
      first: c.first,
      second: c.second,
      largest_N: c.largest,
      relative: c.relative,
      struts: members.map((m, i) => ({
        mark: m.mark,
        difference_N: c.difference[i],
        selfStress_N: c.selfStress[i],
        remainder_N: c.remainder[i],
      })),
    })),
  };
}
