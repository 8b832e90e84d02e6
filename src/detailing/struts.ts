import { materialNamed } from '../model/catalogue/resolve.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart, Socket, StrutEnd, StrutPart } from '../model/parts.js';
import { type Section, sectionProperties } from '../model/section.js';
import type { Topology } from '../model/topology.js';
import { roundDownToStep } from './saw.js';

const KG_PER_MM3 = 1e-9; // times kg/m³

/**
 * Cut lengths: cut = axis - setbacks - least floats, down to the saw's step; what the step leaves over joins the floats,
 * half to each end. One part a member, in the members' order; a number that a hub could not give stays null.
 */
export function detailStruts(
  topology: Topology,
  job: Job,
  sections: readonly (Section | null)[],
  axes: readonly StrutPart['axes'][],
  hubs: readonly HubPart[],
): { readonly struts: readonly StrutPart[]; readonly findings: readonly Finding[] } {
  const findings: Finding[] = [];
  const socketAt = socketsByEnd(hubs);
  const struts = topology.truss.members.map((member, i): StrutPart => {
    const section = sections[i]!;
    const material = section && materialNamed(job, section.material);
    const [from, to] = member.ends.map((node) => socketAt.get(`${member.mark}@${node}`) ?? null) as [
      Socket | null,
      Socket | null,
    ];
    const axisLength = topology.axisLength[i]!;
    const lengths = cutBetween(axisLength, from, to, job);
    if (section && lengths.problem) {
      findings.push(
        lengths.problem === 'short'
          ? finding('strut-too-short', member.mark, { value: axisLength, limit: lengths.least })
          : finding('strut-not-cut', member.mark),
      );
    }
    const ends = [from, to].map(
      (socket, end): StrutEnd => ({
        node: member.ends[end as 0 | 1],
        setback: socket?.setback ?? null,
        float: lengths.floats[end]!,
        detail: socket?.detail ?? 'plain',
      }),
    ) as [StrutEnd, StrutEnd];
    return {
      mark: member.mark,
      section,
      material,
      group: member.group,
      ends,
      axisLength,
      cutLength: lengths.cut,
      axes: axes[i]!,
      mass:
        lengths.cut === null || !section || !material
          ? null
          : lengths.cut * sectionProperties(section.shape).area * material.density * KG_PER_MM3,
    };
  });
  return { struts, findings };
}

interface Cut {
  readonly cut: number | null;
  readonly floats: readonly [number | null, number | null];
  readonly problem: 'short' | 'hub' | null;
  /** Least axis length that would do, mm. */
  readonly least: number;
}

/** A strut must at least fill both its sockets: shorter, its sockets would run into each other. */
function cutBetween(axis: number, from: Socket | null, to: Socket | null, job: Job): Cut {
  if (from?.setback == null || to?.setback == null)
    return { cut: null, floats: [null, null], problem: 'hub', least: 0 };
  const between = axis - from.setback - to.setback;
  // A seated end bears on its stop: it gets no play but what the saw's step leaves over. An end that slides in leaves its way free.
  const floats = [from, to].map((s) => (s.joint === 'seated' ? 0 : job.saw.endFloat_mm) + (s.travel ?? 0));
  const least = floats[0]! + floats[1]!;
  const cut = roundDownToStep(between - least, job.saw.step_mm);
  const leastBetween = from.depth + to.depth;
  if (cut <= 0 || between < leastBetween) {
    return {
      cut: null,
      floats: [null, null],
      problem: 'short',
      least: from.setback + to.setback + Math.max(leastBetween, least),
    };
  }
  const first = (between - cut + floats[0]! - floats[1]!) / 2;
  return { cut, floats: [first, between - cut - first], problem: null, least: 0 };
}

function socketsByEnd(hubs: readonly HubPart[]): ReadonlyMap<string, Socket> {
  return new Map(hubs.flatMap((hub) => hub.sockets.map((s) => [`${s.strut}@${hub.mark}`, s] as const)));
}
