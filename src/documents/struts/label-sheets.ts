import type { Job } from '../../model/job/index.js';

/** A sheet of stick-on labels, mm: common practice, no source (sizes as sold by many makers). */
export interface LabelSheet {
  readonly width: number;
  readonly height: number;
  readonly across: number;
  readonly down: number;
  readonly label: { readonly width: number; readonly height: number };
  /** Upper left corner of the first label. */
  readonly left: number;
  readonly top: number;
  /** From one label to the next. */
  readonly pitch: readonly [number, number];
}

export const LABEL_SHEETS: Readonly<Record<Job['output']['labels'], LabelSheet>> = {
  'A4-3x8': {
    width: 210,
    height: 297,
    across: 3,
    down: 8,
    label: { width: 70, height: 37 },
    left: 0,
    top: 0.5,
    pitch: [70, 37],
  },
  'A4-3x7': {
    width: 210,
    height: 297,
    across: 3,
    down: 7,
    label: { width: 63.5, height: 38.1 },
    left: 7.2,
    top: 15.15,
    pitch: [66.05, 38.1],
  },
  'Letter-3x10': {
    width: 215.9,
    height: 279.4,
    across: 3,
    down: 10,
    label: { width: 66.675, height: 25.4 },
    left: 4.7625,
    top: 12.7,
    pitch: [69.85, 25.4],
  },
};
