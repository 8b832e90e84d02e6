import { comparisonPdf } from '../documents/revisions/comparison-pdf.js';
import { loadFonts } from '../machine/fonts.js';
import type { Comparison } from '../model/comparison.js';
import { defaultJob } from '../model/job/index.js';
import type { Truss } from '../model/truss.js';
import { readTruss } from '../readers/truss.js';
import type { ReadPack } from './read-pack.js';

/**
 * The comparison of two packs as a PDF, with pictures where the newer pack holds its truss; in the units of the newer pack's papers,
 * and on its paper unless another is asked for.
 */
export async function comparisonPaper(
  comparison: Comparison,
  before: ReadPack,
  after: ReadPack,
  paper?: 'A4' | 'A3' | 'Letter',
): Promise<Uint8Array> {
  const { title, revision, date, papers } = after.manifest;
  const job = defaultJob(title);
  const written = await comparisonPdf(
    {
      comparison,
      job: {
        ...job,
        revision,
        date,
        output: { ...job.output, paper: paper ?? papers.paper, units: papers.units, fractions: papers.fractions },
      },
      before: await trussIn(before),
      after: await trussIn(after),
    },
    await loadFonts(),
  );
  return written.bytes;
}

async function trussIn(pack: ReadPack): Promise<Truss | null> {
  const text = await pack.text('truss/truss.json');
  return text === null ? null : readTruss(text, 'truss.json').truss;
}
