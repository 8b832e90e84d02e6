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

/** How long the truss is turned, ms. */
const TURN_MS = 3000;

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
  await page.addInitScript(() => {
    window.draws = 0;
    for (const name of ['drawElementsInstanced', 'drawArraysInstanced', 'drawElements', 'drawArrays']) {
      const real = WebGL2RenderingContext.prototype[name];
      WebGL2RenderingContext.prototype[name] = function (...a) {
        window.draws += 1;
        return real.apply(this, a);
      };
    }
  });
  const start = performance.now();
  await page.goto(`file://${path}`);
  await page.waitForSelector('body[data-ready]');
  const loaded = performance.now() - start;
  await page.locator('#slider').fill(String(plan.steps.length));
  await page.click('#labels');
  const turning = await page.evaluate(async (ms) => {
    const canvas = document.getElementById('truss');
    const gl = canvas.getContext('webgl2');
    window.draws = 0;
    const before = performance.now();
    let frames = 0;
    for (; performance.now() - before < ms; frames++) {
      canvas.dispatchEvent(new KeyboardEvent('keydown', { key: 'd' }));
      await new Promise((done) => requestAnimationFrame(done));
      // A pixel read back: the picture is finished, not only asked for.
      gl.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, new Uint8Array(4));
    }
    return { frames, took: performance.now() - before, draws: window.draws };
  }, TURN_MS);
  await browser.close();
  print(`file ${(bytes.length / 1024).toFixed(0)} KiB`);
  print(`load ${loaded.toFixed(0)} ms   target 2000`);
  const each = turning.took / turning.frames;
  print(
    `turning, all ${truss.members.length} struts: ${turning.frames} frames, ${each.toFixed(0)} ms each, ${(turning.draws / turning.frames).toFixed(1)} drawing calls each`,
  );
}
