import type { Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { EndDetail, HubPart, Joint, Point2, Socket } from '../../model/parts.js';
import type { Section } from '../../model/section.js';

/** One strut as it arrives at a node, before anything is known of its socket. */
export interface BarEnd {
  readonly strut: string;
  readonly farNode: string;
  /** Unit vector from the node along the strut. */
  readonly direction: Vec3;
  /** Local axes of the section, unit vectors square to `direction`: a rectangle's width along y, height along z. */
  readonly y: Vec3;
  readonly z: Vec3;
  readonly section: Section;
  readonly joint: Joint;
  readonly detail: EndDetail;
  /** What this end asks for besides its node's system; absent: nothing. */
  readonly hold?: 'socket' | 'spigot';
}

/** Two bars nearer to each other than the system can part. */
export interface ClosePair {
  readonly a: string;
  readonly b: string;
  /** rad */
  readonly angle: number;
}

export interface Setbacks {
  /** From the node to each socket's stop in the sockets' order, mm; null where a pair is too close. */
  readonly setbacks: readonly (number | null)[];
  readonly tooClose: readonly ClosePair[];
  /** Struts that would run through a foot's base plate. */
  readonly throughPlate?: readonly string[];
  /** Struts whose section this system has no hole for. */
  readonly notRound?: readonly string[];
  /** Diameter that a drilled ball needs where the job's is too small, mm. */
  readonly ballNeeds?: number;
  /** Edge that a drilled cube needs where the job's is too small, mm. */
  readonly cubeNeeds?: number;
  /** Bores whose rim no cube up to `most` mm takes on one face; `edge` is what they need, null where no size does. */
  readonly offFace?: readonly { readonly strut: string; readonly edge: number | null; readonly most: number }[];
}

/** Material between two parallel planes: points origin + x X + y Y + z (X cross Y) with from <= z <= to, mm. */
export interface Slab {
  readonly origin: Vec3;
  readonly x: Vec3;
  readonly y: Vec3;
  readonly from: number;
  readonly to: number;
}

/** A convex solid as its corners and the pairs of corners that its edges join, in the truss's axes relative to the node, mm. */
export interface ConvexPiece {
  readonly points: readonly Vec3[];
  readonly edges: readonly (readonly [number, number])[];
}

/** How a socket gives between the node and the strut; linear. */
export interface SocketStiffness {
  readonly strut: string;
  /** N/mm along the strut. */
  readonly axial: number;
  /** N mm/rad about the section's local y, its local z, and the strut's axis. */
  readonly aboutY: number;
  readonly aboutZ: number;
  readonly torsion: number;
}

/** The areas through which a socket passes force, for the strength check. mm and mm². */
export interface SocketStrength {
  readonly strut: string;
  /** Section of the sleeve across the strut, less the pin hole. */
  readonly wallArea: number;
  /** Least thickness of that wall. */
  readonly wall: number;
  /** Surface between strut and socket that glue can hold, less vent and pin. */
  readonly bondArea: number;
  /** What a strut in compression stands on. */
  readonly stopArea: number;
  /** Solid section behind the stop. */
  readonly rootArea: number;
  /** Cross pin: diameter, planes of shear, and its projected bearing area in the sleeve; null: none. */
  readonly pin: { readonly diameter: number; readonly shearPlanes: number; readonly bearingArea: number } | null;
  /** Share of the plastic's in-plane strength that is left across layers. */
  readonly acrossLayers: number;
  /** A body round the bore that has no sleeve: the wall area is a section through it. */
  readonly solid?: true;
  /** Screws that hold a parted hub together: how many, sine of the strut's angle to the parting plane, and for each the cylinder of its thread and its head's ring. */
  readonly screws?: ClampScrews;
}

export interface ClampScrews {
  readonly count: number;
  readonly out: number;
  /** mm² */
  readonly threadArea: number;
  readonly headArea: number;
}

/**
 * A way to make node connectors. Everything here is in closed form or by fixed quadrature, in milliseconds and without a mesh:
 * statics, panels and lists rest on it. The solid of a hub is made elsewhere from the same record.
 */
export interface NodeSystem {
  readonly name: string;
  /** In plain words, for papers. */
  readonly title: string;
  /** Name of what its hubs are made from; absent: the job's node material. */
  material?(job: Job): string;
  /** Setbacks follow from the shape itself and cannot be made equal to others: bores that end on one ball. */
  readonly ownSetbacks?: true;
  /** Made by hand from the drilling papers: nothing of it is printed. */
  readonly notPrinted?: true;
  /** Deeper sockets, mm by strut; absent: the depth alone grows, from the stop out. */
  deepen?(hub: HubPart, depths: ReadonlyMap<string, number>, job: Job): HubPart;
  /** Bore, wall, depth and pin of one strut's socket; its setback is still null. */
  socket(bar: BarEnd, job: Job): Socket;
  /** The setbacks that keep every pair of struts at a node apart by the web wanted. */
  setbacks(sockets: readonly Socket[], job: Job): Setbacks;
  /** The hub covered by convex pieces: the body and every sleeve, never smaller than the solid. */
  cover(hub: HubPart, job: Job): readonly ConvexPiece[];
  /** Polygons in the slab's plane, mm, that cover the hub, its pins, screws and ties between the slab's faces; they may overlap. */
  outline(hub: HubPart, slab: Slab, job: Job): readonly (readonly Point2[])[];
  /** kg, within 10 % of the solid's; null where a setback is unknown. */
  mass(hub: HubPart, job: Job): number | null;
  stiffness(hub: HubPart, job: Job): readonly SocketStiffness[];
  strength(hub: HubPart, job: Job): readonly SocketStrength[];
}
