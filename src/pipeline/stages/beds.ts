import type { PackedObject } from '../../documents/formats/three-mf.js';
import { bedFile } from '../../documents/nodes/bed-file.js';
import { bedPicture } from '../../documents/nodes/bed-picture.js';
import type { PlanImage } from '../../documents/nodes/piece-pictures.js';
import { deflateBlocks } from '../../machine/deflate.js';
import type { Spool } from '../../machine/memory-spool.js';
import type { Job } from '../../model/job/index.js';
import type { BedPlan } from '../../model/plan.js';
import { printersOf } from '../../model/printers.js';
import { type PrintPiece, planBeds } from '../../planning/beds/plan-beds.js';
import type { PackWriter } from '../pack-writer.js';
import { type PieceView, planOf } from './piece-view.js';

/** A piece of a hub that is sound, packed for a bed file. */
export interface PrintablePiece extends PrintPiece {
  readonly footprint: PieceView['footprint'];
  /** Its object and its picture from above, from wherever they were put away. */
  load(): Promise<LoadedPiece>;
}

export interface LoadedPiece {
  readonly object: PackedObject;
  readonly plan: PlanImage;
}

/** Puts a piece's object and picture away, so that thousands do not fill the memory until their bed is written. */
export async function putAway(object: PackedObject, view: PieceView, spool: Spool): Promise<PrintablePiece['load']> {
  const bytes = await spool.put(object.bytes);
  const icon = object.icon && (await spool.put(object.icon));
  const blocks = await spool.put(view.plan.blocks);
  const { width, depth } = view.plan;
  const rest = { ...object, bytes: EMPTY, icon: null };
  return async () => ({
    object: { ...rest, bytes: await bytes(), icon: icon && (await icon()) },
    plan: planOf({ width, depth, blocks: await blocks() }),
  });
}

const EMPTY = new Uint8Array(0);

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
  const plan = planBeds(pieces, printersOf(job));
  const byName = new Map(pieces.map((p) => [`${p.mark} ${p.piece}`, p]));
  for (const bed of plan.beds) {
    const loaded = new Map<string, LoadedPiece>();
    for (const { mark, piece } of bed.items) {
      const key = `${mark} ${piece}`;
      loaded.set(key, await byName.get(key)!.load());
    }
    const objectOf = (mark: string, piece: string) => {
      const key = `${mark} ${piece}`;
      return { object: loaded.get(key)!.object, depth: byName.get(key)!.box[1] };
    };
    const imageOf = (mark: string, piece: string) => loaded.get(`${mark} ${piece}`)!.plan;
    const picture = bedPicture(bed, imageOf, deflateBlocks);
    await writer.put(`${path}${bed.mark}.3mf`, bedFile(bed, objectOf, job.title, job.date, deflateBlocks, picture));
  }
  return plan;
}
