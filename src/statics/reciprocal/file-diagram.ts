import type { Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import type { Reciprocal } from '../../model/truss.js';
import type { CellComplex } from './complex.js';
import { memberForces, readPolygons } from './read.js';
import { NOTHING, type ReciprocalResult } from './result.js';
import { settleDiagram } from './settle-diagram.js';
import { signOf } from './sign.js';

/** Forces of the diagram that the truss file gives: read, signed, checked against the form. */
export function fileDiagram(
  topology: Topology,
  job: Job,
  complex: CellComplex,
  reciprocal: Reciprocal,
  given: Float64Array | null,
): ReciprocalResult {
  const { vertices, findings } = fileVertices(complex, reciprocal);
  if (!vertices) return { ...NOTHING, findings };
  const reading = readPolygons(topology, complex, vertices);
  const unsigned = memberForces(topology, complex, reading, reciprocal.newtonPerArea);
  const sign = signOf(unsigned, given, job.forces.sign);
  if (sign === null) return { ...NOTHING, findings: [finding('reciprocal-unsigned', 'truss')] };
  const how = { source: 'file', sign, newtonPerUnit: reciprocal.newtonPerArea } as const;
  return { ...NOTHING, ...settleDiagram(topology, job, complex, vertices, reading, how) };
}

/** The diagram's vertices by cell, or a fault for every cell that has none or two and every vertex without a cell. */
export function fileVertices(
  complex: CellComplex,
  reciprocal: Reciprocal,
): { readonly vertices: readonly Vec3[] | null; readonly findings: readonly Finding[] } {
  const findings: Finding[] = [];
  const at = new Map<string, Vec3>();
  const cells = new Set(complex.cells.map((c) => c.mark));
  for (const vertex of reciprocal.vertices) {
    if (!cells.has(vertex.cell)) findings.push(finding('vertex-of-no-cell', vertex.cell));
    else if (at.has(vertex.cell)) findings.push(finding('vertex-twice', vertex.cell));
    at.set(vertex.cell, vertex.at);
  }
  for (const mark of cells) if (!at.has(mark)) findings.push(finding('vertex-missing', mark));
  if (findings.length > 0) return { vertices: null, findings };
  return { vertices: complex.cells.map((c) => at.get(c.mark)!), findings };
}
