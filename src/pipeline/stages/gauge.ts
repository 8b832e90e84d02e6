import { drawingToDxf } from '../../documents/formats/dxf.js';
import { writeStl } from '../../documents/formats/stl.js';
import { drawingToSvg } from '../../documents/formats/svg.js';
import { packObject } from '../../documents/formats/three-mf.js';
import type { Fonts } from '../../documents/kit/fonts.js';
import { gaugeSheet, type MadeGauge } from '../../documents/nodes/gauge-sheet.js';
import { pieceIcon } from '../../documents/nodes/piece-pictures.js';
import { kerfComb } from '../../documents/panels/kerf-comb.js';
import { deflateBlocks } from '../../machine/deflate.js';
import { sha256 } from '../../machine/hash.js';
import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Job } from '../../model/job/index.js';
import type { Section } from '../../model/section.js';
import { shapeGauge } from '../../shaping/gauge.js';
import type { PackPart, PackWriter } from '../pack-writer.js';
import { type PrintablePiece, writeBedFiles } from './beds.js';
import { planOf, viewOf } from './piece-view.js';

/** Where the gauge's files go, each with its last slash or empty. */
export interface GaugeFolders {
  readonly prints: string;
  readonly beds: string;
  readonly comb: string;
}

export interface WrittenGauges {
  readonly parts: readonly PackPart[];
  /** Sections whose gauge could not be made. */
  readonly failed: readonly string[];
}

const MM3_TO_M3 = 1e-9;

/**
 * Writes the fit gauge of each section, the first as gauge.stl, the others as gauge-SECTION.stl, the beds they are printed on, and
 * the sheet that says how to read them. The comb is named on the sheet where `comb` says so; it is written elsewhere.
 */
export async function writeGauges(
  sections: readonly Section[],
  job: Job,
  writer: PackWriter,
  folders: GaugeFolders,
  comb: boolean,
  fonts: Fonts,
): Promise<WrittenGauges> {
  const parts: PackPart[] = [];
  const failed: string[] = [];
  const made: MadeGauge[] = [];
  const pieces: PrintablePiece[] = [];
  const marks = gaugeMarks(sections);
  const density = materialNamed(job, job.nodes.material)?.density ?? 0;
  for (const [i, section] of sections.entries()) {
    const piece = await shapeGauge(section, job);
    if (!piece) {
      failed.push(section.name);
      continue;
    }
    const mark = marks[i]!;
    const bytes = writeStl(piece.positions, piece.triangles, `gauge ${section.name}`);
    const file = `${folders.prints}${mark}.stl`;
    await writer.put(file, bytes);
    const digest = sha256(bytes);
    parts.push({ mark, kind: 'gauge', digest, form: digest, revision: job.revision, files: [file] });
    made.push({ section, piece, file });
    const view = viewOf(piece);
    const icon = pieceIcon(piece.positions, piece.triangles, deflateBlocks);
    const number = `gauge ${section.name}`;
    const object = packObject(piece.positions, piece.triangles, i + 1, mark, number, deflateBlocks, icon);
    pieces.push({
      mark,
      piece: '',
      box: piece.box,
      volume: piece.volume,
      mass: piece.volume * MM3_TO_M3 * density,
      footprint: view.footprint,
      load: async () => ({ object, plan: planOf(view.plan) }),
    });
  }
  await writeBedFiles(pieces, job, `${folders.beds}gauge-`, writer);
  if (made.length > 0 || comb) {
    const sheet = await gaugeSheet(
      { issue: { job }, gauges: made, comb: comb ? `${folders.comb}kerf-comb.svg or .dxf` : null },
      fonts,
    );
    await writer.put(`${folders.prints}gauge.pdf`, sheet.bytes);
  }
  return { parts, failed };
}

/** Names of the gauges' files: the first plain, the others by section, whatever a section may be called. */
export function gaugeMarks(sections: readonly Section[]): string[] {
  const taken = new Set<string>();
  return sections.map(({ name }, i) => {
    const plain = `gauge-${name.replaceAll(/[^A-Za-z0-9._-]+/g, '-')}`;
    const mark = i === 0 ? 'gauge' : taken.has(plain.toLowerCase()) ? `${plain}-${i + 1}` : plain;
    taken.add(mark.toLowerCase());
    return mark;
  });
}

/** Writes the kerf comb as SVG and DXF. */
export async function writeKerfComb(job: Job, writer: PackWriter, folder: string): Promise<void> {
  const comb = kerfComb(job.cutter);
  await writer.put(`${folder}kerf-comb.svg`, drawingToSvg(comb));
  await writer.put(`${folder}kerf-comb.dxf`, drawingToDxf(comb));
}

/** Sections by use, the most used first; of equals the first in the truss. */
export function sectionsByUse(sections: readonly (Section | null)[]): Section[] {
  const uses = new Map<string, { section: Section; count: number }>();
  for (const section of sections) {
    if (!section) continue;
    const use = uses.get(section.name);
    if (use) use.count++;
    else uses.set(section.name, { section, count: 1 });
  }
  return [...uses.values()].sort((a, b) => b.count - a.count).map((u) => u.section);
}
