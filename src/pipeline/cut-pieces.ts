import { sawPlanPdf } from '../documents/struts/saw-plan.js';
import { stockPlanJson } from '../documents/struts/stock-plan.js';
import { FileFault } from '../machine/file-fault.js';
import { kindOf, readText } from '../machine/files.js';
import { loadFonts } from '../machine/fonts.js';
import { basename, join } from '../machine/paths.js';
import { writeOne } from '../machine/write-one.js';
import { sectionNamed } from '../model/catalogue/resolve.js';
import type { Finding } from '../model/finding.js';
import { sayFinding } from '../model/findings/index.js';
import { defaultJob, type Job } from '../model/job/index.js';
import { LIMITS } from '../model/limits.js';
import type { StockPlan } from '../model/plan.js';
import { sayFault } from '../readers/fault.js';
import { readJob } from '../readers/job.js';
import { readPieces } from '../readers/pieces.js';
import { type PieceGroup, planGroups, usualBar } from './stages/stock.js';

/** What `stock` is asked for; lengths in mm. */
export interface CutCall {
  readonly file: string;
  /** A job whose saw, bars and rack are used. */
  readonly job: string | null;
  readonly bars: readonly { readonly length: number; readonly price?: number; readonly available?: number }[];
  readonly rack: readonly number[];
  readonly kerf: number | null;
  readonly trim: number | null;
  /** Where the saw plan goes as PDF. */
  readonly out: string | null;
}

export type CutOutcome =
  | { readonly faults: readonly string[] }
  | {
      readonly job: Job;
      readonly plan: StockPlan;
      readonly findings: readonly Finding[];
      /** The plan as in a pack's stock-plan.json. */
      readonly json: string;
    };

/** Section of pieces whose table names none. */
const NO_SECTION = 'bar';
const MOST_BYTES = 4 * LIMITS.fileCharacters;

/** Reads a table of pieces and plans their cutting, each section for itself; or every fault, one line each. */
export async function cutPieces(call: CutCall): Promise<CutOutcome> {
  try {
    const { pieces, faults } = readPieces(await readText(call.file, MOST_BYTES), call.file);
    const base = await baseJob(call.job);
    const said = [...faults.map(sayFault), ...base.faults];
    const sections = [...new Set(pieces.map((p) => p.section ?? NO_SECTION))];
    const usual = (section: string): number | null => {
      const named = base.job && call.job !== null ? sectionNamed(base.job, section) : null;
      return named ? usualBar(named) : null;
    };
    if (base.job && call.bars.length === 0) {
      const known = new Set(base.job.stock.bars.map((b) => b.section));
      for (const s of sections.filter((x) => !known.has(x) && usual(x) === null))
        said.push(`${call.file}: no bar of ${s} to cut from: give --bar LENGTH, or a job with bars of it`);
    }
    if (!base.job || said.length > 0) return { faults: said };
    const job = withCall(base.job, call, sections);
    const groups = sections.map(
      (section): PieceGroup => ({
        section,
        pieces: pieces.filter((p) => (p.section ?? NO_SECTION) === section),
        usual: usual(section) ?? 0,
      }),
    );
    const { plan, findings } = await planGroups(groups, job);
    if (call.out) {
      const hold = findings.filter((f) => f.level === 'stop').map(sayFinding);
      const written = await sawPlanPdf({ job, stock: plan, hold, findings }, await loadFonts());
      await writeOne(call.out, written.bytes, true);
    }
    return { job, plan, findings, json: new TextDecoder().decode(stockPlanJson({ job, stock: plan })) };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}

async function baseJob(path: string | null): Promise<{ readonly job: Job | null; readonly faults: readonly string[] }> {
  if (path === null) return { job: defaultJob('Pieces'), faults: [] };
  const file = (await kindOf(path)) === 'folder' ? join(path, 'job.json') : path;
  const { job, faults } = readJob(await readText(file, MOST_BYTES), file);
  return { job: job ?? null, faults: faults.map(sayFault) };
}

/** The job with what the call names in place of its own. */
function withCall(job: Job, call: CutCall, sections: readonly string[]): Job {
  const each = <T extends object>(items: readonly T[]) =>
    sections.flatMap((section) => items.map((item) => ({ section, ...item })));
  return {
    ...job,
    title: call.job === null ? basename(call.file) : job.title,
    saw: { ...job.saw, kerf_mm: call.kerf ?? job.saw.kerf_mm, endTrim_mm: call.trim ?? job.saw.endTrim_mm },
    stock: {
      ...job.stock,
      bars:
        call.bars.length > 0
          ? each(call.bars.map(({ length, price, available }) => ({ length_mm: length, price: price ?? 1, available })))
          : job.stock.bars,
      rack: call.rack.length > 0 ? each(call.rack.map((length_mm) => ({ length_mm }))) : job.stock.rack,
    },
  };
}
