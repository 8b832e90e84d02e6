import { length, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { ForceDiagram } from '../../model/force-diagram.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { equilibriumOf, loadsOf } from '../equilibrium.js';
import { givenForces } from '../given-forces.js';
import { assembleDiagram } from './assemble.js';
import { type CellComplex, complexOf, givenCells } from './complex.js';
import { fileVertices } from './file-diagram.js';
import { judgeReading } from './judge.js';
import { faceAngles, memberForces, readPolygons } from './read.js';
import { signOf } from './sign.js';
import { traceCells } from './trace-cells.js';

/** What the reciprocal figure says of a truss. */
export interface ReciprocalResult {
  /** N by member index, tension positive; null where no diagram settles them. */
  readonly forces: Float64Array | null;
  readonly diagram: ForceDiagram | null;
  readonly residuals: DiagramResiduals | null;
  readonly counts: ComplexCounts | null;
  readonly findings: readonly Finding[];
}

/** Largest of each over the whole. */
export interface DiagramResiduals {
  /** Between a strut and the normal of its polygon, rad. */
  readonly maxAngle: number;
  /** Between a face and the jump across it, rad. */
  readonly maxFaceAngle: number;
  /** Sum of a node's area vectors, N. */
  readonly maxClosure: number;
  /** Sum of forces, load and reaction at a node, N; and over the largest force there. */
  readonly maxResidual: number;
  readonly maxRelative: number;
}

export interface ComplexCounts {
  readonly nodes: number;
  readonly edges: number;
  readonly faces: number;
  /** With the unbounded one. */
  readonly cells: number;
}

const NOTHING: ReciprocalResult = { forces: null, diagram: null, residuals: null, counts: null, findings: [] };

/**
 * Forces of a truss from its faces and cells alone: the complex, the diagram of the truss file where it has one, what it
 * says of every strut and node, and the findings. A truss without cells or a diagram, whose job does not ask for one, gives
 * nothing and no findings.
 */
export function reciprocalOf(
  topology: Topology,
  job: Job,
  analysedForces: Float64Array | null = null,
): ReciprocalResult {
  const { truss } = topology;
  const wanted = givenForces(truss).forces ?? analysedForces;
  const asked = job.forces.source === 'reciprocal' || truss.reciprocal !== null || truss.cells.length > 0;
  if (!asked) return NOTHING;
  const cells = truss.cells.length > 0 ? { list: givenCells(topology), findings: [] } : traceCells(topology);
  if (!cells.list) return { ...NOTHING, findings: cells.findings };
  const made = complexOf(topology, cells.list);
  const findings = [...cells.findings, ...made.findings];
  if (!made.complex) return { ...NOTHING, findings };
  const { V: nodes, E: edges, F: faces, C: cellCount } = made.complex.euler;
  const counts = { nodes, edges, faces, cells: cellCount };
  if (!truss.reciprocal) return { ...NOTHING, counts, findings };
  const file = fileVertices(made.complex, truss.reciprocal);
  if (!file.vertices) return { ...NOTHING, counts, findings: [...findings, ...file.findings] };
  return {
    ...readResult(topology, job, made.complex, file.vertices, truss.reciprocal.newtonPerArea, wanted),
    counts,
  };
}

function readResult(
  topology: Topology,
  job: Job,
  complex: CellComplex,
  vertices: readonly Vec3[],
  newtonPerArea: number,
  wanted: Float64Array | null,
): Omit<ReciprocalResult, 'counts'> {
  const reading = readPolygons(topology, complex, vertices);
  const findings = judgeReading(topology, complex, reading, newtonPerArea, job.fit);
  const unsigned = memberForces(topology, complex, reading, newtonPerArea);
  const sign = signOf(unsigned, wanted, job.forces.sign);
  if (sign === null) return { ...NOTHING, findings: [...findings, finding('reciprocal-unsigned', 'truss')] };
  const forces = unsigned.map((t) => sign * t);
  const equilibrium = equilibriumOf(topology, forces, job.fit);
  const reactions = new Map(equilibrium.reactions.map((r) => [r.node, r.force]));
  const outer = loadsOf(topology, GIVEN_CASE).map((p, i): Vec3 => {
    const r = reactions.get(topology.truss.nodes[i].mark);
    return r ? [p[0] + r[0], p[1] + r[1], p[2] + r[2]] : p;
  });
  const diagram = assembleDiagram(
    topology,
    complex,
    vertices,
    reading,
    { source: 'file', sign, newtonPerUnit: newtonPerArea },
    outer,
  );
  const most = (values: Iterable<number>): number => {
    let largest = 0;
    for (const v of values) largest = Math.max(largest, v);
    return largest;
  };
  return {
    forces,
    diagram,
    residuals: {
      maxAngle: most(reading.angles),
      maxFaceAngle: most(faceAngles(topology, complex, vertices)),
      maxClosure: most(diagram.nodes.map((n) => length(n.closure))),
      maxResidual: equilibrium.maxResidual,
      maxRelative: equilibrium.maxRelative,
    },
    findings,
  };
}
