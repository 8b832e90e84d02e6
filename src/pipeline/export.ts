import { forcesCsv } from '../documents/forces/forces-csv.js';
import type { Assessment } from '../documents/records.js';
import { displacementsCsv } from '../documents/results/displacements-csv.js';
import { findingsCsv } from '../documents/results/findings-csv.js';
import { reactionsCsv } from '../documents/results/reactions-csv.js';
import { writeTrussDxf } from '../documents/truss/truss-dxf.js';
import { writeTrussIfc } from '../documents/truss/truss-ifc.js';
import { writeTrussJson } from '../documents/truss/truss-json.js';
import { writeTrussObj } from '../documents/truss/truss-obj.js';
import { FileFault } from '../machine/file-fault.js';
import { kindOf } from '../machine/files.js';
import { join } from '../machine/paths.js';
import { writeOne } from '../machine/write-one.js';
import { assess } from './assess.js';
import { loadJob } from './load.js';

type Write = (a: Assessment) => string | Uint8Array;

/** Every file of an export into a folder: the truss for other programs, then what was reckoned, as tables. */
const FILES: ReadonlyMap<string, Write> = new Map<string, Write>([
  ['truss.ifc', writeTrussIfc],
  ['truss.dxf', (a) => writeTrussDxf(a.topology.truss)],
  ['truss.obj', (a) => writeTrussObj(a.topology.truss)],
  ['truss.json', (a) => writeTrussJson(a.topology.truss)],
  ['forces.csv', forcesCsv],
  ['displacements.csv', displacementsCsv],
  ['reactions.csv', reactionsCsv],
  ['findings.csv', findingsCsv],
]);

/** A single file is written by its own name where that is one of these, else by its ending: a .csv holds the forces. */
function writerOf(out: string): Write | null {
  const name = /[^/\\]*$/.exec(out)![0].toLowerCase();
  const ending = /\.[a-z]+$/.exec(name)?.[0] ?? '';
  const known = FILES.get(name) ?? [...FILES].find(([file]) => file.endsWith(ending))?.[1];
  return (ending !== '' && known) || null;
}

/**
 * Writes the truss of a job, at the job's scale, and its results for other programs: one file by its name's ending, or all of them
 * into a folder. Gives the files written, or what kept them from being written, one line each; then nothing is written.
 */
export async function exportJob(
  jobPath: string,
  out: string,
  replace: boolean,
): Promise<{ readonly written: readonly string[] } | { readonly faults: readonly string[] }> {
  try {
    const folder = (await kindOf(out)) === 'folder' || !/\.[^./\\]+$/.test(out);
    const write = folder ? null : writerOf(out);
    if (!folder && !write) return { faults: [`${out}: is of an unknown kind: ${KINDS}`] };
    const read = await loadJob(jobPath);
    if ('faults' in read) return read;
    const files: readonly (readonly [string, Write])[] = write
      ? [[out, write]]
      : [...FILES].map(([name, w]) => [join(out, name), w]);
    if (!replace) {
      const there = await Promise.all(files.map(async ([path]) => ((await kindOf(path)) === null ? null : path)));
      const faults = there.filter((path) => path !== null);
      if (faults.length > 0) return { faults: faults.map((path) => `${path}: is there already: ${MAY_REPLACE}`) };
    }
    const assessed = assess(read.loaded.truss, read.loaded.job);
    // Everything is made before anything is written.
    const made = files.map(([path, w]) => [path, w(assessed)] as const);
    for (const [path, content] of made) await writeOne(path, content, replace);
    return { written: files.map(([path]) => path) };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}

const ENDINGS = [...new Set([...FILES.keys()].map((name) => /\.[a-z]+$/.exec(name)![0]))];
const KINDS = `end it in ${ENDINGS.join(', ')}, or give a folder for all of them`;
const MAY_REPLACE = 'choose another name, or replace it with --force';
