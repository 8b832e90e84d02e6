// The papers of the example of 40 nodes, and of an invented double-layer grid of 392 struts (forces invented: for time alone).
import { readFileSync } from 'node:fs';
import { forceSheets } from '../../dist/documents/forces/force-sheets.js';
import { nodeSheets } from '../../dist/documents/nodes/node-sheets.js';
import { report } from '../../dist/documents/report/report.js';
import { cutListPdf } from '../../dist/documents/struts/cut-list-pdf.js';
import { loadFonts } from '../../dist/machine/fonts.js';
import { defaultJob } from '../../dist/model/job/index.js';
import { assess } from '../../dist/pipeline/assess.js';
import { readJob } from '../../dist/readers/job.js';
import { readTruss } from '../../dist/readers/truss.js';

export const title = 'Papers: processor milliseconds, sheets, kB';

const example = (file) => readFileSync(new URL(`../../examples/lantern/${file}`, import.meta.url), 'utf8');

export async function run(print) {
  const fonts = await loadFonts();
  const cases = [
    ['40 nodes', readTruss(example('truss.json'), 'truss.json').truss, readJob(example('job.json'), 'job.json').job],
    ['392 struts', grid(7, 800, 500), defaultJob('Grid')],
  ];
  for (const [name, truss, job] of cases) {
    const records = { ...assess(truss, job), made: new Map(), stock: null, nesting: null };
    for (const write of [forceSheets, nodeSheets, cutListPdf, report]) {
      const before = process.cpuUsage();
      const { sheets, bytes } = await write(records, fonts);
      const { user, system } = process.cpuUsage(before);
      const ms = ((user + system) / 1000).toFixed(0).padStart(6);
      print(
        `${name.padEnd(11)} ${write.name.padEnd(12)} ${ms} ms ${String(sheets).padStart(4)} ${(bytes.length / 1000).toFixed(0).padStart(6)} kB`,
      );
    }
  }
}

function grid(n, side, height) {
  const nodes = [];
  const members = [];
  const known = new Set();
  const node = (mark, at) => {
    nodes.push({ mark, at });
    known.add(mark);
  };
  for (let i = 0; i <= n; i++) for (let j = 0; j <= n; j++) node(`U${i}x${j}`, [i * side, j * side, height]);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) node(`L${i}x${j}`, [(i + 0.5) * side, (j + 0.5) * side, 0]);
  const bar = (a, b) => {
    if (!known.has(a) || !known.has(b)) return;
    const force = 1000 * Math.sin(members.length * 1.7);
    members.push({
      mark: `S${members.length + 1}`,
      ends: [a, b],
      force,
      section: 'beech-20',
      area: null,
      modulus: null,
      roll: null,
      group: null,
    });
  };
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) {
      for (const layer of ['U', 'L']) {
        bar(`${layer}${i}x${j}`, `${layer}${i + 1}x${j}`);
        bar(`${layer}${i}x${j}`, `${layer}${i}x${j + 1}`);
      }
      for (const [a, b] of [
        [0, 0],
        [1, 0],
        [0, 1],
        [1, 1],
      ])
        bar(`L${i}x${j}`, `U${i + a}x${j + b}`);
    }
  return { nodes, members, faces: [], cells: [], reciprocal: null, supports: [], loads: [] };
}
