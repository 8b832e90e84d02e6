import { FileFault } from '../machine/file-fault.js';
import { kindOf, readText } from '../machine/files.js';
import { sha256 } from '../machine/hash.js';
import { basename, dirname, join } from '../machine/paths.js';
import type { Job } from '../model/job/index.js';
import { LIMITS } from '../model/limits.js';
import type { Truss } from '../model/truss.js';
import { sayFault } from '../readers/fault.js';
import { readJob } from '../readers/job.js';
import { readTruss } from '../readers/truss.js';

/** A file that the pack was made from; the path is relative to the job's folder. */
export interface Input {
  readonly path: string;
  readonly sha256: string;
}

export interface LoadedJob {
  readonly job: Job;
  /** In mm and N as the file has it; the job's scale is applied by the assessment. */
  readonly truss: Truss;
  readonly inputs: readonly Input[];
  /** The folder of the job file. */
  readonly folder: string;
}

/** Up to four bytes a character of UTF-8. */
const MOST_BYTES = 4 * LIMITS.fileCharacters;

/**
 * Reads a job file, or the job.json of a folder, and its truss. Either the loaded job or every fault, one line each;
 * never throws for what a user can get wrong. `files` are those that a mending may change.
 */
export async function loadJob(
  path: string,
): Promise<{ readonly loaded: LoadedJob } | { readonly faults: readonly string[]; readonly files: readonly string[] }> {
  const files: string[] = [];
  const refused = (faults: readonly string[]) => ({ faults, files });
  try {
    files.push(path);
    const jobPath = (await kindOf(path)) === 'folder' ? join(path, 'job.json') : path;
    files.push(jobPath);
    const jobText = await readText(jobPath, MOST_BYTES);
    const { job, faults } = readJob(jobText, jobPath);
    if (!job) return refused(faults.map(sayFault));
    const folder = dirname(jobPath);
    const trussPath = join(folder, job.truss);
    files.push(trussPath);
    const trussText = await readText(trussPath, MOST_BYTES);
    const read = readTruss(trussText, trussPath);
    const all = [...faults, ...read.faults];
    if (!read.truss || all.length > 0) return refused(all.map(sayFault));
    return {
      loaded: {
        job,
        truss: read.truss,
        folder,
        inputs: [
          { path: basename(jobPath), sha256: sha256(jobText) },
          { path: job.truss, sha256: sha256(trussText) },
        ],
      },
    };
  } catch (error) {
    if (error instanceof FileFault) return refused([error.message]);
    throw error;
  }
}
