import PDFDocument from 'pdfkit';
import { type Face, type Faces, facesOf, MOST_RUNS, type ReadFace } from './faces.js';
import type { Fonts } from './fonts.js';
import { type ContentStream, gatherContent } from './gathered-content.js';
import { type Box, corners, type Point } from './geometry2.js';
import { INK, LINE, SIZE } from './ink.js';
import type { LineStyle, PlacedText, TextStyle } from './pen-style.js';

export type { LineStyle, PlacedText, TextStyle } from './pen-style.js';

/** Points of a PDF in one mm. */
export const POINTS = 72 / 25.4;
/** Capital height over type size of the face, from its OS/2 table (668/1000). */
export const CAP = 0.668;
/** Height from the lowest descender to the capitals' top over type size: what a line of text occupies. */
const DESCENT = 0.2;

export interface PenOptions {
  readonly fonts: Fonts;
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  /** Year-month-day, or null: the file then carries no date. */
  readonly date: string | null;
}

/** The parts of pdfkit that its types leave out. */
interface Inner {
  readonly _font: {
    readonly font: ReadFace;
    layoutRun(text: string, features?: unknown): unknown;
  };
  readonly page: { readonly content: ContentStream };
  info: Record<string, unknown>;
}

/**
 * Draws on sheets in mm from the top left corner, y down; text by its baseline. Keeps a list of every text placed.
 * Characters that the face lacks come from the fallback face, and where that lacks them too the replacement mark stands.
 */
export class Pen {
  readonly placed: PlacedText[] = [];
  private readonly doc: PDFKit.PDFDocument;
  private readonly chunks: Uint8Array[] = [];
  private readonly faces: Faces;
  private readonly taken = new Set<Face>();
  private readonly ended: Promise<void>;
  private count = 0;
  private current = -1;

  constructor(options: PenOptions) {
    this.faces = facesOf(options.fonts);
    const created = new Date(`${options.date ?? '1980-01-01'}T00:00:00Z`);
    this.doc = new PDFDocument({
      autoFirstPage: false,
      bufferPages: true,
      // No default face: pdfkit would parse it anew each time its registered twin is asked for.
      font: null as unknown as string,
      lang: 'en',
      displayTitle: true,
      info: {
        Title: options.title,
        Author: options.author,
        Subject: options.subject,
        Producer: 'strutwright',
        Creator: 'strutwright',
        CreationDate: created,
      },
    });
    // pdfkit reads the date in any case, but writes only what can be enumerated.
    if (options.date === null)
      Object.defineProperty((this.doc as unknown as Inner).info, 'CreationDate', { enumerable: false });
    for (const face of ['regular', 'bold', 'fallback', 'fallbackBold'] as const)
      this.doc.registerFont(face, (this.faces.read.get(face) ?? options.fonts[face]) as unknown as string);
    this.doc.on('data', (chunk: Uint8Array) => this.chunks.push(chunk));
    this.ended = new Promise((resolve) => {
      this.doc.on('end', () => resolve());
    });
  }

  get sheets(): number {
    return this.count;
  }

  /** Adds a sheet of the size in mm and draws on it from now on. */
  addSheet(width: number, height: number): void {
    this.doc.addPage({ size: [width * POINTS, height * POINTS], margin: 0 });
    gatherContent((this.doc as unknown as Inner).page.content);
    this.current = this.count++;
  }

  /** Draws on an earlier sheet again. */
  turnTo(sheet: number): void {
    this.doc.switchToPage(sheet);
    this.current = sheet;
  }

  async finish(): Promise<Uint8Array> {
    this.doc.end();
    await this.ended;
    const bytes = new Uint8Array(this.chunks.reduce((n, chunk) => n + chunk.length, 0));
    let offset = 0;
    for (const chunk of this.chunks) {
      bytes.set(chunk, offset);
      offset += chunk.length;
    }
    return bytes;
  }

  /** Width of one line of text in mm. */
  widthOf(text: string, style: TextStyle = {}): number {
    let sum = 0;
    for (const run of this.runs(text, style.bold ?? false)) {
      const key = `${run.face} ${run.text}`;
      let width = this.faces.widths.get(key);
      if (width === undefined) {
        this.take(run.face);
        width = this.doc.fontSize(1000).widthOfString(run.text, FEATURES);
        this.faces.widths.set(key, width);
      }
      sum += width;
    }
    return (sum * (style.size ?? SIZE.body)) / 1000 / POINTS;
  }

  /** Writes one line with its baseline at y; `angle` (rad, clockwise) turns it about (x, y). Returns its width, mm. */
  text(text: string, x: number, y: number, style: TextStyle = {}, angle = 0): number {
    if (text === '') return 0;
    const size = style.size ?? SIZE.body;
    const width = this.widthOf(text, style);
    const shift = style.align === 'right' ? -width : style.align === 'centre' ? -width / 2 : 0;
    this.record(text, x, y, shift, width, size, angle);
    this.doc.save();
    if (angle !== 0) this.doc.rotate((angle * 180) / Math.PI, { origin: [x * POINTS, y * POINTS] });
    this.doc.fillColor(style.colour ?? INK.black).fontSize(size);
    let at = x + shift;
    for (const run of this.runs(text, style.bold ?? false)) {
      this.take(run.face);
      this.doc.text(run.text, at * POINTS, y * POINTS, { ...FEATURES, lineBreak: false, baseline: 'alphabetic' });
      at += this.faces.widths.get(`${run.face} ${run.text}`)! * (size / 1000 / POINTS);
    }
    this.doc.restore();
    return width;
  }

  line(from: Point, to: Point, style: LineStyle = {}): void {
    this.polyline([from, to], style);
  }

  polyline(points: readonly Point[], style: LineStyle = {}, closed = false): void {
    this.trace(points, closed);
    this.stroke(style);
  }

  /** Fills a polygon, and strokes it where a line style is given. */
  polygon(points: readonly Point[], fill: string, style?: LineStyle): void {
    this.trace(points, true);
    this.doc.fill(fill);
    if (style) this.polyline(points, style, true);
  }

  rectangle(x: number, y: number, width: number, height: number, style: LineStyle & { readonly fill?: string }): void {
    const box: Point[] = [
      [x, y],
      [x + width, y],
      [x + width, y + height],
      [x, y + height],
    ];
    if (style.fill) this.polygon(box, style.fill);
    if (style.width !== undefined) this.polyline(box, style, true);
  }

  /** Fills many upright boxes, given by their upper left corners, in one path. */
  fillBoxes(
    boxes: readonly { readonly x: number; readonly y: number; readonly width: number; readonly height: number }[],
    fill: string,
  ): void {
    for (const b of boxes) this.doc.rect(b.x * POINTS, b.y * POINTS, b.width * POINTS, b.height * POINTS);
    this.doc.fill(fill);
  }

  /** A rectangle with half-round ends; a circle where width = height. */
  pill(box: Box, style: LineStyle & { readonly fill?: string }): void {
    const [x, y] = [box.x - box.width / 2, box.y - box.height / 2];
    const draw = (): PDFKit.PDFDocument =>
      this.doc.roundedRect(x * POINTS, y * POINTS, box.width * POINTS, box.height * POINTS, (box.height * POINTS) / 2);
    if (style.fill) {
      draw();
      this.doc.fill(style.fill);
    }
    if (style.width !== undefined) {
      draw();
      this.stroke(style);
    }
  }

  circle(x: number, y: number, radius: number, style: LineStyle & { readonly fill?: string }): void {
    this.pill({ x, y, width: 2 * radius, height: 2 * radius, angle: 0 }, style);
  }

  /** Fills a turned box: the white break under a mark. */
  blot(box: Box, colour: string = INK.white): void {
    this.polygon(corners(box), colour);
  }

  private trace(points: readonly Point[], closed: boolean): void {
    points.forEach(([x, y], i) => {
      if (i === 0) this.doc.moveTo(x * POINTS, y * POINTS);
      else this.doc.lineTo(x * POINTS, y * POINTS);
    });
    if (closed) this.doc.closePath();
  }

  private stroke(style: LineStyle): void {
    this.doc
      .lineWidth((style.width ?? LINE.normal) * POINTS)
      .lineCap(style.cap ?? 'butt')
      .lineJoin('round')
      .strokeColor(style.colour ?? INK.black);
    if (style.dash) this.doc.dash(style.dash[0] * POINTS, { space: style.dash[1] * POINTS });
    this.doc.stroke();
    if (style.dash) this.doc.undash();
  }

  private record(text: string, x: number, y: number, shift: number, width: number, size: number, angle: number): void {
    const height = (size * (CAP + DESCENT)) / POINTS;
    // Middle of the text from the turning point, before turning.
    const [u, v] = [shift + width / 2, (size * (DESCENT - CAP)) / 2 / POINTS];
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    this.placed.push({
      sheet: this.current,
      text,
      x: x + u * c - v * s,
      y: y + u * s + v * c,
      width,
      height,
      angle,
    });
  }

  private runs(text: string, bold: boolean): { readonly face: Face; readonly text: string }[] {
    const own: Face = bold ? 'bold' : 'regular';
    if (this.hasAll(own, text)) return [{ face: own, text }];
    const runs: { face: Face; text: string }[] = [];
    for (const char of text) {
      const behind: Face = bold ? 'fallbackBold' : 'fallback';
      const covered = this.has(own, char);
      const face = covered ? own : behind;
      const shown = covered || this.has(behind, char) ? char : '\uFFFD';
      const last = runs.at(-1);
      if (last?.face === face) last.text += shown;
      else runs.push({ face, text: shown });
    }
    return runs;
  }

  /** Makes a face the present one. pdfkit lays a text with features out anew each time it measures or writes it: once is enough. */
  private take(face: Face): void {
    this.doc.font(face);
    if (this.taken.has(face)) return;
    this.taken.add(face);
    const font = (this.doc as unknown as Inner)._font;
    const { read, runs } = this.faces;
    if (!read.has(face)) read.set(face, font.font);
    const layOut = font.layoutRun.bind(font);
    font.layoutRun = (text, features) => {
      const key = `${face}${features === undefined ? '\n' : ' '}${text}`;
      let run = runs.get(key);
      if (run === undefined) {
        run = layOut(text, features);
        if (runs.size < MOST_RUNS) runs.set(key, run);
      }
      return run;
    };
  }

  private has(face: Face, char: string): boolean {
    return this.hasCode(face, char.codePointAt(0)!);
  }

  /** Whether a face has every character of a text that is not empty: nearly every text, and the test makes no strings. */
  private hasAll(face: Face, text: string): boolean {
    for (let i = 0; i < text.length; i++) {
      const code = text.codePointAt(i)!;
      if (!this.hasCode(face, code)) return false;
      if (code > 0xffff) i++;
    }
    return text !== '';
  }

  private hasCode(face: Face, code: number): boolean {
    const covered = this.faces.covered[face];
    let known = covered.get(code);
    if (known === undefined) {
      this.take(face);
      known = (this.doc as unknown as Inner)._font.font.hasGlyphForCodePoint(code);
      covered.set(code, known);
    }
    return known;
  }
}

/** Tabular figures everywhere: columns stay straight, and a number has the same width wherever it stands. */
const FEATURES = { features: ['tnum'] as unknown as PDFKit.Mixins.OpenTypeFeatures[] };

/** Height of capitals in mm. */
export const capHeight = (size: number): number => (size * CAP) / POINTS;
/** Distance of baselines in mm. */
export const lineHeight = (size: number): number => (size * 1.3) / POINTS;
