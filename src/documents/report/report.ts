import { CAUTION, CAUTIONS } from '../cautions.js';
import { issueOf } from '../issue.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import { Paper, type Written } from '../kit/paper.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { unitsOf } from '../kit/units.js';
import { largestForce } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { checksSection } from './checks-section.js';
import { comparisonSection } from './comparison-section.js';
import { findingsSection } from './findings-section.js';
import { materialsSection } from './materials-section.js';
import { picturesSection } from './pictures/index.js';
import { supportsSection } from './supports-section.js';
import { totalsSection } from './totals-section.js';
import { utilisationSection } from './utilisation-section.js';

/** report.pdf: the findings first, then the checks in words, what is made, cautions, pictures, and the tables. */
export async function report(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, largestForce(records));
  const paper = new Paper(issueOf(records, fonts), 'Report', CAUTION, units.words);
  paper.addSheet({
    title: 'Report',
    instruction:
      'Read the findings before anything is cut or printed. Marks are those on the parts and on every other sheet.',
  });
  const flow = new Flow(paper);
  findingsSection(flow, records);
  checksSection(flow, records, units);
  supportsSection(flow, records, units);
  totalsSection(flow, records, units);
  flow.heading('Cautions', 30);
  for (const { trade, words } of CAUTIONS) flow.paragraph(`${trade}. ${sayInUnits(words, records.job.output)}`);
  picturesSection(paper, flow, records, units);
  comparisonSection(paper, flow, records, units);
  utilisationSection(flow, records, units);
  materialsSection(flow, records);
  return paper.finish();
}
