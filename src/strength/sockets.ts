import { nodeSystem } from '../detailing/systems/index.js';
import { GLUE_LINE } from '../model/catalogue/glue.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart, Parts, Socket } from '../model/parts.js';
import type { MemberActions, Utilisation } from '../model/solution.js';
import type { Judged } from './members.js';
import type { SocketCase, SocketPasses } from './socket/case.js';
import { requiredDepth } from './socket/depth.js';
import { judgeSocket } from './socket/index.js';
import type { Rules, Verdict } from './standard.js';

/** Forces below this share of the largest in the truss are round-off: a joint without a path may carry them. */
const NO_FORCE = 1e-9;

/** Every socket whose strut is known and has actions, with its cases. */
export function* socketsWithCases(
  parts: Parts,
  actions: readonly (readonly MemberActions[])[],
  job: Job,
  rules: Rules,
): Generator<{ readonly hub: HubPart; readonly socket: Socket; readonly cases: readonly SocketCase[] }> {
  const strutIndex = new Map(parts.struts.map((s, i) => [s.mark, i]));
  const bond = job.nodes.bondStrength_MPa ?? GLUE_LINE.strength;
  for (const hub of parts.hubs) {
    const passes = passesOf(hub, job);
    for (const [k, socket] of hub.sockets.entries()) {
      const i = strutIndex.get(socket.strut);
      const part = i === undefined ? undefined : parts.struts[i];
      const strut = part?.material;
      if (!part || !strut) continue;
      const end = part.ends[0].node === hub.mark ? 0 : 1;
      const float = part.ends[end].float ?? job.saw.endFloat_mm;
      const cases = (actions[i!] ?? []).map((a) => ({
        socket,
        strut,
        hub: hub.material,
        float,
        passes: passes[k] ?? null,
        actions: atEnd(a, end),
        rules,
        bond,
      }));
      if (cases.length > 0) yield { hub, socket, cases };
    }
  }
}

/** What each socket of a hub passes force through, in the sockets' order; empty where the hub could not be made. */
function passesOf(hub: HubPart, job: Job): readonly SocketPasses[] {
  if (hub.sockets.some((s) => s.setback === null)) return [];
  const strengths = nodeSystem(hub.system)?.strength(hub, job) ?? [];
  return strengths.map((s, k) => {
    const { depth, travel, shallow, pin, wall, form } = hub.sockets[k]!;
    return {
      // Gross: the paths take the pin's hole off themselves.
      wallArea: s.wallArea + (s.solid ? 0 : 2 * pin * wall),
      bondPerDepth: s.bondArea / (depth - (travel ?? 0) - (shallow ?? 0)),
      stopArea: s.stopArea,
      hollow: !s.solid && (form === undefined || form === 'sleeve'),
      ...(s.screws ? { screws: s.screws } : {}),
    };
  });
}

/** The actions as one end feels them: its own moments where they are known. */
const atEnd = (a: MemberActions, end: 0 | 1): MemberActions =>
  a.endMoments ? { ...a, momentY: a.endMoments[end][0], momentZ: a.endMoments[end][1] } : a;

/** Utilisation of every socket, by the path that its joint names; findings above 1 and where there is no path. */
export function judgeSockets(
  parts: Parts,
  actions: readonly (readonly MemberActions[])[],
  job: Job,
  rules: Rules,
): Judged {
  const utilisations: Utilisation[] = [];
  const findings: Finding[] = [];
  const largest = actions.flat().reduce((most, a) => Math.max(most, Math.abs(a.axial)), 0);
  for (const { hub, socket, cases } of socketsWithCases(parts, actions, job, rules)) {
    let worst: { case: SocketCase; verdict: Verdict } | null = null;
    let stuck: SocketCase | null = null;
    for (const c of cases) {
      const verdict = judgeSocket(c);
      if (verdict === null) {
        const more = stuck === null || Math.abs(c.actions.axial) > Math.abs(stuck.actions.axial);
        if (Math.abs(c.actions.axial) > NO_FORCE * largest && more) stuck = c;
      } else if (worst === null || verdict.utilisation > worst.verdict.utilisation) worst = { case: c, verdict };
    }
    if (stuck !== null) findings.push(noPath(hub, stuck));
    if (worst === null || stuck !== null) continue;
    const { utilisation, rule } = worst.verdict;
    const { combination, axial: force } = worst.case.actions;
    utilisations.push({ mark: socket.strut, kind: 'socket', at: hub.mark, combination, force, utilisation, rule });
    if (utilisation > 1) findings.push(overStressed(hub, worst.case, worst.verdict));
  }
  return { utilisations, findings };
}

const noPath = (hub: HubPart, c: SocketCase): Finding =>
  finding('socket-no-path', hub.mark, {
    value: c.actions.axial,
    limit: 0,
    about: {
      strut: c.socket.strut,
      joint: c.socket.joint,
      sign: c.actions.axial > 0 ? 'tension' : 'compression',
      combination: c.actions.combination,
      why: whyNoPath(c),
    },
  });

/** What keeps a joint from carrying a force, in words. */
function whyNoPath(c: SocketCase): string {
  const { joint, bolted, pin } = c.socket;
  if (bolted) return 'its slotted end has no room for bolts; choose a larger section';
  if (joint === 'glued')
    return 'the strut ends before its socket begins; make nodes.depth_mm larger than saw.endFloat_mm';
  if (joint === 'pinned' && pin <= 0) return 'it has no pin; give nodes.pin_mm';
  return 'glue or pin it';
}

function overStressed(hub: HubPart, c: SocketCase, verdict: Verdict): Finding {
  const depth = requiredDepth(c);
  return finding('socket-over-stressed', hub.mark, {
    value: verdict.utilisation,
    limit: 1,
    about: {
      strut: c.socket.strut,
      rule: verdict.rule,
      combination: c.actions.combination,
      force_N: c.actions.axial,
      ...(depth === null ? {} : { depth_mm: depth }),
    },
  });
}
