import { largest, type Sleeve, sleevesOf } from '../detailing/systems/sleeve.js';
import { bodyHull } from '../detailing/systems/sleeve-cover.js';
import { insidePath, insidePlanes, insideSleeve } from '../detailing/systems/sleeve-inside.js';
import type { Vec3 } from '../maths/vec3.js';
import type { Socket } from '../model/parts.js';

/** The body's index among a hub's pieces; a sleeve has its own. */
export const BODY = -1;

/** A hub as room: where its pieces and the struts' paths are. Relative to the node, mm. */
export class HubSpace {
  readonly sleeves: readonly Sleeve[];
  /** Farthest that any piece reaches from the node. */
  readonly reach: number;
  private readonly planes: Float64Array;

  constructor(sockets: readonly Socket[]) {
    this.sleeves = sleevesOf(sockets);
    this.planes = bodyHull(this.sleeves)?.planes ?? new Float64Array(0);
    this.reach = Math.max(0, ...this.sleeves.map((s) => Math.hypot(s.mouth, largest(s.cone) * Math.SQRT2)));
  }

  /** Pieces that a point is in, or within `margin` of. */
  piecesAt(p: Vec3, margin = 0, except?: number): number[] {
    const found: number[] = [];
    if (insidePlanes(this.planes, p, margin)) found.push(BODY);
    this.sleeves.forEach((s, i) => {
      if (i !== except && insideSleeve(s, p, margin)) found.push(i);
    });
    return found;
  }

  free(p: Vec3, margin: number, except: number): boolean {
    if (insidePlanes(this.planes, p, margin)) return false;
    return !this.sleeves.some((s, i) => i !== except && insideSleeve(s, p, margin));
  }

  /** Whether a point is clear of every strut's path but one by `margin`. */
  clearOfPaths(p: Vec3, margin: number, except: number): boolean {
    return !this.sleeves.some((s, i) => i !== except && insidePath(s, p, margin));
  }
}
