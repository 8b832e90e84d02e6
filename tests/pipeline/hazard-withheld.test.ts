import { expect, it } from 'vitest';
import { makePack } from '../../dist/pipeline/make.js';
import { jobSchema } from '../../src/model/job/index.js';
import { trussOf } from '../helpers/truss.js';

/** Invented: one level triangle. */
const TRIANGLE = trussOf({
  nodes: [
    [0, 0, 0],
    [300, 0, 0],
    [0, 300, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
  faces: [[0, 1, 2]],
  panels: true,
  forces: [0, 0, 0],
});

it('gives a laser no file of PVC, neither sheets nor the kerf comb; a router gets them', async () => {
  const cutFiles = async (kind: string): Promise<string[]> => {
    const job = jobSchema.parse({
      format: 'strutwright-job/1',
      title: 'T',
      truss: 't.json',
      cutter: { kind },
      panels: { material: 'PVC-sheet' },
    });
    const paths: string[] = [];
    await makePack(TRIANGLE, job, { write: (path) => void paths.push(path) });
    expect(paths).toContain('panels/panel-list.csv');
    return paths.filter((p) => p.startsWith('panels/') && /\.(svg|dxf)$/.test(p)).sort();
  };
  expect(await cutFiles('laser')).toEqual([]);
  expect(await cutFiles('router')).toEqual([
    'panels/kerf-comb.dxf',
    'panels/kerf-comb.svg',
    'panels/sheets/sheet-01.dxf',
    'panels/sheets/sheet-01.svg',
  ]);
}, 120_000);
