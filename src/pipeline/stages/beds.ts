import type { PackedObject } from '../../documents/formats/three-mf.js';
import { bedFile } from '../../documents/nodes/bed-file.js';
import { bedPicture } from '../../documents/nodes/bed-picture.js';
import { deflateBlocks } from '../../machine/deflate.js';
import type { Job } from '../../model/job/index.js';
import type { BedPlan } from '../../model/plan.js';
import { printersOf } from '../../model/printers.js';
import { type PrintPiece, planBeds } from '../../planning/beds/plan-beds.js';
import type { PackWriter } from '../pack-writer.js';
import { type PieceView, planOf } from './piece-view.js';

/** A piece of a hub that is sound, packed for a bed file. */
export interface PrintablePiece extends PrintPiece {
  readonly object: PackedObject;
  readonly view: PieceView;
}

/** Arranges the pieces on the job's printers and writes a 3MF file a bed. */
export const writeBeds = (pieces: readonly PrintablePiece[], job: Job, writer: PackWriter): Promise<BedPlan> =>
  writeBedFiles(pieces, job, 'nodes/beds/', writer);

/** The same with `path` before each bed's mark. */
export async function writeBedFiles(
  pieces: readonly PrintablePiece[],
  job: Job,
  path: string,
  writer: PackWriter,
): Promise<BedPlan> {
  const plan = planBeds(
    pieces.map((p) => ({ ...p, footprint: p.view.footprint })),
    printersOf(job),
  );
  const byName = new Map(pieces.map((p) => [`${p.mark} ${p.piece}`, p]));
  for (const bed of plan.beds) {
    const objectOf = (mark: string, piece: string) => {
      const { object, box } = byName.get(`${mark} ${piece}`)!;
      return { object, depth: box[1] };
    };
    const imageOf = (mark: string, piece: string) => planOf(byName.get(`${mark} ${piece}`)!.view);
    const picture = bedPicture(bed, imageOf, deflateBlocks);
    await writer.put(`${path}${bed.mark}.3mf`, bedFile(bed, objectOf, job.title, job.date, deflateBlocks, picture));
  }
  return plan;
}
