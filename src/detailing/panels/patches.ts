import { areaVector, fitPlane } from '../../maths/plane-fit.js';
import { dot, length, negate, subtract } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import type { Face } from '../../model/truss.js';
import type { FaceForm } from '../faces.js';
import { bendStressOf } from './bend-stress.js';
import { panelChoice } from './choice.js';
import type { PanelSetting } from './setting.js';

/** The part of a face that one panel covers: all of it, or one side of a diagonal. */
export interface Patch {
  readonly mark: string;
  /** Index of the face. */
  readonly face: number;
  readonly nodes: readonly string[];
  readonly form: FaceForm;
  /** All patches of the face, this one too. */
  readonly siblings: readonly Patch[];
  /** false: out of flat with nothing done about it; no outline is written. */
  readonly makeable: boolean;
  /** MPa in a sheet bent cold onto the face; null: not bent. */
  readonly bendStress: number | null;
  /** The two sides of the score line of a folded panel. */
  readonly halves: readonly [Patch, Patch] | null;
}

/** Largest flatness a seat takes where the job says nothing: half the gap, at least what is warned of. mm */
export const flatnessStop = (job: Job): number =>
  job.fit.flatnessStop_mm ?? Math.max(job.fit.flatnessWarn_mm, job.panels.gap_mm / 2);

/**
 * The patches that a face is covered by. Flat enough: one. Else by the job's wish: none is made and a stop says so
 * (flag); divided along the diagonals that leave the flattest parts, one panel each (split); one panel with a score line
 * along that diagonal (fold; split where it takes more than one); or one sheet bent cold where its material bears the stress (bend). Nothing is flattened in silence.
 */
export function patchesOf(setting: PanelSetting, face: Face, f: number, report: (found: Finding) => void): Patch[] {
  const { job, topology } = setting;
  const form = setting.forms[f]!;
  const whole = (makeable: boolean, bendStress: number | null = null): Patch[] => {
    const siblings: Patch[] = [];
    siblings.push({ mark: face.mark, face: f, nodes: face.nodes, form, siblings, makeable, bendStress, halves: null });
    return siblings;
  };
  const limit = flatnessStop(job);
  if (!form.normal || form.flatness <= limit) return whole(true);
  const refuse = (): Patch[] => {
    report(finding('panel-not-flat', face.mark, { value: form.flatness, limit }));
    return whole(false);
  };
  const way = job.panels.notFlat;
  if (way === 'bend') {
    const choice = panelChoice(job, face);
    const stress = choice.material ? bendStressOf(topology, face, form, choice.thickness, choice.material) : null;
    if (stress !== null && stress <= job.panels.bendStress_MPa) {
      report(finding('panel-bent', face.mark, { value: stress, limit: job.panels.bendStress_MPa }));
      return whole(true, stress);
    }
    report(finding('panel-bends-too-much', face.mark, { value: stress, limit: job.panels.bendStress_MPa }));
    return whole(false);
  }
  if (way === 'flag') return refuse();
  const parts = divide(topology, face.nodes, limit);
  if (!parts) return refuse();
  const siblings: Patch[] = [];
  parts.forEach((nodes, k) => {
    siblings.push({
      mark: `${face.mark}-${k + 1}`,
      face: f,
      nodes,
      form: partForm(topology, nodes, form, `${face.mark}-${k + 1}`),
      siblings,
      makeable: true,
      bendStress: null,
      halves: null,
    });
  });
  if (way === 'fold' && siblings.length === 2) {
    const halves = [siblings[0]!, siblings[1]!] as const;
    report(finding('panel-folded', face.mark, { value: form.flatness, limit }));
    return whole(true).map((patch) => ({ ...patch, halves }));
  }
  report(
    finding('panel-split', face.mark, {
      value: form.flatness,
      limit,
      about: { parts: siblings.map((p) => p.mark).join(', ') },
    }),
  );
  return siblings;
}

/** Loops along diagonals, each flat within the limit; the diagonal whose worse side is the flattest first. null: no way. */
function divide(topology: Topology, nodes: readonly string[], limit: number): (readonly string[])[] | null {
  if (flatnessOf(topology, nodes) <= limit) return [nodes];
  const n = nodes.length;
  if (n < 4) return null;
  let best: { worst: number; sides: readonly [readonly string[], readonly string[]] } | null = null;
  for (let i = 0; i < n; i++)
    for (let j = i + 2; j < n && j - i < n - 1; j++) {
      const sides = [nodes.slice(i, j + 1), [...nodes.slice(j), ...nodes.slice(0, i + 1)]] as const;
      if (!sameSense(topology, nodes, sides)) continue;
      const worst = Math.max(...sides.map((s) => flatnessOf(topology, s)));
      if (
        !best ||
        worst < best.worst - 1e-9 ||
        (worst < best.worst + 1e-9 && span(topology, sides[0]) < span(topology, best.sides[0]))
      )
        best = { worst, sides };
    }
  if (!best) return null;
  const done = best.sides.map((s) => divide(topology, s, limit));
  return done.every((d) => d !== null) ? done.flatMap((d) => d!) : null;
}

const flatnessOf = (topology: Topology, nodes: readonly string[]): number =>
  fitPlane(nodes.map((m) => topology.at(m)))?.flatness ?? Number.POSITIVE_INFINITY;

/** Length of the dividing diagonal: of two equally flat ways the shorter cut. */
const span = (topology: Topology, side: readonly string[]): number =>
  length(subtract(topology.at(side[0]!), topology.at(side.at(-1)!)));

/** Whether the diagonal lies inside: both sides turn the way the whole does. */
function sameSense(topology: Topology, nodes: readonly string[], sides: readonly (readonly string[])[]): boolean {
  const area = areaVector(nodes.map((m) => topology.at(m)));
  return sides.every((s) => dot(areaVector(s.map((m) => topology.at(m))), area) > 0);
}

function partForm(topology: Topology, nodes: readonly string[], whole: FaceForm, mark: string): FaceForm {
  const loop = nodes.map((m) => topology.at(m));
  const fit = fitPlane(loop)!;
  return {
    ...whole,
    mark,
    origin: fit.origin,
    normal: dot(fit.normal, whole.normal!) < 0 ? negate(fit.normal) : fit.normal,
    flatness: fit.flatness,
    area: length(areaVector(loop)),
  };
}
