import type { Job } from '../../model/job/index.js';

export type Orientation = 'upright' | 'wide';

/** Width and height of a sheet in mm: ISO 216 and ANSI/ASME Y14.1 (letter, 8.5 x 11 in). */
export interface PageSize {
  readonly width: number;
  readonly height: number;
}

const UPRIGHT: Readonly<Record<Job['output']['paper'], PageSize>> = {
  A4: { width: 210, height: 297 },
  A3: { width: 297, height: 420 },
  Letter: { width: 215.9, height: 279.4 },
};

/** Size of a sheet of the job's paper. A3 lies on its long side unless asked otherwise (ISO 5457). */
export function pageSize(paper: Job['output']['paper'], orientation?: Orientation): PageSize {
  const { width, height } = UPRIGHT[paper];
  const wide = orientation === undefined ? paper === 'A3' : orientation === 'wide';
  return wide ? { width: height, height: width } : { width, height };
}

/** Free edge round a sheet, mm: what cheap printers leave white, and a finger's hold. */
export const MARGIN = 10;
