// The building page of a grid of 2,048 struts (invented) in a headless browser that draws in software: load and turning.
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium } from 'playwright-core';
import { assemblyHtml } from '../../dist/documents/assembly/assembly-html.js';
import { loadPageCode } from '../../dist/machine/page-code.js';
import { assess } from '../../dist/pipeline/assess.js';
import { planAssembly } from '../../dist/planning/assembly/plan-assembly.js';
import { readJob } from '../../dist/readers/job.js';
import { readTruss } from '../../dist/readers/truss.js';
import { grid } from './assembly.bench.mjs';

export const title = 'Building page of 2,048 struts, drawn in software';

export async function run(print) {
  const { job } = readJob(
    '{"format":"strutwright-job/1","title":"grid","truss":"t.json","analysis":{"buckling":false}}',
    'job',
  );
  const { truss } = readTruss(JSON.stringify(grid(16)), 'grid');
  const found = await assess(truss, job);
  const { plan } = planAssembly(found);
  const records = { ...found, made: new Map(), stock: null, nesting: null, beds: null, assembly: plan, fitUp: null };
  const path = join(mkdtempSync(join(tmpdir(), 'strutwright-')), 'assembly.html');
  const bytes = assemblyHtml(records, await loadPageCode(), 'bench');
  writeFileSync(path, bytes);
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--disable-background-networking',
      '--disable-component-update',
      '--use-angle=swiftshader',
      '--enable-unsafe-swiftshader',
    ],
  });
  const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
  const start = performance.now();
  await page.goto(`file://${path}`);
  await page.waitForSelector('body[data-ready]');
  const loaded = performance.now() - start;
  await page.locator('#slider').fill(String(plan.steps.length));
  await page.click('#labels');
  const turning = await page.evaluate(async () => {
    const canvas = document.getElementById('truss');
    const before = performance.now();
    for (let i = 0; i < 20; i++) {
      canvas.dispatchEvent(new KeyboardEvent('keydown', { key: 'd' }));
      await new Promise((done) => requestAnimationFrame(done));
    }
    return (performance.now() - before) / 20;
  });
  await browser.close();
  print(`file ${(bytes.length / 1024).toFixed(0)} KiB`);
  print(`load ${loaded.toFixed(0)} ms   target 2000`);
  print(`a frame while turning, all ${truss.members.length} struts: ${turning.toFixed(0)} ms`);
}
