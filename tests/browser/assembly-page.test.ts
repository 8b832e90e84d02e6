import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BrowserContext, Page } from 'playwright-core';
import { PNG } from 'pngjs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runCli } from '../cli/run-cli.js';
import { openBrowser, openFile } from './open-page.js';

const EXAMPLE = join(import.meta.dirname, '..', '..', 'examples', 'canopy');

let path: string;
beforeAll(() => {
  const pack = join(mkdtempSync(join(tmpdir(), 'strutwright-')), 'pack');
  runCli(['make', EXAMPLE, '-o', pack]);
  path = join(pack, 'assembly.html');
}, 300_000);

describe.each([
  ['desktop', { width: 1280, height: 800 }, false],
  ['phone', { width: 390, height: 844 }, true],
] as const)('the building page on a %s', (_, viewport, touch) => {
  let context: BrowserContext;
  beforeAll(async () => {
    context = await openBrowser(viewport, touch);
  });
  afterAll(() => context?.close());

  it('shows its parts, complains of nothing and asks for no address', async () => {
    const { page, complaints, requests } = await openFile(context, path);
    expect(await page.locator('body.flat').count()).toBe(0);
    const first = inkShare(await pictureOf(page));
    for (let i = 0; i < 40 && !(await page.locator('#next').isDisabled()); i++) await page.locator('#next').click();
    await page.waitForTimeout(300);
    const last = inkShare(await pictureOf(page));
    expect(first).toBeGreaterThan(0.001);
    expect(last).toBeGreaterThan(1.5 * first);
    expect(complaints).toEqual([]);
    expect(
      requests.filter((r) => !r.startsWith('file://') && !r.startsWith('data:') && !r.startsWith('blob:')),
    ).toEqual([]);
    await page.close();
  });

  it('keeps ticks and the step over a reload, steps by keyboard, finds a mark', async () => {
    const { page } = await openFile(context, path);
    await page.evaluate('localStorage.clear()');
    await page.reload();
    await page.waitForSelector('body[data-ready]');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    expect(await page.locator('#count').textContent()).toMatch(/^Step 3 of \d+$/);
    await page.locator('#parts input').first().check();
    expect(await page.locator('#ticked').textContent()).toMatch(/^1 of \d+ parts ticked$/);
    await page.reload();
    await page.waitForSelector('body[data-ready]');
    expect(await page.locator('#count').textContent()).toMatch(/^Step 3 of/);
    expect(await page.locator('#parts input').first().isChecked()).toBe(true);
    await page.fill('#mark', 's01');
    await page.keyboard.press('Enter');
    expect(await page.locator('#picked h2').textContent()).toBe('Strut S01');
    await page.fill('#mark', 'nothing');
    await page.keyboard.press('Enter');
    expect(await page.locator('#search-answer').textContent()).toBe('No part has this mark.');
    await page.close();
  });

  it('has targets of 44 px, a name on every control, and a card inside the window', async () => {
    const { page } = await openFile(context, path);
    for (const button of await page.locator('button:visible').all()) {
      const box = (await button.boundingBox())!;
      expect(box.height).toBeGreaterThanOrEqual(44);
      expect(((await button.textContent()) ?? '').trim()).not.toBe('');
    }
    const card = (await page.locator('#card').boundingBox())!;
    expect(card.x).toBeGreaterThanOrEqual(0);
    expect(card.x + card.width).toBeLessThanOrEqual(viewport.width);
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(viewport.width);
    await page.close();
  });
});

it('places every part exactly once', () => {
  const html = readFileSync(path, 'utf8');
  const data = JSON.parse(/<script type="application\/json" id="pack">(.*?)<\/script>/s.exec(html)![1]!);
  const truss = JSON.parse(readFileSync(join(EXAMPLE, 'truss.json'), 'utf8'));
  const placed = (of: (s: never) => number[]): number[] => data.steps.flatMap(of).sort((a: number, b: number) => a - b);
  const all = (n: number): number[] => Array.from({ length: n }, (_, i) => i);
  expect(placed((s: { nodes: number[] }) => s.nodes)).toEqual(all(truss.nodes.length));
  expect(placed((s: { struts: { index: number }[] }) => s.struts.map((e) => e.index))).toEqual(
    all(truss.members.length),
  );
  expect(placed((s: { panels: number[] }) => s.panels)).toEqual(all(data.panels.length));
});

/** The 3D picture alone, without what lies over it. */
async function pictureOf(page: Page): Promise<Buffer> {
  const url = (await page.evaluate("document.getElementById('truss').toDataURL('image/png')")) as string;
  return Buffer.from(url.slice(url.indexOf(',') + 1), 'base64');
}

/** Share of pixels that differ from the corner's colour: what is drawn. */
function inkShare(png: Buffer): number {
  const { width, height, data } = PNG.sync.read(png);
  let ink = 0;
  for (let i = 0; i < width * height; i++)
    if (
      Math.abs(data[4 * i]! - data[0]!) +
        Math.abs(data[4 * i + 1]! - data[1]!) +
        Math.abs(data[4 * i + 2]! - data[2]!) >
      60
    )
      ink += 1;
  return ink / (width * height);
}
