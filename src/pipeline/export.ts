import type { Assessment } from '../documents/records.js';
import { writeTrussDxf } from '../documents/truss/truss-dxf.js';
import { writeTrussIfc } from '../documents/truss/truss-ifc.js';
import { writeTrussJson } from '../documents/truss/truss-json.js';
import { writeTrussObj } from '../documents/truss/truss-obj.js';
import { FileFault } from '../machine/file-fault.js';
import { writeOne } from '../machine/files.js';
import { assess } from './assess.js';
import { loadJob } from './load.js';

/** How the truss is written, by the ending of the file's name. */
const WRITERS: ReadonlyMap<string, (a: Assessment) => string> = new Map<string, (a: Assessment) => string>([
  ['ifc', writeTrussIfc],
  ['dxf', (a) => writeTrussDxf(a.topology.truss)],
  ['obj', (a) => writeTrussObj(a.topology.truss)],
  ['json', (a) => writeTrussJson(a.topology.truss)],
]);

/** Writes the truss of a job, at the job's scale, for other programs. Gives what kept it from being written, one line each. */
export async function exportJob(jobPath: string, out: string, replace: boolean): Promise<readonly string[]> {
  const write = WRITERS.get(/\.([a-z]+)$/i.exec(out)?.[1]?.toLowerCase() ?? '');
  if (!write) return [`${out}: is of an unknown kind: end it in ${[...WRITERS.keys()].map((k) => `.${k}`).join(', ')}`];
  const read = await loadJob(jobPath);
  if ('faults' in read) return read.faults;
  try {
    await writeOne(out, write(assess(read.loaded.truss, read.loaded.job)), replace);
    return [];
  } catch (error) {
    if (error instanceof FileFault) return [error.message];
    throw error;
  }
}
