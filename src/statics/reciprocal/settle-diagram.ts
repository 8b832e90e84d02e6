import { length, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import type { ForceDiagram } from '../../model/force-diagram.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { equilibriumOf, loadsOf } from '../equilibrium.js';
import { assembleDiagram } from './assemble.js';
import type { CellComplex } from './complex.js';
import { judgeReading } from './judge.js';
import { memberForces, type Reading } from './read.js';
import type { DiagramResiduals } from './result.js';

/** A diagram whose vertices, sign and scale are known: its forces, record, residuals and findings. */
export function settleDiagram(
  topology: Topology,
  job: Job,
  complex: CellComplex,
  vertices: readonly Vec3[],
  reading: Reading,
  how: Pick<ForceDiagram, 'source' | 'sign' | 'newtonPerUnit'>,
): {
  readonly forces: Float64Array;
  readonly diagram: ForceDiagram;
  readonly residuals: DiagramResiduals;
  readonly findings: readonly Finding[];
} {
  const forces = memberForces(topology, complex, reading, how.sign * how.newtonPerUnit);
  const equilibrium = equilibriumOf(topology, forces, job.fit);
  const diagram = assembleDiagram(
    topology,
    complex,
    vertices,
    reading,
    how,
    outerForces(topology, equilibrium.reactions),
  );
  return {
    forces,
    diagram,
    residuals: {
      maxAngle: reading.angles.reduce((most, a) => Math.max(most, a), 0),
      maxClosure: diagram.nodes.reduce((most, n) => Math.max(most, length(n.closure)), 0),
      maxResidual: equilibrium.maxResidual,
      maxRelative: equilibrium.maxRelative,
    },
    findings: judgeReading(topology, complex, reading, how.newtonPerUnit, job.fit),
  };
}

/** Load and reaction at every node, N. */
export function outerForces(
  topology: Topology,
  reactions: readonly { readonly node: string; readonly force: Vec3 }[],
): Vec3[] {
  const outer = loadsOf(topology, GIVEN_CASE);
  for (const { node, force } of reactions) {
    const i = topology.nodeIndex.get(node)!;
    outer[i] = [outer[i][0] + force[0], outer[i][1] + force[1], outer[i][2] + force[2]];
  }
  return outer;
}
