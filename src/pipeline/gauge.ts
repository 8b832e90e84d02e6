import { sectionsOf } from '../detailing/sections.js';
import { clearance, isMeasured } from '../detailing/systems/printing.js';
import { loadFonts } from '../machine/fonts.js';
import { sha256 } from '../machine/hash.js';
import { sectionNamed } from '../model/catalogue/resolve.js';
import { type Job, jobSchema } from '../model/job/index.js';
import { scaleTruss } from '../model/scale-truss.js';
import type { Section } from '../model/section.js';
import { VERSION } from '../model/version.js';
import { gaugeClearances, gaugeSize } from '../shaping/gauge-steps.js';
import { type LoadedJob, loadJob } from './load.js';
import { papersOf } from './manifest.js';
import { packWriter, type WriteFile } from './pack-writer.js';
import { gaugeMarks, sectionsByUse, writeGauges, writeKerfComb } from './stages/gauge.js';

/** What `gauge` is asked for. */
export interface GaugeCall {
  /** Path of a job; null: the usual settings. */
  readonly job: string | null;
  /** Names of sections; empty: those of the job's struts. */
  readonly sections: readonly string[];
  readonly process: Job['nodes']['process'] | null;
  /** Middle of the ladder, mm. */
  readonly clearance: number | null;
}

/** What a call comes to, before anything is made. */
export interface GaugePlan {
  readonly job: Job;
  readonly sections: readonly Section[];
  readonly inputs: LoadedJob['inputs'];
  /** Folder of the job; null: there is none. */
  readonly folder: string | null;
}

/** Reads the job and finds the sections, or every fault, one line each. */
export async function planGauge(
  call: GaugeCall,
): Promise<{ readonly plan: GaugePlan } | { readonly faults: readonly string[] }> {
  const read = call.job === null ? null : await loadJob(call.job);
  if (read && 'faults' in read) return read;
  const loaded = read?.loaded ?? null;
  const asked = loaded?.job ?? usualJob();
  const job: Job = {
    ...asked,
    nodes: {
      ...asked.nodes,
      process: call.process ?? asked.nodes.process,
      ...(call.clearance === null ? {} : { clearance_mm: call.clearance, clearances: {} }),
    },
  };
  const faults: string[] = [];
  let sections: readonly Section[];
  if (call.sections.length > 0 || !loaded) {
    const names = call.sections.length > 0 ? call.sections : [job.struts.section];
    sections = [...new Set(names)].flatMap((name) => {
      const section = sectionNamed(job, name);
      if (!section)
        faults.push(
          `strutwright: --section is "${name}": neither the job nor the catalogue has it: look it up with "strutwright catalogue"`,
        );
      return section ?? [];
    });
  } else {
    const found = sectionsOf(scaleTruss(loaded.truss, job), job);
    sections = sectionsByUse(found.sections);
    for (const name of new Set(found.findings.map((f) => String(f.about?.['section']))))
      faults.push(
        `${call.job}: section "${name}" is neither in the job nor in the catalogue: name another or add it under "sections"`,
      );
  }
  if (faults.length > 0) return { faults };
  return { plan: { job, sections, inputs: loaded?.inputs ?? [], folder: loaded?.folder ?? null } };
}

const usualJob = (): Job => jobSchema.parse({ format: 'strutwright-job/1', title: 'Fit gauge', truss: 'truss.json' });

/** What the gauges try, for a script: by section, mm. */
export function gaugeJson({ job, sections }: GaugePlan): object {
  const marks = gaugeMarks(sections);
  return {
    format: 'strutwright-gauge/1',
    process: job.nodes.process,
    gauges: sections.map((s, i) => ({
      section: s.name,
      file: `${marks[i]}.stl`,
      size_mm: gaugeSize(s, job),
      clearances_mm: gaugeClearances(s, job),
      job: { clearance_mm: clearance(job, s, gaugeSize(s, job)), measured: isMeasured(job, s) },
    })),
    kerf: { kerf_mm: job.cutter.kerf_mm, measured: job.cutter.kerfMeasured },
  };
}

/** Makes the gauges, their beds, the kerf comb and the sheet that says how to read them. Gives the sections that could not be made. */
export async function makeGauge(plan: GaugePlan, write: WriteFile): Promise<readonly string[]> {
  const { job, sections } = plan;
  const writer = packWriter(write);
  const { parts, failed } = await writeGauges(
    sections,
    job,
    writer,
    { prints: '', beds: '', comb: '' },
    true,
    await loadFonts(),
  );
  await writeKerfComb(job, writer, '');
  await writer.put('gauge.json', `${JSON.stringify(gaugeJson(plan), null, 2)}\n`);
  const manifest = {
    format: 'strutwright-pack/1',
    title: job.title,
    revision: job.revision,
    program: `strutwright ${VERSION}`,
    status: failed.length > 0 ? 'flagged' : 'clear',
    inputs: plan.inputs,
    settings: sha256(JSON.stringify([job, sections])),
    parts,
    files: writer.files(),
    papers: papersOf(job),
  };
  await write('manifest.json', new TextEncoder().encode(`${JSON.stringify(manifest, null, 2)}\n`));
  return failed;
}
