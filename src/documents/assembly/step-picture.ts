import type { Topology } from '../../model/topology.js';
import type { Member } from '../../model/truss.js';
import type { Area } from '../kit/geometry2.js';
import { INK, SIZE } from '../kit/ink.js';
import type { Paper } from '../kit/paper.js';
import { ISOMETRIC } from '../kit/view/camera.js';
import { drawTrussView, type ViewNode, type ViewStrut } from '../kit/view/truss-view.js';

/** What stands after a step, and what is propped. */
export interface Standing {
  readonly nodes: ReadonlySet<string>;
  readonly struts: ReadonlySet<string>;
  readonly propped: ReadonlySet<string>;
}

/** The parts that a step adds. */
export interface StepParts {
  readonly nodes: ReadonlySet<string>;
  readonly struts: ReadonlySet<string>;
}

const NEW_STROKE = 0.9;
/**
 * Struts that a picture a hand wide still shows apart; where more stand, it shows those near the step. A picture of all that stands
 * in every step would also grow with the square of the truss.
 */
const MOST_STRUTS = 250;
/** How far from the step's own nodes such a picture goes, struts from node to node. */
const NEAR = 3;

/** Draws what stands after a step: new parts strong and with their marks, the rest plain; a triangle under what is propped. */
export function drawStepPicture(
  paper: Paper,
  area: Area,
  topology: Topology,
  fresh: StepParts,
  standing: Standing,
): void {
  const { truss } = topology;
  const own = new Set(fresh.nodes);
  for (const mark of fresh.struts) for (const end of truss.members[topology.memberIndex.get(mark)!]!.ends) own.add(end);
  const whole = standing.struts.size <= MOST_STRUTS;
  const members = whole
    ? truss.members.filter((m) => standing.struts.has(m.mark))
    : near(topology, own, standing.struts);
  const marks = whole
    ? truss.nodes.map((n) => n.mark)
    : [...new Set([...own, ...members.flatMap((m) => m.ends)])].sort(
        (a, b) => topology.nodeIndex.get(a)! - topology.nodeIndex.get(b)!,
      );
  const place = new Map(marks.map((mark, i) => [mark, i]));
  const nodes = marks.map(
    (mark): ViewNode => ({
      mark,
      at: truss.nodes[topology.nodeIndex.get(mark)!]!.at,
      show: own.has(mark) ? 'mark' : 'none',
      support: standing.propped.has(mark),
    }),
  );
  const struts = members.map((m): ViewStrut => {
    const isNew = fresh.struts.has(m.mark);
    return {
      mark: m.mark,
      from: place.get(m.ends[0])!,
      to: place.get(m.ends[1])!,
      stroke: isNew ? { kind: 'plain', width: NEW_STROKE } : { kind: 'none' },
      label: isNew ? { bold: m.mark, plain: '' } : null,
    };
  });
  drawTrussView(paper.pen, area, { camera: ISOMETRIC, nodes, struts, scale: 'fill', edge: 7 });
  if (!whole)
    paper.pen.text('Part of what stands: what is near this step.', area.x + area.width, area.y + area.height - 1, {
      size: SIZE.note,
      colour: INK.grey,
      align: 'right',
    });
}

/** Standing struts that are few struts away from some nodes, in the truss's order. */
function near(topology: Topology, from: ReadonlySet<string>, standing: ReadonlySet<string>): readonly Member[] {
  const { truss, nodeIndex, barsAt } = topology;
  const found = new Set<number>();
  const reached = new Set(from);
  let rim: readonly string[] = [...from];
  for (let step = 0; step < NEAR; step++) {
    const next: string[] = [];
    for (const mark of rim)
      for (const { member, memberIndex } of barsAt[nodeIndex.get(mark)!]!) {
        if (!standing.has(member.mark)) continue;
        found.add(memberIndex);
        for (const end of member.ends)
          if (!reached.has(end)) {
            reached.add(end);
            next.push(end);
          }
      }
    rim = next;
  }
  return [...found].sort((a, b) => a - b).map((m) => truss.members[m]!);
}
