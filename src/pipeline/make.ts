import type { PackRecords } from '../documents/records.js';
import { loadFonts } from '../machine/fonts.js';
import { runHere } from '../machine/run-here.js';
import type { Job } from '../model/job/index.js';
import type { Run } from '../model/run.js';
import type { Truss } from '../model/truss.js';
import { planAssembly } from '../planning/assembly/plan-assembly.js';
import { assess } from './assess.js';
import { cutParts } from './digests.js';
import type { Input } from './load.js';
import { type Manifest, manifestOf } from './manifest.js';
import { packWriter, type WriteFile } from './pack-writer.js';
import { settle } from './settle.js';
import { writeBeds } from './stages/beds.js';
import { writeDocuments } from './stages/documents.js';
import { writeGauges } from './stages/gauge.js';
import { makeHubs } from './stages/hubs.js';
import { writeSheetFiles } from './stages/sheet-files.js';
import { planSheets } from './stages/sheets.js';
import { planBars } from './stages/stock.js';
import { TASKS } from './tasks.js';

export interface MakeOptions {
  /** Takes each file of the pack as it is made; `path` is relative, with forward slashes. */
  readonly write: WriteFile;
  readonly tell?: Run['tell'];
  /** A worker pool's; absent: everything runs in this thread. */
  readonly each?: Run['each'];
  /** Files that the truss and the job came from, for the manifest. */
  readonly inputs?: readonly Input[];
}

/**
 * Makes the whole pack of a truss as read and a job, file by file through `write`, manifest.json last, and gives the
 * object of manifest.json. Same truss, same job, same program: same bytes, whatever the number of workers.
 */
export async function makePack(truss: Truss, job: Job, options: MakeOptions): Promise<Manifest> {
  const run: Run = {
    seed: job.seed,
    tell: options.tell ?? (() => {}),
    each: options.each ?? runHere(TASKS),
  };
  const writer = packWriter(options.write);
  const assessed = assess(truss, job);

  const hubs = await makeHubs(assessed, run, writer);
  const gauges = await writeGauges(assessed.parts.struts, job, writer);
  const beds = await writeBeds(hubs.printable, job, writer);
  const bars = await planBars(assessed.parts.struts, job);
  const sheets = await planSheets(assessed.parts.panels, job);

  const assembly = planAssembly(assessed);

  const settled = settle({
    ...assessed,
    found: [...assessed.found, ...hubs.findings, ...bars.findings, ...sheets.findings, ...assembly.findings],
  });
  const records: PackRecords = {
    ...settled,
    made: hubs.made,
    stock: bars.plan,
    nesting: sheets.plan,
    beds,
    assembly: assembly.plan,
  };

  const cutting = await writeSheetFiles(records, writer);
  await writeDocuments(records, await loadFonts(), writer, run);

  const manifest = manifestOf(records, hubs.made, {
    inputs: options.inputs ?? [],
    parts: [...cutParts(records.parts, (p) => cutting.filesOf(p.mark)), ...hubs.parts, ...gauges],
    files: writer.files(),
    withheld: [...hubs.withheld, ...cutting.withheld],
  });
  await options.write('manifest.json', new TextEncoder().encode(`${JSON.stringify(manifest, null, 2)}\n`));
  return manifest;
}
