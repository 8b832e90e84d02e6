import { axesOfStruts } from '../../src/detailing/axes.js';
import { faceForms } from '../../src/detailing/faces.js';
import { detailHubs } from '../../src/detailing/hubs.js';
import { sectionsOf } from '../../src/detailing/sections.js';
import { detailStruts } from '../../src/detailing/struts.js';
import type { PackRecords } from '../../src/documents/records.js';
import { cross, distance, dot, normalise, subtract } from '../../src/maths/vec3.js';
import { settleFindings } from '../../src/model/hold.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import type { PanelPart, Point2 } from '../../src/model/parts.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { equilibriumOf } from '../../src/statics/equilibrium.js';
import { judge } from '../../src/strength/judge.js';
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
  const topology = topologyOf(truss);
  const sections = sectionsOf(truss, job);
  const faces = faceForms(topology, { flatnessWarn: job.fit.flatnessWarn_mm, flatnessStop: null });
  const axes = axesOfStruts(topology, job, faces.forms);
  const hubs = detailHubs(topology, job, sections.sections, axes);
  const struts = detailStruts(topology, job, sections.sections, axes, hubs.hubs);
  const forces = Float64Array.from(truss.members.map((m) => m.force ?? 0));
  const equilibrium = equilibriumOf(topology, forces, job.fit);
  const parts = { struts: struts.struts, hubs: hubs.hubs, panels: barePanels(truss) };
  const solution = {
    counts: null,
    cases: [{ name: 'given', kind: 'given' as const, forces, displacements: null, reactions: [] }],
    combinations: [],
    actions: truss.members.map((_, i) => [
      {
        combination: 'given',
        axial: forces[i]!,
        shearY: 0,
        shearZ: 0,
        momentY: 0,
        momentZ: 0,
        torsion: 0,
        duration: 'permanent' as const,
      },
    ]),
    buckling: [],
    solveResidual: null,
    checked: [],
    notChecked: ['stability'],
  };
  const judged = judge(truss, parts, { forces: null, solution }, job);
  const found = [
    ...faces.findings,
    ...sections.findings,
    ...hubs.findings,
    ...struts.findings,
    ...equilibrium.findings,
    ...judged.findings,
  ];
  const notChecked = ['stability', ...judged.notChecked];
  return {
    job,
    topology,
    forms: faces.forms,
    parts,
    forces: { source: 'given', values: forces },
    equilibrium,
    solution,
    utilisations: judged.utilisations,
    ...settleFindings(found, job, notChecked),
    checked: ['equilibrium', 'flatness', ...judged.checked],
    notChecked,
    found,
    made: new Map(),
    stock: null,
    nesting: null,
    reciprocal: null,
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
