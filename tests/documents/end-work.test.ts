import { writeFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { expect, it } from 'vitest';
import { drillListCsv, endWorkPdf, holeRows, sawAnglesCsv } from '../../src/documents/struts/end-work.js';
import { loadFonts } from '../../src/machine/fonts.js';
import { defaultJob } from '../../src/model/job/index.js';
import { packRecords } from './pack-records.js';
import { checkPdf, outside, overlaps } from './pdf.js';

const base = defaultJob();
const fonts = await loadFonts();
const rowsOf = (bytes: Uint8Array): Record<string, string>[] => parse(Buffer.from(bytes), { columns: true });

it('lists a hole for every pinned end that has one, inside the socket and the strut', async () => {
  const records = packRecords({
    struts: { ...base.struts, pinDrill: true },
    nodes: { ...base.nodes, joint: 'pinned', pin_mm: 2 },
  });
  const rows = rowsOf(drillListCsv(records));
  expect(rows.length).toBeGreaterThan(100);
  expect(rows).toHaveLength(holeRows(records).length);
  const sockets = new Map(
    records.parts.hubs.flatMap((h) => h.sockets.map((s) => [`${s.strut}@${h.mark}`, s] as const)),
  );
  for (const r of rows) {
    const socket = sockets.get(`${r['strut']}@${r['node']}`)!;
    expect(Number(r['diameter_mm'])).toBe(2);
    expect(Number(r['distance_mm'])).toBeGreaterThan(2);
    expect(Number(r['distance_mm'])).toBeLessThan(socket.depth);
    expect(Number(r['angle_deg'])).toBeGreaterThanOrEqual(0);
    expect(Number(r['angle_deg'])).toBeLessThan(180);
  }
});

it('lists saw angles of rectangular struts, and both tables on paper', async () => {
  const records = packRecords({
    struts: { ...base.struts, section: 'lath', faceJoints: true, pinDrill: true },
    sections: {
      lath: { material: 'C24', shape: { kind: 'rectangle', width_mm: 12, height_mm: 8 } },
    } as typeof base.sections,
  });
  const rows = rowsOf(sawAnglesCsv(records));
  const ends = new Set(rows.map((r) => `${r['strut']}@${r['node']}`));
  expect(ends.size).toBe(2 * records.parts.struts.length);
  for (const r of rows) {
    expect(Math.abs(Number(r['mitre_deg']))).toBeLessThan(90);
    expect(Math.abs(Number(r['bevel_deg']))).toBeLessThan(90);
    const strut = records.parts.struts.find((s) => s.mark === r['strut'])!;
    // Long points reach no farther past a node than a corner of the section can at the sharpest angle.
    expect(Math.abs(Number(r['long_point_length_mm']) - strut.axisLength)).toBeLessThan(60);
  }
  const written = await endWorkPdf(records, fonts);
  if (process.env['SHOW_PAPERS']) writeFileSync(`${process.env['SHOW_PAPERS']}/end-work.pdf`, written.bytes);
  checkPdf(written.bytes);
  expect(overlaps(written.placed)).toEqual([]);
  expect(outside(written.bytes)).toEqual([]);
});
