import { normalise, subtract, type Vec3, Z_AXIS } from '../maths/vec3.js';
import type { Job } from '../model/job/index.js';
import type { StrutPart } from '../model/parts.js';
import type { Topology } from '../model/topology.js';
import type { FaceForm } from './faces.js';
import { strutAxes } from './roll.js';

/** Local axes of every strut by the member's index: along it, and turned as the job's `rollFrom` and the member's own roll say. */
export function axesOfStruts(topology: Topology, job: Job, faces: readonly FaceForm[]): readonly StrutPart['axes'][] {
  const { rollFrom } = job.struts;
  const reference: Vec3 = typeof rollFrom === 'string' ? Z_AXIS : rollFrom;
  return topology.truss.members.map((member, i) => {
    const x = normalise(subtract(topology.at(member.ends[1]), topology.at(member.ends[0])));
    const beside = rollFrom === 'faces' ? topology.facesAlong[i]! : [];
    const normals = beside.map((f) => faces[f]?.normal ?? null).filter((n) => n !== null);
    return strutAxes(x, normals, reference, member.roll ?? 0);
  });
}
