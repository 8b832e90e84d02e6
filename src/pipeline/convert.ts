import { writeTrussJson } from '../documents/truss/truss-json.js';
import { FileFault } from '../machine/file-fault.js';
import { kindOf, readBytes, readText } from '../machine/files.js';
import { dirname, join } from '../machine/paths.js';
import { writeOne } from '../machine/write-one.js';
import { LIMITS } from '../model/limits.js';
import type { RawGeometry, RawReading, UpAxis } from '../model/raw-geometry.js';
import type { LengthUnit } from '../model/units.js';
import { type Converted, convertGeometry } from '../readers/convert/convert.js';
import { readMarkMemory, writeMarkMemory } from '../readers/convert/mark-memory.js';
import { type Fault, sayFault } from '../readers/fault.js';
import { readCsv, readPairForces } from '../readers/geometry/csv.js';
import { readDxf } from '../readers/geometry/dxf.js';
import { readObj } from '../readers/geometry/obj.js';
import { readPly } from '../readers/geometry/ply.js';
import { readTruss } from '../readers/truss.js';

/** What `convert` is asked for. */
export interface ConvertCall {
  readonly file: string;
  /** Table of struts beside a table of nodes. */
  readonly members: string | null;
  /** Table of forces by node pair. */
  readonly forces: string | null;
  readonly out: string;
  readonly unit: LengthUnit | null;
  readonly up: UpAxis | null;
  readonly merge: number | null;
  readonly split: boolean;
  readonly findFaces: boolean;
  readonly panels: boolean;
  /** Whether a truss file that stands at `out` is replaced. */
  readonly replace: boolean;
}

export type ConvertOutcome =
  | { readonly faults: readonly string[] }
  | {
      readonly converted: Converted;
      readonly unit: LengthUnit;
      readonly fileUnit: LengthUnit | null;
      readonly marks: string;
    };

const MOST_BYTES = 4 * LIMITS.fileCharacters;
const MARKS_FILE = 'job.marks.json';

/** Reads a drawing, mesh or table, and writes it as a truss file beside the memory of its marks; or every fault, one line each. */
export async function convertFile(call: ConvertCall): Promise<ConvertOutcome> {
  try {
    const reading = await readGeometry(call);
    if (!reading.geometry) return { faults: reading.faults.map(sayFault) };
    const { geometry } = reading;
    const asked = [
      ...((call.unit ?? geometry.unit) ? [] : [`${call.file}: does not say its unit: give --unit mm, cm, m, in or ft`]),
      ...((call.up ?? geometry.up) ? [] : [`${call.file}: does not say which way is up: give --up y or --up z`]),
      ...tooMany(call.file, geometry),
      ...(await mayReplace(call)),
    ];
    const forces = call.forces
      ? readPairForces(await readText(call.forces, MOST_BYTES), call.forces)
      : { forces: [], faults: [] };
    const marksPath = join(dirname(call.out), MARKS_FILE);
    const kept = (await kindOf(marksPath))
      ? readMarkMemory(await readText(marksPath, MOST_BYTES), marksPath)
      : { memory: null, faults: [] };
    const faults = [...asked, ...[...forces.faults, ...kept.faults].map(sayFault)];
    if (faults.length > 0) return { faults };

    const unit = (call.unit ?? geometry.unit)!;
    const converted = convertGeometry(geometry, {
      unit,
      up: (call.up ?? geometry.up)!,
      merge: call.merge,
      split: call.split,
      findFaces: call.findFaces,
      panels: call.panels,
      forces: forces.forces,
      memory: kept.memory,
    });
    const text = writeTrussJson(converted.truss);
    // What is written must be a truss file without faults: the reader is the judge.
    const judged = readTruss(text, call.out);
    if (!judged.truss)
      return {
        faults: [`${call.file}: does not make a sound truss: mend what follows`, ...judged.faults.map(sayFault)],
      };
    await writeOne(call.out, text, true);
    await writeOne(marksPath, writeMarkMemory(converted.memory), true);
    return { converted, unit, fileUnit: geometry.unit, marks: marksPath };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}

async function readGeometry(call: ConvertCall): Promise<RawReading<Fault>> {
  const { file } = call;
  const kind = /\.([a-z]+)$/i.exec(file)?.[1]?.toLowerCase() ?? '';
  if (call.members && kind !== 'csv')
    throw new FileFault('failed', file, '--members goes with a table of nodes', 'leave it out, or give a .csv file');
  switch (kind) {
    case 'obj':
      return readObj(await readText(file, MOST_BYTES), file);
    case 'dxf':
      return readDxf(await readDxfText(file), file);
    case 'ply':
      return readPly(await readBytes(file, MOST_BYTES), file);
    case 'csv': {
      const members = call.members ? { text: await readText(call.members, MOST_BYTES), name: call.members } : null;
      return readCsv(await readText(file, MOST_BYTES), file, members);
    }
    default:
      throw new FileFault('failed', file, 'is of an unknown kind', 'give a file that ends in .obj, .dxf, .ply or .csv');
  }
}

/** DXF before 2007 is written in the code page of its machine: only layer names suffer from reading it as Latin-1. */
async function readDxfText(file: string): Promise<string> {
  const bytes = await readBytes(file, MOST_BYTES);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('latin1').decode(bytes);
  }
}

function tooMany(file: string, g: RawGeometry): string[] {
  const over = (what: string, count: number, most: number): string[] =>
    count > most ? [`${file}: has ${count} ${what}: split it into files of at most ${most}`] : [];
  return [...over('lines', g.lines.length, LIMITS.members), ...over('faces', g.loops.length, LIMITS.faces)];
}

/** An earlier truss file is replaced where that is asked for, nothing else ever is. */
async function mayReplace({ out, replace }: ConvertCall): Promise<string[]> {
  const kind = await kindOf(out);
  if (kind === null) return [];
  const before = kind === 'file' ? await readText(out, MOST_BYTES).catch(() => '') : '';
  if (!before.includes('"strutwright-truss/1"'))
    return [`${out}: is there and is not a truss file: choose another name`];
  return replace ? [] : [`${out}: is there already: choose another name, or replace it with --force`];
}
