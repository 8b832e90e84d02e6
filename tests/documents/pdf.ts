import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { overlap } from '../../src/documents/kit/geometry2.js';
import type { PlacedText } from '../../src/documents/kit/pen.js';

/** Runs a command on the bytes as a file, its path in place of `%`. Throws where the command fails. */
export function onFile(bytes: Uint8Array, command: string, args: readonly string[]): string {
  const dir = mkdtempSync(join(tmpdir(), 'paper-'));
  try {
    const path = join(dir, 'paper.pdf');
    writeFileSync(path, bytes);
    return execFileSync(
      command,
      args.map((a) => (a === '%' ? path : a)),
      { encoding: 'utf8', timeout: 60_000, maxBuffer: 1 << 28 },
    );
  } finally {
    rmSync(dir, { recursive: true, force: true });
  }
}

/** qpdf's verdict: throws on a damaged file. */
export const checkPdf = (bytes: Uint8Array): string => onFile(bytes, 'qpdf', ['--check', '%']);

export const textOf = (bytes: Uint8Array): string => onFile(bytes, 'pdftotext', ['-layout', '%', '-']);

export interface Word {
  readonly page: number;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly text: string;
}

/** Words with their upright bounds in points, and the pages' sizes, by poppler. */
export function wordsOf(bytes: Uint8Array): {
  readonly words: Word[];
  readonly pages: { width: number; height: number }[];
} {
  const html = onFile(bytes, 'pdftotext', ['-bbox', '%', '-']);
  const words: Word[] = [];
  const pages: { width: number; height: number }[] = [];
  for (const match of html.matchAll(
    /<page width="([\d.]+)" height="([\d.]+)">|<word xMin="([-\d.]+)" yMin="([-\d.]+)" xMax="([-\d.]+)" yMax="([-\d.]+)">(.*?)<\/word>/g,
  )) {
    if (match[1] !== undefined) pages.push({ width: Number(match[1]), height: Number(match[2]) });
    else
      words.push({
        page: pages.length - 1,
        x0: Number(match[3]),
        y0: Number(match[4]),
        x1: Number(match[5]),
        y1: Number(match[6]),
        text: match[7]!,
      });
  }
  return { words, pages };
}

/** Pairs of placed texts that overlap by more than 0.2 mm, in words. */
export function overlaps(placed: readonly PlacedText[]): string[] {
  const found: string[] = [];
  const bySheet = new Map<number, PlacedText[]>();
  for (const text of placed) bySheet.set(text.sheet, [...(bySheet.get(text.sheet) ?? []), text]);
  for (const texts of bySheet.values())
    for (let i = 0; i < texts.length; i++)
      for (let j = i + 1; j < texts.length; j++)
        if (overlap(texts[i]!, texts[j]!, 0.2))
          found.push(`sheet ${texts[i]!.sheet + 1}: "${texts[i]!.text}" on "${texts[j]!.text}"`);
  return found;
}

/** Words that leave their page or its free edge of 10 mm, with half a millimetre for what a font reaches over. */
export function outside(bytes: Uint8Array): string[] {
  const { words, pages } = wordsOf(bytes);
  const edge = (9.5 * 72) / 25.4;
  return words
    .filter((w) => {
      const page = pages[w.page]!;
      return w.x0 < edge || w.y0 < edge || w.x1 > page.width - edge || w.y1 > page.height - edge;
    })
    .map((w) => `sheet ${w.page + 1}: ${w.text}`);
}
