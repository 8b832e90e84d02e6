import { describe, expect, it } from 'vitest';
import { Paper } from '../../../src/documents/kit/paper.js';
import { drawTable } from '../../../src/documents/kit/table.js';
import { unitsOf } from '../../../src/documents/kit/units.js';
import { ISOMETRIC } from '../../../src/documents/kit/view/camera.js';
import { strokeOfForce } from '../../../src/documents/kit/view/stroke.js';
import { drawTrussView } from '../../../src/documents/kit/view/truss-view.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import { defaultJob, type Job } from '../../../src/model/job/index.js';
import { inventedTruss } from '../invented.js';
import { checkPdf, onFile, outside, overlaps, textOf } from '../pdf.js';

const truss = inventedTruss();
const fonts = await loadFonts();

async function sample(change: Partial<Job> = {}, hold: readonly string[] = []) {
  const job: Job = { ...defaultJob('Lantern, table model'), date: '2026-12-01', owner: 'Werkhof Nine', ...change };
  const paper = new Paper({ job, fonts, hold, notMade: [] }, 'Force sheets', 'An aid, not an approval.', 'mm, N');
  const largest = Math.max(...truss.members.map((m) => Math.abs(m.force!)));
  const units = unitsOf(job, largest);
  const index = new Map(truss.nodes.map((n, i) => [n.mark, i]));
  const area = paper.addSheet({
    title: 'Isometric view',
    instruction: 'Read the force beside each strut.',
    projection: true,
  });
  const view = drawTrussView(paper.pen, area, {
    camera: ISOMETRIC,
    scale: 'fill',
    nodes: truss.nodes,
    struts: truss.members.slice(0, 50).map((m) => ({
      mark: m.mark,
      from: index.get(m.ends[0])!,
      to: index.get(m.ends[1])!,
      stroke: strokeOfForce(m.force, largest, 1e-6),
      label: { bold: m.mark, plain: units.force(m.force) },
    })),
  });
  const room = paper.addSheet({ title: 'Forces by member', instruction: 'Worst first.' });
  drawTable(
    paper,
    room.y,
    [
      { head: 'Done', tick: true },
      { head: 'Mark', bold: true, value: (m) => m.mark },
      { head: 'Force\nN', align: 'right', value: (m) => units.force(m.force) },
      { head: 'Remark', wraps: true, value: (m) => `${m.ends[0]} to ${m.ends[1]}, `.repeat(6) },
    ],
    truss.members,
  );
  return { view, written: await paper.finish() };
}

describe('a paper', () => {
  it('opens, holds every mark, and no text touches another or leaves the sheet', async () => {
    const { view, written } = await sample();
    checkPdf(written.bytes);
    expect(overlaps(written.placed)).toEqual([]);
    expect(outside(written.bytes)).toEqual([]);
    expect(view.unplaced).toEqual([]);
    const text = textOf(written.bytes);
    for (const { mark } of [...truss.nodes, ...truss.members]) expect(text).toMatch(new RegExp(`\\b${mark}\\b`));
    expect(text).toContain(`1 of ${written.sheets}`);
  });

  it.each(['A4', 'A3', 'Letter'] as const)('keeps its rules on %s with long fields and a hold', async (paper) => {
    const long = 'An unreasonably long name that somebody has typed into every field there is, twice over';
    const { written } = await sample(
      {
        title: long,
        owner: long.slice(0, 80),
        drawnBy: long.slice(0, 80),
        approvedBy: long.slice(0, 80),
        number: long.slice(0, 40),
        output: { ...defaultJob().output, paper },
      },
      [long, `${long}; ${long}`, long, long, long],
    );
    checkPdf(written.bytes);
    expect(overlaps(written.placed)).toEqual([]);
    expect(outside(written.bytes)).toEqual([]);
    expect(textOf(written.bytes)).toContain('HOLD');
  });

  it('says a long reason of a hold to its end, over as many lines as it takes', async () => {
    const reason =
      'S12: carries 1.34 of what it may under 1.35 G + 1.5 snow by compression with bending: give it a larger';
    const { written } = await sample({}, [`${reason} section, shorten it, or waive it with a reason and a name`]);
    expect(overlaps(written.placed)).toEqual([]);
    expect(textOf(written.bytes).replace(/\s+/g, ' ')).toContain('or waive it with a reason and a name');
    expect(textOf(written.bytes)).not.toContain('…');
  });

  it('is the same bytes each time, and carries the date of issue alone', async () => {
    const [a, b] = [await sample(), await sample()];
    expect(Buffer.from(a.written.bytes).equals(Buffer.from(b.written.bytes))).toBe(true);
    const info = onFile(a.written.bytes, 'pdfinfo', ['-isodates', '%']);
    expect(info).toContain('2026-12-01T00:00:00Z');
    expect(onFile((await sample({ date: null })).written.bytes, 'pdfinfo', ['%'])).not.toContain('CreationDate');
  });

  it('writes other scripts from the fallback face, and a replacement mark for what neither has', async () => {
    const { written } = await sample({ title: 'Łódź σ → Ωμέγα 漢' });
    const text = textOf(written.bytes);
    expect(text).toContain('Łódź σ → Ωμέγα');
    expect(text).toContain('\uFFFD');
  });
});
