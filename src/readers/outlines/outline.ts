import type { Point2 } from '../../model/parts.js';
import type { Fault } from '../fault.js';

/** A flat panel as a file gives it; mm. */
export interface ReadOutline {
  readonly mark: string;
  readonly outline: readonly Point2[];
  readonly holes: readonly (readonly Point2[])[];
  readonly quantity: number;
  /** Degrees; absent: as the caller says. */
  readonly rotations?: readonly number[];
}

export interface OutlinesReading {
  readonly outlines: readonly ReadOutline[];
  readonly faults: readonly Fault[];
  /** What was left out, by kind, with how many. */
  readonly leftOut: ReadonlyMap<string, number>;
}

/** Largest distance of a chord from the curve that it stands for, mm. */
export const CHORD_ERROR = 0.01;
