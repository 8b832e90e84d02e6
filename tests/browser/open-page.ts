import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

const ARGUMENTS = [
  '--no-sandbox',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
];

/** One browser for pages of several sizes and themes. */
export const launchBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: '/usr/bin/chromium', headless: true, args: ARGUMENTS });

/** Debian's Chromium without a display, a graphics card or anything it does by itself on the network. */
export function openBrowser(viewport: { width: number; height: number }, touch = false): Promise<BrowserContext> {
  return chromium.launchPersistentContext(mkdtempSync(join(tmpdir(), 'strutwright-browser-')), {
    executablePath: '/usr/bin/chromium',
    headless: true,
    viewport,
    hasTouch: touch,
    args: ARGUMENTS,
  });
}

/** Opens a file from disk and collects whatever it complains of or asks for. */
export async function openFile(
  context: BrowserContext,
  path: string,
): Promise<{ page: Page; complaints: string[]; requests: string[] }> {
  const page = await context.newPage();
  const complaints: string[] = [];
  const requests: string[] = [];
  page.on('console', (m) => {
    // A software renderer warns of its own slowness; the page has no part in that.
    if (m.type() === 'error' || (m.type() === 'warning' && !/GPU stall|GroupMarker|swiftshader/i.test(m.text())))
      complaints.push(m.text());
  });
  page.on('pageerror', (e) => complaints.push(String(e)));
  page.on('request', (r) => requests.push(r.url()));
  await page.goto(`file://${path}`);
  await page.waitForSelector('body[data-ready]', { timeout: 30_000 });
  return { page, complaints, requests };
}
