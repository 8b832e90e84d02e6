import type { Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import { axialForces, type Response } from './response.js';

/** Ranks responses: the largest compression of any strut over its Euler load, but for a factor that all share; 0: none is pressed. */
export function nearnessToEuler(topology: Topology, parts: Parts): (response: Response) => number {
  const euler = parts.struts.map(
    (s, e) =>
      ((s.material?.modulus ?? 1) * (s.section ? slenderness(s.section.shape) : 1)) / topology.axisLength[e]! ** 2,
  );
  return (response) => axialForces(response).reduce((most, n, e) => Math.max(most, -n / euler[e]!), 0);
}

/** Fourth power of the section's least side: enough to rank sections by their second moment. */
function slenderness(shape: NonNullable<Parts['struts'][number]['section']>['shape']): number {
  return shape.kind === 'rectangle' ? Math.min(shape.width, shape.height) ** 4 : shape.diameter ** 4;
}
