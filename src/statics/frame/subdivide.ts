import { addScaled, type Vec3 } from '../../maths/vec3.js';
import type { Frame, FrameMember, Segment, Spring } from './member.js';

/** A frame whose members are cut into elements, and which member each element is a part of. */
export interface Subdivided {
  readonly frame: Frame;
  readonly memberOf: Int32Array;
  /** Distances of each element's ends from its member's first node, mm: two an element. */
  readonly spans: Float64Array;
}

/**
 * Each member cut into `parts` elements of equal length along its longest segment; end zones stay with the first and last
 * element, so that no element is far shorter than its neighbours. Old nodes keep their numbers.
 */
export function subdivide(frame: Frame, parts: number): Subdivided {
  const nodes = Array.from(frame.nodes);
  const members: FrameMember[] = [];
  const memberOf: number[] = [];
  const spans: number[] = [];
  frame.members.forEach((m, e) => {
    const strut = m.segments.reduce((best, s, i) => (s.length > m.segments[best].length ? i : best), 0);
    const before = m.segments.slice(0, strut).reduce((sum, s) => sum + s.length, 0);
    const step = m.segments[strut].length / parts;
    const start: Vec3 = [frame.nodes[3 * m.ends[0]], frame.nodes[3 * m.ends[0] + 1], frame.nodes[3 * m.ends[0] + 2]];
    const whole = m.segments.reduce((sum, s) => sum + s.length, 0);
    let from = m.ends[0];
    const middle: Segment = { ...m.segments[strut], length: step };
    const inner = [middle]; // one object for all inner elements, so that their stiffness is made once
    for (let part = 0; part < parts; part++) {
      const first = part === 0;
      const last = part === parts - 1;
      const [x1, x2] = [first ? 0 : before + part * step, last ? whole : before + (part + 1) * step];
      let to = m.ends[1];
      if (!last) {
        to = nodes.length / 3;
        nodes.push(...addScaled(start, m.axes.x, x2));
      }
      members.push({
        ends: [from, to],
        axes: m.axes,
        segments:
          first || last
            ? [...(first ? m.segments.slice(0, strut) : []), middle, ...(last ? m.segments.slice(strut + 1) : [])]
            : inner,
        springs: m.springs.filter((s) => owns(s, x1, x2, last)).map((s) => ({ ...s, at: s.at - x1 })),
      });
      memberOf.push(e);
      spans.push(x1, x2);
      from = to;
    }
  });
  const fixed = new Uint8Array(2 * nodes.length);
  fixed.set(frame.fixed);
  return {
    frame: { nodes: Float64Array.from(nodes), members, fixed },
    memberOf: Int32Array.from(memberOf),
    spans: Float64Array.from(spans),
  };
}

const owns = (s: Spring, x1: number, x2: number, last: boolean): boolean => s.at >= x1 && (last || s.at < x2);
