import { assemblyHtml } from '../documents/assembly/assembly-html.js';
import { packChecks } from '../documents/pack-checks.js';
import type { PackRecords } from '../documents/records.js';
import { loadFonts } from '../machine/fonts.js';
import { MEMORY_SPOOL, type Spool } from '../machine/memory-spool.js';
import { loadPageCode } from '../machine/page-code.js';
import { runHere } from '../machine/run-here.js';
import type { Job } from '../model/job/index.js';
import type { Run } from '../model/run.js';
import type { Truss } from '../model/truss.js';
import { planAssembly } from '../planning/assembly/plan-assembly.js';
import { fitUpFindings } from '../planning/fit-up/findings.js';
import { planFitUp } from '../planning/fit-up/plan-fit-up.js';
import { assess } from './assess.js';
import { contentKey, cutParts } from './digests.js';
import type { Input } from './load.js';
import { type Manifest, manifestOf } from './manifest.js';
import { packWriter, type WriteFile } from './pack-writer.js';
import { settle } from './settle.js';
import { withSharedStops } from './shared-stops.js';
import { lineageOf, type Since } from './since.js';
import { writeBeds } from './stages/beds.js';
import { writeDocuments } from './stages/documents.js';
import { sectionsByUse, writeGauges } from './stages/gauge.js';
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
  /** The manifest of an earlier pack: only what has changed since is written and planned. */
  readonly since?: Since;
  /** Where pieces wait for their bed; absent: in memory. */
  readonly spool?: Spool;
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
  /** Names what is done next; how much there is of it is not known before. */
  const begin = (stage: string): void => run.tell({ stage, done: 0, total: 0 });
  const writer = packWriter(options.write);
  begin('Checks');
  const assessed = withSharedStops(assess(truss, job));

  const lineage = lineageOf(options.since ?? null, job.revision);
  const cut = cutParts(assessed.parts, lineage);
  const done = new Set(
    cut.filter((p) => lineage.unchanged(p.kind, p.mark, p.digest)).map((p) => `${p.kind} ${p.mark}`),
  );

  begin('Hubs');
  const hubs = await makeHubs(assessed, run, writer, lineage, options.spool ?? MEMORY_SPOOL);
  const fonts = await loadFonts();
  begin('Gauges');
  const gauges = await writeGauges(
    sectionsByUse(assessed.parts.struts.map((s) => s.section)),
    job,
    writer,
    { prints: 'nodes/', beds: 'nodes/beds/', comb: 'panels/' },
    assessed.parts.panels.length > 0,
    fonts,
  );
  begin('Beds');
  const beds = await writeBeds(hubs.printable, job, writer);
  begin('Bars');
  const bars = await planBars(
    assessed.parts.struts.filter((s) => !done.has(`strut ${s.mark}`)),
    job,
  );
  begin('Sheets');
  const sheets = await planSheets(
    assessed.parts.panels.filter((p) => !done.has(`panel ${p.mark}`)),
    job,
    run,
  );

  begin('Assembly');
  const assembly = planAssembly({ ...assessed, bars: bars.plan.bars });
  const fitUp = planFitUp(assessed.topology, assessed.parts, job);

  const here = packChecks(assessed.parts);
  const settled = settle({
    ...assessed,
    checked: [...assessed.checked, ...here],
    notChecked: assessed.notChecked.filter((c) => !here.includes(c)),
    found: [
      ...assessed.found,
      ...hubs.findings,
      ...bars.findings,
      ...sheets.findings,
      ...assembly.findings,
      ...fitUpFindings(fitUp),
    ],
  });
  const records: PackRecords = {
    ...settled,
    parts: { ...settled.parts, hubs: hubs.hubs },
    made: hubs.made,
    stock: bars.plan,
    nesting: sheets.plan,
    beds,
    assembly: assembly.plan,
    fitUp,
  };

  begin('Cut files');
  const cutting = await writeSheetFiles(records, writer);
  begin('Papers');
  await writeDocuments(records, fonts, writer, run);
  begin('Assembly page');
  await writer.put('assembly.html', assemblyHtml(records, await loadPageCode(), contentKey(writer.files())));

  const manifest = manifestOf(records, hubs.made, {
    inputs: options.inputs ?? [],
    parts: [
      ...cut.map((p) => (p.kind === 'panel' ? { ...p, files: cutting.filesOf(p.mark) } : p)),
      ...hubs.parts,
      ...gauges.parts,
    ],
    files: writer.files(),
    withheld: [...hubs.withheld, ...cutting.withheld.filter((mark) => !done.has(`panel ${mark}`))],
    since: options.since && { title: options.since.title, revision: options.since.revision },
  });
  await options.write('manifest.json', new TextEncoder().encode(`${JSON.stringify(manifest, null, 2)}\n`));
  return manifest;
}
