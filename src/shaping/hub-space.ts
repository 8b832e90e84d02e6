import type { HubShape } from '../detailing/systems/hub-shape.js';
import { largest, type Sleeve } from '../detailing/systems/sleeve.js';
import { bodyHull } from '../detailing/systems/sleeve-cover.js';
import { insidePath, insidePlanes, insideSleeve } from '../detailing/systems/sleeve-inside.js';
import type { Vec3 } from '../maths/vec3.js';

/** The body's index among a hub's pieces; a sleeve has its own. */
export const BODY = -1;

/** A hub as room: where its pieces and the struts' paths are. Relative to the node, mm. */
export class HubSpace {
  readonly sleeves: readonly Sleeve[];
  /** Farthest that any piece reaches from the node. */
  readonly reach: number;
  private readonly planes: Float64Array;

  constructor(readonly shape: HubShape) {
    this.sleeves = shape.sleeves;
    this.planes = bodyHull(shape)?.planes ?? new Float64Array(0);
    const { base } = shape;
    this.reach = Math.max(
      base ? Math.hypot(base.radius, base.top - base.thickness) : 0,
      ...this.sleeves.map((s) => Math.hypot(s.mouth, largest(s.cone) * Math.SQRT2)),
    );
  }

  /** Pieces that a point is in, or within `margin` of. */
  piecesAt(p: Vec3, margin = 0, except?: number): number[] {
    const found: number[] = [];
    if (insidePlanes(this.planes, p, margin) || this.inPlate(p, margin)) found.push(BODY);
    this.sleeves.forEach((s, i) => {
      if (i !== except && insideSleeve(s, p, margin)) found.push(i);
    });
    return found;
  }

  free(p: Vec3, margin: number, except: number): boolean {
    if (insidePlanes(this.planes, p, margin) || this.inPlate(p, margin)) return false;
    return !this.sleeves.some((s, i) => i !== except && insideSleeve(s, p, margin));
  }

  /** In what is beside body and sleeves: a foot's plate, a clamp's arms. */
  private inPlate(p: Vec3, margin: number): boolean {
    const { base, clamp } = this.shape;
    if (clamp?.arms.some((arm) => insidePlanes(arm.planes, p, margin))) return true;
    if (!base || p[2] > base.top + margin || p[2] < base.top - base.thickness - margin) return false;
    return Math.hypot(p[0], p[1]) < base.radius + margin;
  }

  /** Whether a point is clear of every strut's path but one by `margin`. */
  clearOfPaths(p: Vec3, margin: number, except: number): boolean {
    return !this.sleeves.some((s, i) => i !== except && insidePath(s, p, margin));
  }
}
