import type { Job } from '../../src/model/job/index.js';
import type { HubPart } from '../../src/model/parts.js';
import type { ShapedHub } from '../../src/model/shaped.js';

export interface RandomHub {
  readonly job: Job;
  readonly hub: HubPart;
}
export function randomHub(
  seed: number,
  special?: {
    system?: string;
    details?: readonly string[];
    count?: number;
    least?: number;
    nodes?: Readonly<Record<string, unknown>>;
  },
): RandomHub;
export function checkHub(
  made: RandomHub,
  options?: { cross?: boolean; samples?: number },
): Promise<{
  readonly faults: readonly string[];
  readonly shaped: ShapedHub;
  readonly bytes?: Uint8Array;
  readonly volume?: number;
  readonly closedForm?: number;
  readonly triangles?: number;
}>;
