import { type FaceJointEnd, faceJointEnd } from '../../detailing/face-joint.js';
import { normalise, subtract } from '../../maths/vec3.js';
import type { StrutPart } from '../../model/parts.js';
import { type DrillHole, drillHoles } from '../../shaping/drill-holes.js';
import { CAUTION } from '../cautions.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import { issueOf } from '../issue.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Units, unitsOf } from '../kit/units.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';

const DEGREES = 180 / Math.PI;

/** One cut of a strut end that meets its neighbours face to face. */
export interface AngleRow {
  readonly strut: string;
  readonly node: string;
  readonly against: string;
  /** rad */
  readonly mitre: number;
  readonly bevel: number;
  /** From the farthest point of one end to that of the other along the axis, mm. */
  readonly longPointLength: number;
}

/** Every cut of every rectangular strut, end by end, the largest face of an end first. */
export function angleRows(records: Pick<PackRecords, 'parts' | 'topology'>): AngleRow[] {
  const { topology, parts } = records;
  const indexOf = new Map(topology.truss.members.map((m, i) => [m.mark, i]));
  const placeOf = new Map(topology.truss.nodes.map((n) => [n.mark, n.at]));
  const at = new Map<string, StrutPart[]>();
  for (const strut of parts.struts) for (const e of strut.ends) at.set(e.node, [...(at.get(e.node) ?? []), strut]);
  const away = (strut: StrutPart, node: string) => {
    const other = strut.ends[0].node === node ? strut.ends[1].node : strut.ends[0].node;
    return normalise(subtract(placeOf.get(other)!, placeOf.get(node)!));
  };
  return parts.struts.flatMap((strut): AngleRow[] => {
    const shape = strut.section?.shape;
    if (shape?.kind !== 'rectangle') return [];
    const ends = strut.ends.map(({ node }) => {
      const others = at.get(node)!.filter((s) => s !== strut);
      const end: FaceJointEnd = faceJointEnd(
        away(strut, node),
        strut.axes.y,
        strut.axes.z,
        shape.width,
        shape.height,
        others.map((s) => away(s, node)),
      );
      return { node, others, end };
    });
    const axis = topology.axisLength[indexOf.get(strut.mark)!]!;
    const longPointLength = axis - ends[0]!.end.longPoint - ends[1]!.end.longPoint;
    return ends.flatMap(({ node, others, end }) =>
      end.cuts.map((cut) => ({
        strut: strut.mark,
        node,
        against: others[cut.against]!.mark,
        mitre: cut.mitre,
        bevel: cut.bevel,
        longPointLength,
      })),
    );
  });
}

export const holeRows = (records: Pick<PackRecords, 'parts' | 'job'>): DrillHole[] =>
  drillHoles(records.parts.hubs, records.parts.struts, records.job).sort(
    (a, b) => byMark(a.strut, b.strut) || byMark(a.node, b.node),
  );

/** saw-angles.csv: one row a cut. */
export function sawAnglesCsv(records: PackRecords): Uint8Array {
  const columns: CsvColumn<AngleRow>[] = [
    { name: 'strut', value: (r) => r.strut },
    { name: 'node', value: (r) => r.node },
    { name: 'against', value: (r) => r.against },
    { name: 'mitre_deg', decimals: DECIMALS.angle, value: (r) => r.mitre * DEGREES },
    { name: 'bevel_deg', decimals: DECIMALS.angle, value: (r) => r.bevel * DEGREES },
    { name: 'long_point_length_mm', decimals: DECIMALS.length, value: (r) => r.longPointLength },
  ];
  return writeCsv(columns, angleRows(records), records.job.output.csv);
}

/** drill-list.csv: one row a hole. */
export function drillListCsv(records: PackRecords): Uint8Array {
  const columns: CsvColumn<DrillHole>[] = [
    { name: 'strut', value: (r) => r.strut },
    { name: 'node', value: (r) => r.node },
    { name: 'distance_mm', decimals: DECIMALS.length, value: (r) => r.distance },
    { name: 'diameter_mm', decimals: DECIMALS.length, value: (r) => r.diameter },
    { name: 'angle_deg', decimals: DECIMALS.angle, value: (r) => r.angle * DEGREES },
  ];
  return writeCsv(columns, holeRows(records), records.job.output.csv);
}

/** end-work.pdf: what is done to strut ends beside a square cut: holes for pins, compound saw angles, each with its convention. */
export async function endWorkPdf(records: PackRecords, fonts: Fonts): Promise<Written> {
  const { job } = records;
  const units = unitsOf(job, 0);
  const paper = new Paper(issueOf(records, fonts), 'End work', CAUTION, units.words);
  paper.addSheet({
    title: 'End work',
    instruction: 'What struts get at their ends after they are cut to length. Tick each end when it is done.',
  });
  const flow = new Flow(paper);
  if (job.struts.pinDrill) holesSection(flow, holeRows(records), units);
  if (job.struts.faceJoints) anglesSection(flow, angleRows(records), units);
  return paper.finish();
}

function holesSection(flow: Flow, rows: readonly DrillHole[], units: Units): void {
  flow.heading('Holes for pins');
  flow.paragraph(
    'Distance: from the strut’s end to the middle of the hole. Angle: turn of the hole about the strut from its width (y) towards its height (z), seen with end A near and end B far; on a round strut drill end A first, then turn by the difference of the two angles.',
  );
  if (rows.length === 0) flow.paragraph('No strut end has a pin through it.');
  else
    flow.table<DrillHole>(
      [
        { head: 'Done', tick: true },
        { head: 'Strut', bold: true, value: (r) => r.strut },
        { head: 'End at', bold: true, value: (r) => r.node },
        { head: `Distance, ${units.lengthUnit}`, align: 'right', bold: true, value: (r) => units.length(r.distance) },
        { head: `Drill, ${units.lengthUnit}`, align: 'right', value: (r) => units.length(r.diameter) },
        { head: 'Angle, °', align: 'right', value: (r) => units.angle(r.angle) },
      ],
      rows,
    );
}

function anglesSection(flow: Flow, rows: readonly AngleRow[], units: Units): void {
  flow.heading('Saw angles, face to face');
  flow.paragraph(
    'The strut lies with its height (z) up. Mitre turns the table, bevel tilts the blade; a square cut is 0 and 0. Mitre is positive where the cut’s face turns towards the strut’s +y side, bevel where it leans up. The first cut of an end is its largest face. The length is from long point to long point along the middle of the strut.',
  );
  if (rows.length === 0) flow.paragraph('No strut has a rectangular section.');
  else
    flow.table<AngleRow>(
      [
        { head: 'Done', tick: true },
        { head: 'Strut', bold: true, value: (r) => r.strut },
        {
          head: `Long point length, ${units.lengthUnit}`,
          align: 'right',
          bold: true,
          value: (r) => units.cut(r.longPointLength),
        },
        { head: 'End at', bold: true, value: (r) => r.node },
        { head: 'Mitre, °', align: 'right', bold: true, value: (r) => units.angle(r.mitre) },
        { head: 'Bevel, °', align: 'right', bold: true, value: (r) => units.angle(r.bevel) },
        { head: 'Meets', value: (r) => r.against },
      ],
      rows,
    );
}
