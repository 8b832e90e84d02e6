import type { Vec3 } from '../../../maths/vec3.js';

/** The test on three struts that alone join two parts of a plane truss. */
export interface Concurrency {
  /** Marks of the three struts. */
  readonly struts: readonly [string, string, string];
  /** How far the line of the third passes from the point where the other two meet, mm; 0 for three parallels. */
  readonly miss: number;
  readonly limit: number;
  /** Where the other two meet, mm; null where they are parallel. */
  readonly point: Vec3 | null;
}
