import type { Job } from '../../model/job/index.js';
import type { HubPart, PanelPart, Point2, StrutPart } from '../../model/parts.js';
import type { Section } from '../../model/section.js';
import type { Topology } from '../../model/topology.js';
import type { FaceForm } from '../faces.js';

/** A hub's outline between two heights over a panel's plane, as polygons in the panel's frame, mm; they may overlap. */
export type HubOutline = (
  hub: HubPart,
  slab: {
    readonly origin: PanelPart['frame']['origin'];
    readonly x: PanelPart['frame']['x'];
    readonly y: PanelPart['frame']['y'];
    readonly from: number;
    readonly to: number;
  },
) => readonly (readonly Point2[])[];

/** What every panel of a truss is made from. */
export interface PanelSetting {
  readonly topology: Topology;
  readonly job: Job;
  /** By the face's index. */
  readonly forms: readonly FaceForm[];
  /** By the member's index. */
  readonly sections: readonly (Section | null)[];
  readonly axes: readonly StrutPart['axes'][];
  readonly hubs: readonly HubPart[];
  readonly hubOutline: HubOutline;
}
