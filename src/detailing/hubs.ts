import { length, mean, negate, normalise, subtract, type Vec3, Z_AXIS } from '../maths/vec3.js';
import { materialNamed } from '../model/catalogue/resolve.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Material } from '../model/material.js';
import type { HubPart, Socket, StrutPart } from '../model/parts.js';
import type { Section } from '../model/section.js';
import { endChoice } from '../model/strut-end.js';
import type { Topology } from '../model/topology.js';
import { nodeSystem } from './systems/index.js';
import { narrowWebs } from './systems/narrow-webs.js';
import { clearance, isMeasured, LEAST_WALL, measuredSize } from './systems/printing.js';
import type { BarEnd, NodeSystem } from './systems/system.js';

export interface DetailedHubs {
  /** One a node with at least one strut, in the nodes' order. */
  readonly hubs: readonly HubPart[];
  readonly findings: readonly Finding[];
}

/**
 * Hubs of a truss as numbers: the socket of each strut end and its setback. Masses are null until `weighHubs`: sockets get deeper
 * before they are known, and a mass costs more than all else here.
 *
 * @param sections by the member's index; null where unknown: that end gets no socket and its hub cannot be made
 * @param axes local axes of the struts, by the member's index
 */
export function detailHubs(
  topology: Topology,
  job: Job,
  sections: readonly (Section | null)[],
  axes: readonly StrutPart['axes'][],
): DetailedHubs {
  const findings: Finding[] = [];
  const middle = mean(topology.truss.nodes.map((n) => n.at));
  const materials = new Map<string, Material | null>();
  const materialOf = (system: NodeSystem | null): Material | null => {
    const name = system?.material?.(job) ?? job.nodes.material;
    let found = materials.get(name);
    if (found === undefined) {
      materials.set(name, (found = materialNamed(job, name)));
      if (!found) findings.push(finding('node-material-unknown', 'truss', { about: { material: name } }));
    }
    return found;
  };

  findings.push(...clearanceFindings(sections, job));

  const drafts: Draft[] = [];
  topology.truss.nodes.forEach((node, i) => {
    const bars = topology.barsAt[i]!;
    if (bars.length === 0) return;
    const name = job.nodes.systems[node.mark] ?? job.nodes.system;
    const system = nodeSystem(name);
    if (!system) findings.push(finding('node-system-unknown', node.mark, { about: { system: name } }));
    const ends: BarEnd[] = bars.flatMap((bar) => {
      const section = sections[bar.memberIndex];
      if (!section) return [];
      // At the "to" end the strut points back along its own x: y turns with it, z stays.
      const { y, z } = axes[bar.memberIndex]!;
      const asked = endChoice(job, bar.member.mark, node.mark);
      return {
        strut: bar.member.mark,
        farNode: bar.far.mark,
        direction: bar.direction,
        y: bar.end === 0 ? y : negate(y),
        z,
        section,
        joint: asked.joint ?? job.nodes.joint,
        detail: asked.detail,
        ...(asked.hold ? { hold: asked.hold } : {}),
      };
    });
    const sockets = system ? ends.map((end) => socketOf(system, end, job)) : [];
    const found = system?.setbacks(sockets, job);
    for (const pair of found?.tooClose ?? [])
      findings.push(
        finding('bars-too-close', node.mark, {
          value: (pair.angle * 180) / Math.PI,
          limit: job.nodes.leastAngle_deg,
          about: { a: pair.a, b: pair.b },
        }),
      );
    for (const strut of found?.throughPlate ?? [])
      findings.push(finding('strut-through-plate', node.mark, { about: { strut } }));
    for (const strut of found?.notRound ?? [])
      findings.push(finding('bore-not-round', node.mark, { about: { strut } }));
    if (found?.ballNeeds !== undefined)
      findings.push(
        finding('ball-too-small', node.mark, { value: job.nodes.ball.diameter_mm ?? null, limit: found.ballNeeds }),
      );
    if (found?.cubeNeeds !== undefined)
      findings.push(
        finding('cube-too-small', node.mark, { value: job.nodes.cube.edge_mm ?? null, limit: found.cubeNeeds }),
      );
    for (const { strut, edge, most } of found?.offFace ?? [])
      findings.push(finding('rim-over-edge', node.mark, { value: edge, limit: most, about: { strut } }));
    drafts.push({
      system,
      material: materialOf(system),
      whole: sockets.length === bars.length,
      setbacks: found?.setbacks ?? [],
      hub: {
        mark: node.mark,
        at: node.at,
        system: name,
        outward: outwardAt(node.at, middle),
        sockets,
        mass: null,
        material: materialOf(system) ?? NO_MATERIAL,
        makeable: false,
        revision: job.revision,
      },
    });
  });

  const everywhere = Math.max(0, ...drafts.flatMap((d) => d.setbacks.map((s) => s ?? 0)));
  const hubs = drafts.map(({ hub, system, material, whole, setbacks }): HubPart => {
    const atNode = Math.max(0, ...setbacks.map((s) => s ?? 0));
    const rule = system?.ownSetbacks
      ? null
      : { least: null, 'equal-at-node': atNode, equal: everywhere }[job.nodes.setbacks];
    const sockets = hub.sockets.map(
      (s, i): Socket => ({ ...s, setback: setbacks[i] === null ? null : (rule ?? setbacks[i]!) }),
    );
    for (const { a, b, web } of narrowWebs(sockets, job))
      findings.push(
        finding('bores-meet', hub.mark, { value: web, limit: LEAST_WALL[job.nodes['process']], about: { a, b } }),
      );
    const makeable = whole && material !== null && system !== null && sockets.every((s) => s.setback !== null);
    return { ...hub, sockets, makeable };
  });
  return { hubs, findings };
}

/** The hubs with their masses, kg; null where a socket or the material is missing. */
export const weighHubs = (topology: Topology, job: Job, hubs: readonly HubPart[]): readonly HubPart[] =>
  hubs.map((hub) => {
    const whole = hub.sockets.length === topology.barsAt[topology.nodeIndex.get(hub.mark)!]!.length;
    const system = hub.material === NO_MATERIAL ? null : nodeSystem(hub.system);
    return whole && system ? { ...hub, mass: system.mass(hub, job) } : hub;
  });

/** Says once that clearances are starting values, and of which sections. */
function clearanceFindings(sections: readonly (Section | null)[], job: Job): Finding[] {
  const guessed = new Map<string, Section>();
  for (const s of sections) if (s && !isMeasured(job, s)) guessed.set(s.name, s);
  const first = [...guessed.values()][0];
  if (!first) return [];
  const about = { sections: [...guessed.keys()].join(', ') };
  return [finding('clearance-not-measured', 'truss', { value: clearance(job, first, measuredSize(first)), about })];
}

/** The socket that a strut's end asks for, else its node's; a ball or cube has bores alone. */
function socketOf(system: NodeSystem, end: BarEnd, job: Job): Socket {
  const own = end.hold && !system.ownSetbacks ? nodeSystem(end.hold) : null;
  return (own ?? system).socket(end, job);
}

interface Draft {
  readonly hub: HubPart;
  readonly system: NodeSystem | null;
  readonly material: Material | null;
  /** Every strut at the node has a socket. */
  readonly whole: boolean;
  readonly setbacks: readonly (number | null)[];
}

function outwardAt(at: Vec3, middle: Vec3): Vec3 {
  const away = subtract(at, middle);
  return length(away) > 0 ? normalise(away) : Z_AXIS;
}

/** Stands where the job names a material that nobody knows; such a hub is never made. */
const NO_MATERIAL: Material = {
  name: 'unknown',
  title: 'unknown',
  family: 'plastic-print',
  density: 0,
  modulus: 0,
  strength: {},
  source: { text: 'unknown', mark: 'user', verified: false },
};
