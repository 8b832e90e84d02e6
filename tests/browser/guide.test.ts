import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { PackRecords } from '../../src/documents/records.js';
import { finding } from '../../src/model/findings/index.js';
import { exampleRecords } from '../documents/pack-records.js';
import { ladder, RUNGS, writePage } from './guide-page.js';
import { launchBrowser, openFile } from './open-page.js';
import { canvasOf, crossings, inkOf, pixel } from './picture.js';

const DESK = { viewport: { width: 1280, height: 800 }, deviceScaleFactor: 2 };
const PHONE = { viewport: { width: 390, height: 844 }, deviceScaleFactor: 2, hasTouch: true };

let browser: Browser;
let canopy: string;
let rungs: string;
let records: PackRecords;
beforeAll(async () => {
  records = exampleRecords('canopy');
  canopy = writePage(records);
  const plain = ladder();
  rungs = writePage({
    ...plain,
    findings: [finding('member-over-stressed', 'S1', { value: 1.31, limit: 1 }), ...plain.findings],
  });
  browser = await launchBrowser();
}, 120_000);
afterAll(() => browser?.close());

/** Opens a page, hands it over and closes it. */
async function on(path: string, options: BrowserContextOptions, use: (page: Page) => Promise<void>): Promise<void> {
  const context = await browser.newContext(options);
  // Counts what is drawn, by the calls that the page makes of the graphics interface.
  await context.addInitScript(`window.draws = { instanced: 0, single: 0 };
    for (const name of ['drawElementsInstanced', 'drawArraysInstanced', 'drawElements', 'drawArrays']) {
      const real = WebGL2RenderingContext.prototype[name];
      WebGL2RenderingContext.prototype[name] = function (...a) {
        window.draws[name.endsWith('Instanced') ? 'instanced' : 'single'] += 1;
        return real.apply(this, a);
      };
    }`);
  const { page, complaints } = await openFile(context, path);
  await use(page);
  expect(complaints).toEqual([]);
  await context.close();
}

const frame = (page: Page): Promise<unknown> =>
  page.evaluate('new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done)))');

async function toLastStep(page: Page): Promise<void> {
  await page.locator('#slider').fill((await page.locator('#slider').getAttribute('max'))!);
  await frame(page);
}

/** The rungs of the ladder as drawn, lowest first: a column of pixels through their middle. */
async function rungsOf(page: Page): Promise<{ from: number; to: number; hue: string }[][]> {
  const picture = await canvasOf(page, 'truss');
  const { left, right, top, bottom } = inkOf(picture);
  const runs = crossings(picture, (left + right) >> 1);
  // Rungs stand a third of the ladder's height apart; the two lines of a pull a small part of that.
  const near = (bottom - top) / 10;
  const groups: { from: number; to: number; hue: string }[][] = [];
  for (const run of runs.reverse()) {
    const last = groups.at(-1);
    if (last && last.at(-1)!.from - run.to < near) last.push(run);
    else groups.push([run]);
  }
  return groups;
}

describe('the forces on the page', () => {
  it.each(['light', 'dark'] as const)(
    'are drawn as on the sheets, %s: width by the square root, a pull as a double line, a push solid, none thin and grey',
    async (colorScheme) => {
      await on(rungs, { ...DESK, colorScheme }, async (page) => {
        await toLastStep(page);
        await page.getByRole('button', { name: 'Forces' }).click();
        await frame(page);
        expect(await page.locator('#legend').isVisible()).toBe(true);
        const drawn = await rungsOf(page);
        expect(drawn.map((runs) => runs.map((r) => r.hue))).toEqual([
          ['purple'],
          ['purple'],
          ['orange', 'orange'],
          ['grey'],
        ]);
        const wide = drawn.map((runs) => runs[0]!.to - runs.at(-1)!.from + 1);
        // The rungs' forces are as 4 to 1 and equal; a row of pixels is the edge's roundness.
        expect(Math.abs(wide[0]! / wide[1]! - Math.sqrt(RUNGS[0] / RUNGS[1]))).toBeLessThan(0.25);
        expect(Math.abs(wide[2]! - wide[0]!)).toBeLessThanOrEqual(2);
        expect(wide[3]!).toBeLessThan(wide[1]! / 2);
        await page.getByRole('button', { name: 'Forces' }).click();
        await frame(page);
        for (const runs of await rungsOf(page)) expect(runs.map((r) => r.hue)).toEqual(['grey']);
      });
    },
  );

  it('stand in words with their sign where a part is picked', async () => {
    await on(rungs, DESK, async (page) => {
      await page.fill('#mark', 'S0');
      await page.keyboard.press('Enter');
      expect(await page.locator('#picked dl').textContent()).toMatch(/Force\s*−100(\.\d+)? N C/);
      await page.fill('#mark', 'S2');
      await page.keyboard.press('Enter');
      expect(await page.locator('#picked dl').textContent()).toMatch(/Force\s*\+100(\.\d+)? N T/);
    });
  });
});

describe('the findings', () => {
  it('are shown on demand, worst first in words, and beside the part they name', async () => {
    await on(rungs, DESK, async (page) => {
      const list = page.getByRole('region', { name: 'Findings' });
      expect(await list.isVisible()).toBe(false);
      await page.getByRole('button', { name: 'Findings' }).click();
      const rows = await list.getByRole('listitem').allTextContents();
      expect(rows[0]).toMatch(/^Stop\. S1\b.*1\.31/);
      expect(rows.length).toBeGreaterThan(1);
      await page.getByRole('button', { name: 'Findings' }).click();
      expect(await list.isVisible()).toBe(false);
      await page.fill('#mark', 'S1');
      await page.keyboard.press('Enter');
      expect(await page.locator('#picked dl').textContent()).toMatch(/Found\s*S1\b.*1\.31/);
    });
  });
});

describe('a part is picked', () => {
  it.each([
    ['the mouse', DESK, 'mouse'],
    ['a finger', PHONE, 'touchscreen'],
  ] as const)('with %s, and let go on the ground', async (_, options, by) => {
    await on(rungs, options, async (page) => {
      const point = async (x: number, y: number): Promise<void> => {
        if (by === 'mouse') await page.mouse.click(x, y);
        else await page.touchscreen.tap(x, y);
        await frame(page);
      };
      await toLastStep(page);
      const box = (await page.locator('#truss').boundingBox())!;
      const ink = inkOf(await canvasOf(page, 'truss'));
      const middle = (ink.left + ink.right) >> 1;
      const drawn = await rungsOf(page);
      for (const k of [0, 2]) {
        const { from, to } = drawn[k]![0]!;
        await point(box.x + middle / 2, box.y + (from + to) / 4);
        expect(await page.locator('#picked h2').textContent()).toBe(`Strut S${k}`);
        // What was picked is read without scrolling.
        const go = (await page.locator('.go').boundingBox())!;
        const head = (await page.locator('#picked h2').boundingBox())!;
        expect(head.y + head.height).toBeLessThanOrEqual(go.y);
      }
      await point(box.x + 4, box.y + 30);
      expect(await page.locator('#picked').isVisible()).toBe(false);
    });
  });

  it('with the keyboard alone, and let go by Escape', async () => {
    await on(canopy, DESK, async (page) => {
      const look = page.getByRole('button', { name: /^Look at strut / }).first();
      await look.focus();
      await page.keyboard.press('Enter');
      const mark = (await look.getAttribute('aria-label'))!.replace('Look at strut ', '');
      expect(await page.locator('#picked h2').textContent()).toBe(`Strut ${mark}`);
      await page.keyboard.press('Escape');
      expect(await page.locator('#picked').isVisible()).toBe(false);
      await page.keyboard.press('/');
      await page.keyboard.type('P11');
      await page.keyboard.press('Enter');
      expect(await page.locator('#picked h2').textContent()).toBe('Panel P11');
    });
  });
});

it('marks are put away and come back, by the mouse and by the keyboard', async () => {
  await on(canopy, DESK, async (page) => {
    await toLastStep(page);
    const written = async (): Promise<number> => inkOf(await canvasOf(page, 'marks')).count;
    const before = await written();
    expect(before).toBeGreaterThan(1000);
    const button = page.getByRole('button', { name: 'Marks' });
    await button.click();
    await frame(page);
    expect(await button.getAttribute('aria-pressed')).toBe('false');
    expect(await written()).toBe(0);
    await button.focus();
    await page.keyboard.press('Space');
    await frame(page);
    expect(await button.getAttribute('aria-pressed')).toBe('true');
    expect(await written()).toBe(before);
  });
});

describe.each([
  ['a desktop, light', { ...DESK, colorScheme: 'light' }],
  ['a phone, dark', { ...PHONE, colorScheme: 'dark' }],
] as const)('printed from %s', (_, options) => {
  it('it has every step, the whole picture on white, and nothing to press', async () => {
    await on(canopy, options, async (page) => {
      await toLastStep(page);
      await page.locator('#back').click();
      const steps = Number(await page.locator('#slider').getAttribute('max'));
      expect(await page.locator('#all').isVisible()).toBe(false);
      // The sheet is laid out between these two events (HTML standard, 8.8.2); a browser's own print sends both.
      await page.evaluate("window.dispatchEvent(new Event('beforeprint'))");
      await page.emulateMedia({ media: 'print' });
      await frame(page);
      expect(await page.locator('#all li:visible').count()).toBe(steps);
      expect(await page.locator('button:visible, input[type=range]:visible, input[type=search]:visible').count()).toBe(
        0,
      );
      const picture = await canvasOf(page, 'printed');
      expect(pixel(picture, 0, 0)).toEqual([255, 255, 255]);
      const ink = inkOf(picture);
      expect(ink.count).toBeGreaterThan(0.005 * picture.width * picture.height);
      expect(ink.left).toBeGreaterThan(0);
      expect(ink.top).toBeGreaterThan(0);
      expect(ink.right).toBeLessThan(picture.width - 1);
      expect(ink.bottom).toBeLessThan(picture.height - 1);
      const [stage, card] = await Promise.all(['#stage', '#card'].map((s) => page.locator(s).boundingBox()));
      expect(card!.y).toBeGreaterThanOrEqual(stage!.y + stage!.height);
      await page.emulateMedia({ media: 'screen' });
      await page.evaluate("window.dispatchEvent(new Event('afterprint'))");
      await frame(page);
      expect(await page.locator('#next').isVisible()).toBe(true);
      const screen = await canvasOf(page, 'truss');
      expect(inkOf(screen).count).toBeGreaterThan(1000);
      expect(pixel(screen, 0, 0)[0] > 128).toBe(options.colorScheme === 'light');
    });
  });
});

describe('a screen reader', () => {
  it('is told role and name of every control and picture', async () => {
    await on(canopy, DESK, async (page) => {
      const session = await page.context().newCDPSession(page);
      const { nodes } = await session.send('Accessibility.getFullAXTree');
      const named = nodes
        .filter((n) => !n.ignored)
        .map((n) => ({ role: String(n.role?.value), name: String(n.name?.value ?? '') }));
      const controls = named.filter((n) => /^(button|checkbox|slider|searchbox|image|img|region)$/.test(n.role));
      expect(controls.filter((n) => n.name.trim() === '')).toEqual([]);
      const names = (role: RegExp): string[] => controls.filter((n) => role.test(n.role)).map((n) => n.name);
      expect(names(/button/)).toEqual(
        expect.arrayContaining(['Find', 'Marks', 'Forces', 'Findings', 'Whole view', 'Print', 'Back', 'Next', 'Play']),
      );
      expect(names(/slider/)).toEqual(['Step']);
      expect(names(/searchbox/)).toEqual(['Find a mark']);
      expect(names(/image|img/)).toEqual([expect.stringContaining('The truss as it stands after this step')]);
      expect(names(/region/)).toEqual(expect.arrayContaining(['The truss', 'Step']));
      expect(names(/checkbox/).length).toBe(await page.locator('#parts li').count());
    });
  });

  it('is told the step when it changes', async () => {
    await on(canopy, DESK, async (page) => {
      const said = page.locator('[aria-live=polite]#say');
      const first = await said.textContent();
      await page.getByRole('button', { name: 'Next', exact: true }).click();
      const second = await said.textContent();
      expect(second).not.toBe(first);
      expect(second!.trim()).not.toBe('');
      expect(
        await page
          .getByRole('status')
          .filter({ hasText: /^Step 2 of \d+$/ })
          .count(),
      ).toBe(1);
      expect(await page.getByRole('slider').getAttribute('aria-valuetext')).toBe(`step 2: ${second}`);
    });
  });
});

/** Contrast of every visible text with what it stands on, by WCAG 2.1's definition; what cannot be pressed is exempt there (1.4.3). */
const CONTRASTS = `(() => {
  const parse = (c) => c.match(/[\\d.]+/g).map(Number);
  const light = (c) => { const [r, g, b] = c.map((v) => (v / 255 <= 0.04045 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4)); return 0.2126 * r + 0.7152 * g + 0.0722 * b; };
  const ratio = (a, b) => { const [x, y] = [light(a), light(b)].sort((p, q) => q - p); return (x + 0.05) / (y + 0.05); };
  const ground = (e) => { for (; e; e = e.parentElement) { const c = parse(getComputedStyle(e).backgroundColor); if (c.length < 4 || c[3] === 1) return c.slice(0, 3); } return [255, 255, 255]; };
  const out = [];
  for (const e of document.querySelectorAll('body *')) {
    if (!e.checkVisibility() || e.disabled || ![...e.childNodes].some((n) => n.nodeType === 3 && n.textContent.trim())) continue;
    out.push({ text: e.textContent.trim().slice(0, 30), ratio: ratio(parse(getComputedStyle(e).color).slice(0, 3), ground(e)) });
  }
  const css = getComputedStyle(document.documentElement);
  const hex = (name) => css.getPropertyValue('--' + name).trim().replace(/^#(.)(.)(.)$/, '#$1$1$2$2$3$3').match(/[0-9a-f]{2}/gi).map((h) => parseInt(h, 16));
  const lines = ['ink', 'picked', 'tension', 'compression', 'prop'].map((text) => ({ text, ratio: ratio(hex(text), hex('ground')) }));
  return { texts: out, lines, ground: light(hex('ground')) };
})()`;

it.each(['light', 'dark'] as const)(
  'every text has a contrast of 7 : 1 and every line one of 3 : 1, %s (WCAG 2.1, 1.4.6 and 1.4.11)',
  async (colorScheme) => {
    await on(rungs, { ...DESK, colorScheme }, async (page) => {
      await page.getByRole('button', { name: 'Forces' }).click();
      await page.getByRole('button', { name: 'Findings' }).click();
      await page.fill('#mark', 'S1');
      await page.keyboard.press('Enter');
      type Seen = { text: string; ratio: number };
      const seen = (await page.evaluate(CONTRASTS)) as { texts: Seen[]; lines: Seen[]; ground: number };
      expect(seen.texts.length).toBeGreaterThan(20);
      expect(seen.texts.filter((t) => !(t.ratio >= 7))).toEqual([]);
      expect(seen.lines.filter((t) => !(t.ratio >= 3))).toEqual([]);
      expect(seen.ground > 0.5).toBe(colorScheme === 'light');
    });
  },
);

it('turning draws all struts in one call, all hubs in another, whatever their number', async () => {
  await on(canopy, DESK, async (page) => {
    await toLastStep(page);
    const before = await canvasOf(page, 'truss');
    await page.evaluate('window.draws = { instanced: 0, single: 0 }');
    await page.locator('#truss').focus();
    await page.keyboard.press('d');
    await frame(page);
    const draws = (await page.evaluate('window.draws')) as { instanced: number; single: number };
    // Struts, the cores of pulls, hubs, props.
    expect(draws.instanced).toBeGreaterThanOrEqual(2);
    expect(draws.instanced).toBeLessThanOrEqual(4);
    expect(draws.single).toBeLessThanOrEqual(records.parts.panels.length);
    expect((await canvasOf(page, 'truss')).data.equals(before.data)).toBe(false);
  });
});
