import { readFileSync } from 'node:fs';
import type { PackRecords } from '../../src/documents/records.js';
import { cross, distance, dot, normalise, subtract, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import type { PanelPart, Point2 } from '../../src/model/parts.js';
import type { Truss } from '../../src/model/truss.js';
import { assess } from '../../src/pipeline/assess.js';
import { readJob } from '../../src/readers/job.js';
import { readTruss } from '../../src/readers/truss.js';
import { analyseTruss } from '../../src/statics/analyse/analyse-truss.js';
import { inventedTruss } from './invented.js';

/** The records of a pack of the invented truss, by the program's own stages; panels are the bare faces. */
export function packRecords(change: Partial<Job> = {}, truss: Truss = inventedTruss()): PackRecords {
  const job: Job = {
    ...defaultJob('Lantern, table model'),
    owner: 'Werkhof Nine (invented)',
    number: 'LN-01',
    drawnBy: 'M. Ferro',
    date: '2026-12-01',
    ...change,
  };
  const assessment = assess(truss, job);
  return {
    ...assessment,
    parts: { ...assessment.parts, panels: barePanels(truss) },
    made: new Map(),
    stock: null,
    nesting: null,
    beds: null,
    assembly: null,
    fitUp: null,
  };
}

/** A committed example of the program, with its analysis. */
export function exampleRecords(
  name: 'canopy' | 'lantern',
  change: (truss: Truss) => Truss = (truss) => truss,
): PackRecords {
  const text = (file: string): string =>
    readFileSync(new URL(`../../examples/${name}/${file}`, import.meta.url), 'utf8');
  const truss = change(readTruss(text('truss.json'), 'truss.json').truss!);
  const records = packRecords(readJob(text('job.json'), 'job.json').job!, truss);
  const { topology, job, parts, forms, forces } = records;
  const { solution } = analyseTruss({ topology, job, parts, forms, given: forces?.values ?? null });
  return { ...records, solution };
}

/** A plane truss that stresses itself: a triangle in a triangle, joined corner to corner, standing upright in x and z. */
export function planeTruss(): Truss {
  const at = (radius: number, k: number): Vec3 => [
    radius * Math.cos((2 * Math.PI * k) / 3),
    0,
    radius * Math.sin((2 * Math.PI * k) / 3),
  ];
  const corner = [0, 1, 2];
  const pairs = [
    ...corner.map((k) => [`A${k}`, `A${(k + 1) % 3}`] as const),
    ...corner.map((k) => [`B${k}`, `B${(k + 1) % 3}`] as const),
    ...corner.map((k) => [`A${k}`, `B${k}`] as const),
  ];
  return {
    nodes: [
      ...corner.map((k) => ({ mark: `A${k}`, at: at(300, k) })),
      ...corner.map((k) => ({ mark: `B${k}`, at: at(120, k) })),
    ],
    members: pairs.map((ends, i) => ({
      mark: `S${i + 1}`,
      ends,
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    })),
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
}

function barePanels(truss: Truss): PanelPart[] {
  const at = new Map(truss.nodes.map((n) => [n.mark, n.at]));
  return truss.faces
    .filter((f) => f.panel)
    .map((face): PanelPart => {
      const [a, b, c] = face.nodes.map((m) => at.get(m)!) as [never, never, never];
      const x = normalise(subtract(b, a));
      const z = normalise(cross(x, subtract(c, a)));
      const y = cross(z, x);
      const outline = face.nodes.map((m): Point2 => {
        const d = subtract(at.get(m)!, a);
        return [dot(d, x), dot(d, y)];
      });
      return {
        mark: face.mark,
        face: face.mark,
        group: face.group,
        material: null,
        thickness: 3,
        seating: 'between',
        flatness: 0,
        frame: { origin: a, x, y, z },
        outline,
        holes: [],
        edges: face.nodes.map((from, i) => {
          const to = face.nodes[(i + 1) % face.nodes.length]!;
          return {
            length: distance(at.get(from)!, at.get(to)!),
            from,
            to,
            strut: null,
            neighbour: null,
            dihedral: null,
            bevel: 0,
            inset: 0,
          };
        }),
        engraving: [],
        area: 1000,
        mass: null,
        holding: 'none',
        makeable: true,
      };
    });
}
