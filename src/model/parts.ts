import type { Vec3 } from '../maths/vec3.js';
import type { Material } from './material.js';
import type { Section } from './section.js';

/** A point in a plane, mm. */
export type Point2 = readonly [number, number];

/** How a strut end passes force into its node. */
export type Joint = 'glued' | 'pinned' | 'seated' | 'loose';
/** How a strut end gets into its node. */
export type EndDetail = 'plain' | 'drop-in' | 'slide';

/** One end of a strut. axis = setbacks + floats + cut. Unknown numbers are null, never zero. */
export interface StrutEnd {
  readonly node: string;
  /** From the node to the socket's stop, mm. */
  readonly setback: number | null;
  /** From the stop to the strut's end, mm. */
  readonly float: number | null;
  readonly detail: EndDetail;
}

export interface StrutPart {
  readonly mark: string;
  readonly section: Section | null;
  readonly material: Material | null;
  readonly group: string | null;
  /** [from, to], as the member's ends. */
  readonly ends: readonly [StrutEnd, StrutEnd];
  readonly axisLength: number;
  /** Rounded down to the saw's step; null where a node at an end could not be made. */
  readonly cutLength: number | null;
  /** Local axes, unit vectors: x from "from" to "to", y, z = x cross y; roll is in them. */
  readonly axes: { readonly x: Vec3; readonly y: Vec3; readonly z: Vec3 };
  /** kg; null where the cut length is unknown. */
  readonly mass: number | null;
  /** What a shared stop setting adds to the length that the strut would have of its own, mm; absent: stops are not shared. */
  readonly misfit?: number;
}

/** A slotted strut end bolted to a plate of the hub. Bolts stand in one row along the strut, in the middle of its depth; mm. */
export interface BoltedEnd {
  /** Thickness of the hub's plate and width of the slot that takes it. */
  readonly plate: number;
  readonly slot: number;
  readonly bolts: number;
  readonly diameter: number;
  /** Between bolts; 0 for one. */
  readonly spacing: number;
  /** From the strut's end to the nearest bolt. */
  readonly endDistance: number;
  /** From the plate's end, inside the strut, to the nearest bolt. */
  readonly plateEnd: number;
  /** Which of the section's axes the bolts run along. */
  readonly along: 'y' | 'z';
}

/** One socket (or spigot, or bore) of a hub, in the truss's axes. */
export interface Socket {
  readonly strut: string;
  readonly farNode: string;
  /** Unit vector from the node along the strut. */
  readonly direction: Vec3;
  /** Section's local y and z at this end, unit vectors square to `direction`. */
  readonly y: Vec3;
  readonly z: Vec3;
  readonly section: Section;
  /** From the node to the stop, mm; null where none could be found. */
  readonly setback: number | null;
  /** From the stop to the mouth, mm. */
  readonly depth: number;
  /** Clear size of the bore: diameter of a round one, [width, height] of a rectangular one, mm. */
  readonly bore: number | readonly [number, number];
  /** Wall of the sleeve, mm. */
  readonly wall: number;
  readonly joint: Joint;
  readonly detail: EndDetail;
  /** Cross pin, mm; 0: none. */
  readonly pin: number;
  /** Where the strut's end is slotted and bolted instead of standing in a sleeve. */
  readonly bolted?: BoltedEnd;
  /** How the hub holds the strut; absent: a sleeve round it. A spigot goes into a tube and a plate into a slot: `bore` is then their own size. */
  readonly form?: 'sleeve' | 'spigot' | 'plate';
  /** How far the strut can slide in beyond its place, mm, where the detail is a slide; absent: 0. */
  readonly travel?: number;
  /** Depth that a tilted face takes from the mouth's shallow side, in `depth` and holding nothing, mm; absent: 0. */
  readonly shallow?: number;
}

/** A node connector as numbers. Its solid is made from these alone. */
export interface HubPart {
  readonly mark: string;
  readonly at: Vec3;
  readonly system: string;
  /** Outward direction at the node (away from the truss's middle), unit; for the outward mark. */
  readonly outward: Vec3;
  /** Up, for the up-mark; absent: the truss's z. */
  readonly up?: Vec3;
  readonly sockets: readonly Socket[];
  /** kg, in closed form; null where a setback is unknown. */
  readonly mass: number | null;
  readonly material: Material;
  /** false where a stop names the node as not makeable; it keeps its row in every list. */
  readonly makeable: boolean;
  /** Revision letter of the part's own last change. */
  readonly revision: string;
}

/** One edge of a panel, in the outline's order. */
export interface PanelEdge {
  /** Node-to-node length, mm. */
  readonly length: number;
  readonly from: string;
  readonly to: string;
  readonly strut: string | null;
  /** Face on the other side of that strut that is a panel too. */
  readonly neighbour: string | null;
  /** Angle between the two panels' planes inside the solid, rad; pi: flat. null: no neighbour. */
  readonly dihedral: number | null;
  /** Tilt of the edge from square, rad; 0: square. */
  readonly bevel: number;
  /** From the strut's axis to the panel's edge, in the panel's plane, mm. */
  readonly inset: number;
  /** Where the outline runs along this edge, in the panel's frame, mm; absent: corner cuts left nothing of it. */
  readonly side?: readonly [Point2, Point2];
}

/** Right-handed axes of a panel: p = origin + x X + y Y; z to the panel's outside. */
export interface PanelFrame {
  readonly origin: Vec3;
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
}

/** A stroke engraved on a panel, in its frame, mm. */
export type Polyline2 = readonly Point2[];

export interface PanelPart {
  readonly mark: string;
  readonly face: string;
  readonly group: string | null;
  readonly material: Material | null;
  readonly thickness: number;
  readonly seating: 'between' | 'over' | 'under';
  /** Largest distance of the face's nodes from their least-squares plane, mm. */
  readonly flatness: number;
  readonly frame: PanelFrame;
  /** Nominal outline, anticlockwise seen from outside, first point not repeated; empty where none is written. */
  readonly outline: readonly Point2[];
  readonly holes: readonly (readonly Point2[])[];
  readonly edges: readonly PanelEdge[];
  /** Engraved strokes: mark, outward side, one edge's strut, up. */
  readonly engraving: readonly Polyline2[];
  readonly area: number;
  /** kg */
  readonly mass: number | null;
  /** What holds it, in words. */
  readonly holding: string;
  readonly makeable: boolean;
  readonly hold?: PanelHold;
  /** Score line in the frame and the angle it is folded by, rad, positive towards the inside; only of a folded panel. */
  readonly fold?: { readonly from: Point2; readonly to: Point2; readonly angle: number };
  /** Largest bending stress of a sheet bent cold onto a face out of flat, MPa. */
  readonly bendStress?: number;
}

/** What holds a panel in its place. N; null: not stated. Infinity: carried by the struts themselves. */
export interface PanelHold {
  readonly by: 'channel' | 'clips' | 'ties' | 'stand-offs' | 'none';
  readonly fixings: number;
  /** How far a channel or clip still reaches over the panel once it has moved, mm. */
  readonly bite: number | null;
  /** Evenly spread load that it bears towards the struts' inside, N; Infinity: the struts carry it; null: not stated. */
  readonly pressure: number | null;
  /** The same away from it. */
  readonly suction: number | null;
}

/** Everything that is made, as numbers, in the truss's order. */
export interface Parts {
  readonly struts: readonly StrutPart[];
  readonly hubs: readonly HubPart[];
  readonly panels: readonly PanelPart[];
}
