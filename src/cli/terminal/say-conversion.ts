import type { ConvertReport } from '../../readers/convert/report.js';

const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

/** What a conversion did, in sentences, one fact a line; what there was none of is not said. */
export function sayConversion(r: ConvertReport): string {
  const mm = (v: number): string => `${Number(v.toPrecision(3))} mm`;
  const marks = (list: readonly string[]): string =>
    `${list.slice(0, 12).join(', ')}${list.length > 12 ? ` and ${list.length - 12} more` : ''}`;
  const said: [boolean | number, string][] = [
    [true, `${count(r.nodes, 'node')}, ${count(r.struts, 'strut')}, ${count(r.faces, 'face')}.`],
    [
      r.merged.points,
      `Joined ${count(r.merged.points, 'point')} to others within ${mm(r.mergeTolerance_mm)}; the farthest moved ${mm(r.merged.farthest_mm)}.`,
    ],
    [r.strutsFromFaces, `No lines: ${count(r.strutsFromFaces, 'strut')} made from the edges of faces.`],
    [
      r.split.struts,
      `Split ${count(r.split.struts, 'strut')} at nodes on them, ${count(r.split.crossings, 'new node')} at crossings.`,
    ],
    [r.left.crossings, `${count(r.left.crossings, 'pair')} of struts cross without a node; --split makes nodes there.`],
    [r.left.nodesOnStruts, `${count(r.left.nodesOnStruts, 'node')} on a strut that is not theirs; --split splits it.`],
    [r.dropped.strutsWithoutLength, `Dropped ${count(r.dropped.strutsWithoutLength, 'strut')} without length.`],
    [r.dropped.doubleStruts, `Dropped ${count(r.dropped.doubleStruts, 'double strut')}.`],
    [
      r.dropped.facesWithoutArea,
      `Dropped ${count(r.dropped.facesWithoutArea, 'face')} without three different corners.`,
    ],
    [r.dropped.doubleFaces, `Dropped ${count(r.dropped.doubleFaces, 'double face')}.`],
    [
      r.dropped.nodesAtOnePlace,
      `Dropped ${count(r.dropped.nodesAtOnePlace, 'name')} of nodes at the place of another.`,
    ],
    [r.facesFound, `Found ${count(r.facesFound, 'face')} as planar minimal cycles.`],
    [r.faceEdgesWithoutStrut, `${count(r.faceEdgesWithoutStrut, 'edge')} of faces without a strut.`],
    [r.freeEnds.length, `Free ends: ${marks(r.freeEnds)}.`],
    [r.looseNodes.length, `Nodes without a strut: ${marks(r.looseNodes)}.`],
    [r.forces.given, `Forces: ${r.forces.given - r.forces.unmatched.length} of ${r.forces.given} have their strut.`],
    [r.forces.unmatched.length, `No strut for the forces of ${marks(r.forces.unmatched)}.`],
    [r.marks.prefixed, 'Names that are plain numbers got N or S in front.'],
    [true, `Marks: ${r.marks.kept} kept, ${r.marks.new} new, ${r.marks.withdrawn.length} withdrawn.`],
    [
      Object.keys(r.leftOut).length,
      `Left out: ${Object.entries(r.leftOut)
        .map(([name, n]) => `${n} ${name}`)
        .join(', ')}.`,
    ],
  ];
  return `${said
    .filter(([when]) => when)
    .map(([, text]) => text)
    .join('\n')}\n`;
}
