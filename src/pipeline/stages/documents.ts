import { assemblyPdf } from '../../documents/assembly/assembly-pdf.js';
import { fitUpCsv, fitUpJson } from '../../documents/assembly/fit-up.js';
import { packingListCsv } from '../../documents/assembly/packing-list.js';
import { checkReport } from '../../documents/check-json.js';
import { forceSheets } from '../../documents/forces/force-sheets.js';
import { forcesCsv } from '../../documents/forces/forces-csv.js';
import { supportsCsv } from '../../documents/forces/supports-csv.js';
import { writeJson } from '../../documents/formats/json.js';
import type { Fonts } from '../../documents/kit/fonts.js';
import { barAnglesCsv } from '../../documents/nodes/bar-angles.js';
import { barDirectionsCsv } from '../../documents/nodes/bar-directions.js';
import { bedSheets } from '../../documents/nodes/bed-sheets.js';
import { drillingCsv } from '../../documents/nodes/drilling.js';
import { drillingTemplates } from '../../documents/nodes/drilling-templates.js';
import { nodeSheets } from '../../documents/nodes/node-sheets.js';
import { placementJson } from '../../documents/nodes/placement.js';
import { nestingJson } from '../../documents/panels/nesting-json.js';
import { outlinesJson } from '../../documents/panels/outlines.js';
import { panelListCsv } from '../../documents/panels/panel-list.js';
import { sheetsPdf } from '../../documents/panels/sheets-pdf.js';
import type { PackRecords } from '../../documents/records.js';
import { report } from '../../documents/report/report.js';
import { buyingListCsv } from '../../documents/struts/buying-list.js';
import { cutListCsv } from '../../documents/struts/cut-list-csv.js';
import { cutListPdf } from '../../documents/struts/cut-list-pdf.js';
import { drillListCsv, endWorkPdf, sawAnglesCsv } from '../../documents/struts/end-work.js';
import { labelsPdf } from '../../documents/struts/labels.js';
import { offcutsJson } from '../../documents/struts/offcuts.js';
import { sawPlanPdf } from '../../documents/struts/saw-plan.js';
import { stockPlanJson } from '../../documents/struts/stock-plan.js';
import { writeTrussJson } from '../../documents/truss/truss-json.js';
import type { Run } from '../../model/run.js';
import type { PackWriter } from '../pack-writer.js';

type Make = (records: PackRecords, fonts: Fonts) => Uint8Array | null | Promise<{ readonly bytes: Uint8Array } | null>;

/** Every paper and table of a pack, in the order of writing. A new one is a file in documents and a line here. */
const DOCUMENTS: readonly (readonly [path: string, make: Make])[] = [
  ['check.json', (r) => writeJson(checkReport(r))],
  ['report.pdf', report],
  ['forces/forces.csv', forcesCsv],
  ['forces/force-sheets.pdf', forceSheets],
  ['forces/supports.csv', supportsCsv],
  ['struts/cut-list.csv', cutListCsv],
  ['struts/cut-list.pdf', cutListPdf],
  ['struts/stock-plan.json', stockPlanJson],
  ['struts/saw-plan.pdf', sawPlanPdf],
  ['struts/labels.pdf', labelsPdf],
  ['struts/buying-list.csv', buyingListCsv],
  ['struts/offcuts.json', offcutsJson],
  ['struts/end-work.pdf', (r, f) => (r.job.struts.pinDrill || r.job.struts.faceJoints ? endWorkPdf(r, f) : null)],
  ['struts/drill-list.csv', (r) => (r.job.struts.pinDrill ? drillListCsv(r) : null)],
  ['struts/saw-angles.csv', (r) => (r.job.struts.faceJoints ? sawAnglesCsv(r) : null)],
  ['nodes/bar-directions.csv', barDirectionsCsv],
  ['nodes/bar-angles.csv', barAnglesCsv],
  ['nodes/drilling.csv', drillingCsv],
  ['nodes/drilling-templates.pdf', drillingTemplates],
  ['nodes/placement.json', placementJson],
  ['nodes/node-sheets.pdf', nodeSheets],
  ['nodes/bed-sheets.pdf', bedSheets],
  ['assembly.pdf', assemblyPdf],
  ['assembly/packing-list.csv', packingListCsv],
  ['assembly/fit-up.csv', fitUpCsv],
  ['assembly/fit-up.json', fitUpJson],
  ['panels/panel-list.csv', panelListCsv],
  ['panels/outlines.json', outlinesJson],
  ['panels/nesting.json', nestingJson],
  ['panels/sheets.pdf', sheetsPdf],
  ['truss/truss.json', (r) => new TextEncoder().encode(writeTrussJson(r.topology.truss))],
];

export async function writeDocuments(records: PackRecords, fonts: Fonts, writer: PackWriter, run: Run): Promise<void> {
  for (const [i, [path, make]] of DOCUMENTS.entries()) {
    const made = await make(records, fonts);
    // null: nothing in this pack calls for the paper.
    if (made) await writer.put(path, made instanceof Uint8Array ? made : made.bytes);
    run.tell({ stage: 'Papers', done: i + 1, total: DOCUMENTS.length });
  }
}
