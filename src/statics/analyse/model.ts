import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import type { Segment } from '../frame/member.js';
import { type PreparedFrame, prepareFrame, solveFrame } from '../frame/solve-frame.js';
import type { LoadCase } from '../loads/load-case.js';
import type { PinFigure } from '../pin-figure.js';
import { type PinTruss, solvePinTruss } from '../pin-truss.js';
import { frameOf, holdsMoment } from './frame-of.js';
import { frameLoads, frameResponse, pinLoads, pinResponse, type Response } from './response.js';

/** The structure ready to be loaded: a frame where hubs hold their angles, a pinned truss otherwise. */
export type Model =
  | { readonly kind: 'frame'; readonly prepared: Extract<PreparedFrame, { state: 'stiff' }> }
  | { readonly kind: 'pinned'; readonly truss: PinTruss }
  | { readonly kind: 'mechanism'; readonly node: number };

/** Whether any joint of the truss passes a moment: what a frame needs to differ from pins. */
export const jointsHold = (job: Job, parts: Parts): boolean =>
  job.analysis.joints === 'rigid' &&
  (parts.hubs.length === 0 || parts.hubs.some((h) => h.sockets.some((s) => holdsMoment(s.joint))));

/** `prestress`: forces that a device puts into the struts before any load, N; it serves a pinned truss alone. */
export function modelOf(
  topology: Topology,
  job: Job,
  parts: Parts,
  figure: PinFigure,
  stiffness: readonly Segment[],
  prestress: Float64Array | null,
): Model {
  if (!jointsHold(job, parts)) {
    const truss: PinTruss = {
      ...figure,
      axialStiffness: Float64Array.from(stiffness, (s) => s.axial),
      ...(prestress ? { prestress } : {}),
    };
    const trial = solvePinTruss(truss, []);
    return trial.state === 'solved' ? { kind: 'pinned', truss } : { kind: 'mechanism', node: trial.node };
  }
  const prepared = prepareFrame(frameOf(topology, job, parts, figure, stiffness));
  return prepared.state === 'stiff' ? { kind: 'frame', prepared } : { kind: 'mechanism', node: prepared.node };
}

/** Responses to cases, with the largest residual of the solves. */
export function respond(
  model: Exclude<Model, { kind: 'mechanism' }>,
  topology: Topology,
  parts: Parts,
  cases: readonly LoadCase[],
): { readonly responses: readonly Response[]; readonly residual: number } {
  if (model.kind === 'frame') {
    const { members } = model.prepared.frame;
    const results = solveFrame(
      model.prepared,
      cases.map((c) => frameLoads(c, members)),
    );
    return {
      responses: results.map((r, i) => frameResponse(cases[i]!, r, members)),
      residual: results.reduce((most, r) => Math.max(most, r.residual), 0),
    };
  }
  const axes = parts.struts.map((s) => s.axes);
  const solved = solvePinTruss(
    model.truss,
    cases.map((c) => pinLoads(c, topology, model.truss.ends)),
  );
  if (solved.state !== 'solved') throw new Error('a pinned truss that was stiff has become a mechanism');
  return {
    responses: solved.cases.map((r, i) => pinResponse(cases[i]!, r, topology, axes)),
    residual: solved.cases.reduce((most, r) => Math.max(most, r.residual), 0),
  };
}
