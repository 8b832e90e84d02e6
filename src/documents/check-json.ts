import type { Finding } from '../model/finding.js';
import { sayFinding } from '../model/findings/index.js';
import type { Utilisation } from '../model/solution.js';
import { type ReciprocalReport, reciprocalReport } from '../statics/reciprocal/report.js';
import { worstByStrut } from './member-rows.js';
import type { Assessment } from './records.js';

/** The object of check.json, `strutwright-check/1`. What was not computed is null and listed under `notChecked`. */
export interface CheckReport {
  readonly format: 'strutwright-check/1';
  readonly status: 'clear' | 'flagged';
  readonly equilibrium: {
    readonly case: string;
    readonly maxResidual_N: number;
    readonly maxRelative: number;
    readonly nodes: readonly { readonly node: string; readonly residual_N: readonly number[] }[];
    readonly reactions: readonly { readonly node: string; readonly force_N: readonly number[] }[];
  } | null;
  readonly counts: {
    readonly selfStressStates: number;
    readonly mechanisms: number;
    readonly rigidBody: number;
  } | null;
  readonly displacements: readonly { readonly node: string; readonly case: string; readonly u_mm: readonly number[] }[];
  readonly members: readonly MemberReport[];
  readonly faces: readonly { readonly mark: string; readonly flatness_mm: number | null }[];
  readonly reciprocal: ReciprocalReport | null;
  readonly checked: readonly string[];
  readonly notChecked: readonly string[];
  readonly findings: readonly FindingReport[];
  readonly waived: readonly FindingReport[];
  /** Why the pack is on hold, in words; empty: it is not. */
  readonly hold: readonly string[];
}

export interface MemberReport {
  readonly mark: string;
  /** One key a case. */
  readonly force_N: Readonly<Record<string, number | null>>;
  readonly governing: {
    readonly combination: string;
    readonly force_N: number;
    readonly utilisation: number;
    readonly rule: string;
  } | null;
}

export interface FindingReport {
  readonly level: Finding['level'];
  readonly code: string;
  readonly subject: string;
  readonly value: number | null;
  readonly limit: number | null;
  readonly message: string;
  readonly kind: Finding['kind'];
}

export function checkReport(a: Assessment): CheckReport {
  const { truss } = a.topology;
  const worst = worstByStrut(a.utilisations);
  return {
    format: 'strutwright-check/1',
    status: a.status,
    equilibrium: a.equilibrium && {
      case: a.equilibrium.case,
      maxResidual_N: a.equilibrium.maxResidual,
      maxRelative: a.equilibrium.maxRelative,
      nodes: truss.nodes.map((n, i) => ({ node: n.mark, residual_N: [...a.equilibrium!.residuals[i]!] })),
      reactions: a.equilibrium.reactions.map((r) => ({ node: r.node, force_N: [...r.force] })),
    },
    counts: a.solution?.counts
      ? {
          selfStressStates: a.solution.counts.selfStressStates,
          mechanisms: a.solution.counts.mechanisms,
          rigidBody: a.solution.counts.rigidBody,
        }
      : null,
    displacements: displacementsOf(a),
    members: truss.members.map((m, i) => memberReport(a, m.mark, i, worst.get(m.mark) ?? null)),
    faces: a.forms.map((f) => ({ mark: f.mark, flatness_mm: Number.isFinite(f.flatness) ? f.flatness : null })),
    reciprocal: reciprocalReport(a.topology, a.reciprocal),
    checked: a.checked,
    notChecked: a.notChecked,
    findings: a.findings.map(findingReport),
    waived: a.waived.map(findingReport),
    hold: a.hold,
  };
}

/** A finding as data, its sentence with it. */
export const findingReport = (f: Finding): FindingReport => ({
  level: f.level,
  code: f.code,
  subject: f.subject,
  value: f.value,
  limit: f.limit,
  message: sayFinding(f),
  kind: f.kind,
});

function displacementsOf(a: Assessment): CheckReport['displacements'] {
  return (a.solution?.cases ?? []).flatMap((c) =>
    c.displacements
      ? a.topology.truss.nodes.map((n, i) => ({
          node: n.mark,
          case: c.name,
          u_mm: [...c.displacements!.subarray(3 * i, 3 * i + 3)],
        }))
      : [],
  );
}

function memberReport(a: Assessment, mark: string, i: number, worst: Utilisation | null): MemberReport {
  const force: Record<string, number | null> = {};
  // The sources given and reciprocal have the one case that they claim; analysis has its load cases.
  if (a.forces && a.forces.source !== 'analysis') force['given'] = a.forces.values[i]!;
  else for (const c of a.solution?.cases ?? []) if (c.forces && c.kind !== 'given') force[c.name] = c.forces[i]!;
  return {
    mark,
    force_N: force,
    governing: worst && {
      combination: worst.combination,
      force_N: worst.force,
      utilisation: worst.utilisation,
      rule: worst.rule,
    },
  };
}
