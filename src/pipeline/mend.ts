import { withMending } from '../documents/truss/with-mending.js';
import { FileFault } from '../machine/file-fault.js';
import { kindOf, readText } from '../machine/files.js';
import { join } from '../machine/paths.js';
import { defaultJob, type Job } from '../model/job/index.js';
import { LIMITS } from '../model/limits.js';
import { scaleTruss } from '../model/scale-truss.js';
import { topologyOf } from '../model/topology.js';
import type { Truss } from '../model/truss.js';
import { sayFault } from '../readers/fault.js';
import { readTruss } from '../readers/truss.js';
import { type Mended, type MendOptions, mend } from '../statics/mend/mend.js';
import { reciprocalOf } from '../statics/reciprocal/reciprocal.js';
import { loadJob } from './load.js';

/** A mended truss and the text of its file, null where mending was refused. */
export interface MendedFile {
  readonly mended: Mended;
  readonly text: string | null;
}

/**
 * Mends the truss of a job (a file or the folder of job.json), or a truss file by itself, in mm and N as built: with the job's scale. Forces
 * are those of the file or, where it has none, of the reciprocal figure. Either the outcome or every fault, one line each.
 */
export async function mendFile(
  path: string,
  options: MendOptions,
): Promise<MendedFile | { readonly faults: readonly string[] }> {
  try {
    const loaded = await loadEither(path);
    if ('faults' in loaded) return loaded;
    const { text, job } = loaded;
    const truss = scaleTruss(loaded.truss, job);
    const unknown = (options.keep ?? []).filter((mark) => !truss.nodes.some((n) => n.mark === mark));
    if (unknown.length > 0)
      return { faults: unknown.map((mark) => `--keep names ${mark}, which is no node of the truss`) };
    const given = truss.members.every((m) => m.force !== null);
    const forces = options.forces ?? (given ? null : reciprocalOf(topologyOf(truss), job).forces);
    if (options.what && options.what !== 'flatness' && !given && !forces) {
      return { faults: [`${path}: has no member forces to balance: give forces, or mend --flatness alone`] };
    }
    const mended = mend(truss, { ...options, forces });
    return {
      mended,
      text: mended.done ? withMending(text, truss, mended.truss, job.scale, job.forceScale) : null,
    };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}

const MOST_BYTES = 4 * LIMITS.fileCharacters;

async function loadEither(
  path: string,
): Promise<
  { readonly truss: Truss; readonly job: Job; readonly text: string } | { readonly faults: readonly string[] }
> {
  if ((await kindOf(path)) === 'file') {
    const text = await readText(path, MOST_BYTES);
    if (/"format"\s*:\s*"strutwright-truss\//.test(text)) {
      const { truss, faults } = readTruss(text, path);
      return truss && faults.length === 0 ? { truss, job: defaultJob(), text } : { faults: faults.map(sayFault) };
    }
  }
  const result = await loadJob(path);
  if ('faults' in result) return result;
  const { truss, job, folder } = result.loaded;
  return { truss, job, text: await readText(join(folder, job.truss), MOST_BYTES) };
}
