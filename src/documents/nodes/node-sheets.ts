import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import type { Fonts } from '../kit/fonts.js';
import { Paper, type Written } from '../kit/paper.js';
import { unitsOf } from '../kit/units.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { blockOf, drawBlock } from './node-block.js';

/** Between blocks, down and across, mm. */
const GAP = { down: 2.5, across: 10 } as const;
/** Sheets wider than this carry two columns of blocks, mm. */
const TWO_COLUMNS = 380;

/** node-sheets.pdf: a block a node with its mark, two pictures, its sockets and the angles between them. */
export async function nodeSheets(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Node sheets', CAUTION, units.words);
  const cuts = new Map(records.parts.struts.map((s) => [s.mark, s.cutLength]));
  let area = paper.addSheet({
    title: 'Nodes',
    instruction:
      'Hold the printed node as in its picture and check each socket’s mark before gluing. Azimuth: anticlockwise from x in plan; elevation: up from level; setback: from the node to the stop; depth: from the stop to the mouth. Least section: of the plastic behind a strut or across the core, as a multiple of the section of its sleeve.',
  });
  const diagram = records.reciprocal?.diagram ?? null;
  const polyhedra = new Map((diagram?.nodes ?? []).map((node) => [node.mark, node]));
  const columns = area.width > TWO_COLUMNS ? 2 : 1;
  const width = (area.width - (columns - 1) * GAP.across) / columns;
  const hubs = [...records.parts.hubs].sort((a, b) => byMark(a.mark, b.mark));
  let y = area.y;
  for (let i = 0; i < hubs.length; i += columns) {
    const row = hubs
      .slice(i, i + columns)
      .map((hub) =>
        blockOf(
          paper.pen,
          hub,
          polyhedra.get(hub.mark) ?? null,
          width,
          area.height,
          records.made.get(hub.mark)?.weakest ?? null,
        ),
      );
    const height = Math.max(...row.map((block) => block.height));
    if (y + height > area.y + area.height && y > area.y) {
      area = paper.continueSheet();
      y = area.y;
    }
    row.forEach((block, k) => {
      drawBlock(paper.pen, { x: area.x + k * (width + GAP.across), y, width, height }, block, cuts, units, diagram);
    });
    y += height + GAP.down;
  }
  return paper.finish();
}
