import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import { sectionProperties } from '../../model/section.js';
import type { BucklingResult } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import { bucklesBelow, bucklingFactors } from '../frame/frame-buckling.js';
import { type PreparedFrame, prepareFrame } from '../frame/solve-frame.js';
import { type Subdivided, subdivide } from '../frame/subdivide.js';
import type { Combination } from '../loads/combinations.js';
import type { LoadCase } from '../loads/load-case.js';
import { pinBucklesBelow, pinBuckling } from '../pin-buckling.js';
import { designShare, designStiffness } from './design-stiffness.js';
import type { Model } from './model.js';
import { nearnessToEuler } from './nearness-to-euler.js';
import { axialForces, PER_MEMBER, type Response } from './response.js';
import { type SecondOrderActions, secondOrderActions } from './second-order-actions.js';

/** Elements a strut: one overestimates a pin-ended strut by 21.6 %, two by 0.75 %, four by 0.05 %. Large trusses take two. */
const ELEMENTS = 4;
const ELEMENTS_OF_LARGE = 2;
const LARGE = 1500;
/** Combinations that are looked at: those that compress the struts most against Euler's load. */
const TRIED = 12;
/** EN 1993-1-1 5.2.1 (3): second-order effects may be left out from here on; below 3 an approximate method is not allowed (5.2.2 (5)). */
const SECOND_ORDER = 10;
const LEAST = 3;

export interface Stability {
  readonly buckling: readonly BucklingResult[];
  readonly findings: readonly Finding[];
  /** Lowest load factor with design stiffness over all combinations searched; null: nothing buckles. */
  readonly lowest: number | null;
  /** Second-order actions by member index, where the job asks for them and they matter; null: not made. */
  readonly secondOrder: SecondOrderActions | null;
}

/** Lowest load factors of the combinations that matter, judged with the design stiffness. */
export function stabilityOf(
  topology: Topology,
  job: Job,
  parts: Parts,
  model: Exclude<Model, { kind: 'mechanism' }>,
  cases: readonly LoadCase[],
  combinations: readonly Combination[],
  responses: readonly Response[],
): Stability {
  const chosen = mostCompressed(topology, parts, responses).slice(0, TRIED);
  const buckling: BucklingResult[] = [];
  const findings: Finding[] = [];
  let worst: {
    readonly factor: number;
    readonly combination: string;
    readonly shape: Float64Array;
    readonly strut: string | null;
  } | null = null;
  let cut: { readonly sub: Subdivided; readonly prepared: Extract<PreparedFrame, { state: 'stiff' }> } | null = null;
  if (model.kind === 'frame') {
    const sub = subdivide(model.prepared.frame, topology.truss.members.length > LARGE ? ELEMENTS_OF_LARGE : ELEMENTS);
    const prepared = prepareFrame(sub.frame);
    if (prepared.state !== 'stiff') return { buckling, findings, lowest: null, secondOrder: null };
    cut = { sub, prepared };
  }
  for (const c of chosen) {
    const { name } = combinations[c]!;
    const share = permanentShare(topology, cases, combinations[c]!);
    const softer = designStiffness(job, parts, share);
    const pinned = model.kind === 'pinned' ? model.truss : null;
    const axial = cut ? elementForces(topology, responses[c]!, cut.sub) : axialForces(responses[c]!);
    // One factorisation says whether this combination is worse than the worst so far; only then are its factors sought.
    if (worst) {
      const limit = worst.factor / softer;
      const worse = cut ? bucklesBelow(cut.prepared, axial, limit) : pinBucklesBelow(pinned!, axial, limit);
      if (!worse) continue;
    }
    const found = cut ? bucklingFactors(cut.prepared, axial) : pinBuckling(pinned!, axial);
    const stride = cut ? 6 : 3;
    const shape = found.shapes[0];
    buckling.push({
      combination: name,
      factors: found.factors,
      strut: shape && cut ? bowingStrut(topology, cut.sub, shape) : null,
      design: found.factors.length > 0 ? found.factors[0]! * softer : null,
      euler: nearestToEuler(topology, job, parts, axialForces(responses[c]!), share),
      shape: shape
        ? Float64Array.from(
            { length: 3 * topology.truss.nodes.length },
            (_, k) => shape[stride * Math.floor(k / 3) + (k % 3)]!,
          )
        : null,
    });
    if (found.sturm === 'disagrees')
      findings.push(finding('buckling-unsettled', 'truss', { about: { combination: name } }));
    if (found.factors.length === 0) continue;
    const factor = found.factors[0]! * softer;
    if (worst === null || factor < worst.factor)
      worst = { factor, combination: name, shape: shape!, strut: buckling[buckling.length - 1]!.strut };
  }
  if (!worst || worst.factor >= SECOND_ORDER)
    return { buckling, findings, lowest: worst?.factor ?? null, secondOrder: null };
  const { factor, combination, shape } = worst;
  const secondOrder =
    job.analysis.secondOrder && cut
      ? secondOrderActions(
          topology,
          job,
          cut.sub,
          shape,
          cases,
          chosen.map((c) => [
            combinations[c]!,
            elementForces(topology, responses[c]!, cut.sub),
            designStiffness(job, parts, permanentShare(topology, cases, combinations[c]!)),
          ]),
        )
      : null;
  const stands = secondOrder !== null && secondOrder.buckling.length === 0;
  const low = factor < LEAST && !stands;
  findings.push(
    finding(low ? 'buckling-low' : 'second-order', 'truss', {
      ...(stands ? { level: 'note' as const } : {}),
      value: factor,
      limit: low ? LEAST : SECOND_ORDER,
      about: {
        combination,
        made: stands ? 'yes' : 'no',
        first: worst.strut ? `${worst.strut} bows` : 'the nodes sway',
      },
    }),
  );
  return { buckling, findings, lowest: factor, secondOrder };
}

/** The strut with the largest displacement of the shape inside it; null where that is at a node. */
function bowingStrut(topology: Topology, sub: Subdivided, shape: Float64Array): string | null {
  let most = 0;
  for (let i = 0; i < shape.length; i++) if (i % 6 < 3 && Math.abs(shape[i]!) > Math.abs(shape[most]!)) most = i;
  const node = Math.floor(most / 6);
  if (node < topology.truss.nodes.length) return null;
  const element = sub.frame.members.findIndex((m) => m.ends[1] === node);
  return topology.truss.members[sub.memberOf[element]!]!.mark;
}

/** The strut with the lowest pi² E I / L² over its compression, from node to node with pinned ends, E the design stiffness; null: none is pressed. */
function nearestToEuler(
  topology: Topology,
  job: Job,
  parts: Parts,
  axial: Float64Array,
  share: number,
): { readonly strut: string; readonly factor: number } | null {
  let nearest: { strut: string; factor: number } | null = null;
  parts.struts.forEach(({ section, material, mark }, e) => {
    if (!section || !material || !(axial[e]! < 0)) return;
    const { iy, iz } = sectionProperties(section.shape);
    const length = topology.axisLength[e]! * job.strength.effectiveLength;
    const stiffness = material.modulus * designShare(job, material, share) * Math.min(iy, iz);
    const factor = (Math.PI ** 2 * stiffness) / length ** 2 / -axial[e]!;
    if (nearest === null || factor < nearest.factor) nearest = { strut: mark, factor };
  });
  return nearest;
}

/** Combinations by the largest compression over Euler's load of any strut, worst first; those without compression are left out. */
function mostCompressed(topology: Topology, parts: Parts, responses: readonly Response[]): number[] {
  const worst = responses.map(nearnessToEuler(topology, parts));
  return worst
    .map((_, i) => i)
    .filter((i) => worst[i]! > 0)
    .sort((a, b) => worst[b]! - worst[a]! || a - b);
}

/** Axial force at the middle of each element, N. */
function elementForces(topology: Topology, r: Response, sub: Subdivided): Float64Array {
  return Float64Array.from(sub.memberOf, (e, k) => {
    const middle = (sub.spans[2 * k]! + sub.spans[2 * k + 1]!) / 2 / topology.axisLength[e]!;
    return r.member[PER_MEMBER * e]! * (1 - middle) + r.member[PER_MEMBER * e + 1]! * middle;
  });
}

/** Share of the permanent cases in a combination's load, by the sizes of the forces. */
function permanentShare(topology: Topology, cases: readonly LoadCase[], combination: Combination): number {
  let [permanent, all] = [0, 0];
  for (const [i, f] of combination.factors) {
    const c = cases[i]!;
    let size = 0;
    for (let k = 0; k < c.nodal.length; k += 3) size += Math.hypot(c.nodal[k]!, c.nodal[k + 1]!, c.nodal[k + 2]!);
    for (const [e, { even }] of c.lines) size += Math.hypot(even[0], even[1], even[2]) * topology.axisLength[e]!;
    all += Math.abs(f) * size;
    if (c.duration === 'permanent') permanent += Math.abs(f) * size;
  }
  return all > 0 ? permanent / all : 1;
}
