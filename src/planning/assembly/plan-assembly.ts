import type { FaceForm } from '../../detailing/faces.js';
import type { AssemblyPlan, AssemblyStep, StrutEntry } from '../../model/assembly.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { PlannedBar } from '../../model/plan.js';
import type { Topology } from '../../model/topology.js';
import { piecesOf } from '../../statics/analyse/figure.js';
import { hasAccess } from './access.js';
import { packBags, sparesOf } from './bags.js';
import { benchUnits } from './bench-units.js';
import { Propper } from './props.js';
import { orderPiece, type PieceOrder } from './search.js';
import { type AssemblySetting, assemblySetting, type Link } from './setting.js';

export interface AssemblyInput {
  readonly topology: Topology;
  readonly parts: Parts;
  readonly job: Job;
  /** By face index. */
  readonly forms: readonly FaceForm[];
  /** The bars bought, for the spares. */
  readonly bars?: readonly PlannedBar[];
}

/**
 * The order of building: from the supports (or the job's start) upward, a hub with its struts a step, then the panels,
 * the lowest first. Every strut's way in, props, hold times, access, bags and spares; and what is wrong with the order.
 */
export function planAssembly(input: AssemblyInput): {
  readonly plan: AssemblyPlan;
  readonly findings: readonly Finding[];
} {
  const setting = assemblySetting(input.topology, input.parts, input.job);
  const findings: Finding[] = [];
  const { start } = input.job.assembly;
  if (start !== undefined && !input.topology.nodeIndex.has(start)) findings.push(finding('start-unknown', start));
  const found = piecesOf(input.topology);
  if (found.length > 1) findings.push(finding('truss-in-pieces', 'truss', { value: found.length, limit: 1 }));
  const steps: AssemblyStep[] = [];
  for (const piece of found) pieceSteps(setting, orderPiece(setting, piece, input.job.seed), steps);
  panelSteps(setting, input.forms, steps);

  const closing = steps.flatMap((s) => s.struts.filter((e) => e.entry === 'blocked' || e.entry === 'detail'));
  for (const e of closing)
    if (e.entry === 'blocked')
      findings.push(finding('strut-cannot-enter', e.strut, e.hits === undefined ? {} : { about: { hits: e.hits } }));
  for (const s of steps) {
    if (!s.access)
      for (const hub of s.hubs) findings.push(finding('hub-out-of-reach', hub, { about: { step: s.number } }));
    if (s.unstable) findings.push(finding('step-unstable', 'truss', { value: s.number }));
    for (const prop of s.props) findings.push(finding('node-needs-prop', prop, { about: { step: s.number } }));
  }
  return {
    plan: {
      steps,
      units: benchUnits(setting, input.forms, input.job.fit.flatnessWarn_mm),
      closing,
      bags: packBags(steps),
      spares: sparesOf(setting, input.bars ?? []),
    },
    findings,
  };
}

function pieceSteps(setting: AssemblySetting, order: PieceOrder, steps: AssemblyStep[]): void {
  const { topology, job, parts } = setting;
  const mark = (node: number): string => topology.truss.nodes[node]!.mark;
  const hubOf = new Map(parts.hubs.map((h) => [h.mark, h]));
  const standing: Link[] = [...order.start.links];
  const nodes = [...order.start.nodes];
  const propper = new Propper(setting, order.start.nodes);
  const glued = job.nodes.joint === 'glued';

  const push = (
    kind: AssemblyStep['kind'],
    hubs: readonly number[],
    entries: readonly StrutEntry[],
    last: boolean,
  ): void => {
    const { props, release, stands } = propper.after(kind === 'hub' ? hubs : [], nodes, standing, last);
    const strutMass = new Map(parts.struts.map((s) => [s.mark, s.mass ?? 0]));
    steps.push({
      number: steps.length + 1,
      kind,
      hubs: hubs.map(mark),
      struts: entries,
      panels: [],
      props: props.map(mark),
      release: release.map(mark),
      hold_min: glued && entries.length > 0 ? job.assembly.hold_min : 0,
      deflection_mm: stands !== null && stands !== 'unstable' ? stands.most : null,
      unstable: stands === 'unstable',
      access: hubs.every((n) => {
        const hub = hubOf.get(mark(n));
        return !hub || hasAccess(setting, hub, new Set(standing));
      }),
      mass_kg:
        hubs.reduce((sum, n) => sum + setting.hubMass[n]!, 0) +
        entries.reduce((sum, e) => sum + strutMass.get(e.strut)!, 0),
    });
  };

  const unit = order.start.links.map(
    (l): StrutEntry => ({
      strut: topology.truss.members[l.strut]!.mark,
      entry: 'squeezed',
      strain: null,
      detail: null,
    }),
  );
  push('unit', order.start.nodes, unit, order.moves.length === 0);
  order.moves.forEach((move, i) => {
    standing.push(...move.links);
    if (move.node >= 0) nodes.push(move.node);
    push('hub', move.node >= 0 ? [move.node] : [], move.entries, i === order.moves.length - 1);
  });
}

/** One panel a step, the lowest first, each after all struts: what carries it stands by then. */
function panelSteps(setting: AssemblySetting, forms: readonly FaceForm[], steps: AssemblyStep[]): void {
  const height = new Map(setting.topology.truss.faces.map((f, i) => [f.mark, forms[i]!.origin[2]]));
  const panels = [...setting.parts.panels]
    .filter((p) => p.makeable)
    .sort((a, b) => height.get(a.face)! - height.get(b.face)!);
  for (const panel of panels) {
    steps.push({
      number: steps.length + 1,
      kind: 'panel',
      hubs: [],
      struts: [],
      panels: [panel.mark],
      props: [],
      release: [],
      hold_min: 0,
      deflection_mm: null,
      unstable: false,
      access: true,
      mass_kg: panel.mass ?? 0,
    });
  }
}
