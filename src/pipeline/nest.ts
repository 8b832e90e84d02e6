import { drawingToDxf } from '../documents/formats/dxf.js';
import { drawingToSvg } from '../documents/formats/svg.js';
import { sayKerf } from '../documents/panels/kerf.js';
import { sheetDrawing } from '../documents/panels/sheet-drawing.js';
import { FileFault } from '../machine/file-fault.js';
import { readText } from '../machine/files.js';
import { sha256 } from '../machine/hash.js';
import { basename } from '../machine/paths.js';
import type { Job } from '../model/job/index.js';
import { LIMITS } from '../model/limits.js';
import type { PanelPart } from '../model/parts.js';
import { VERSION } from '../model/version.js';
import { type NestingHelp, nestPanels } from '../planning/nesting/nest-panels.js';
import type { NestingAnswer, NestingSheet } from '../planning/nesting/request.js';
import { sayFault } from '../readers/fault.js';
import type { OutlinesReading } from '../readers/outlines/outline.js';
import { readDxfOutlines } from '../readers/outlines/outlines-dxf.js';
import { readJsonOutlines } from '../readers/outlines/outlines-json.js';
import { readSvgOutlines } from '../readers/outlines/outlines-svg.js';
import { packWriter, type WriteFile } from './pack-writer.js';

export interface NestCall {
  readonly file: string;
  readonly sheets: readonly NestingSheet[];
  readonly cutter: Job['cutter'];
  readonly rotations: readonly number[] | null;
  readonly seed: number;
  readonly timeLimitMs: number | null;
}

export interface NestOutcome {
  readonly reading: OutlinesReading;
  readonly answer: NestingAnswer;
}

const READERS: Readonly<Record<string, (text: string, name: string) => OutlinesReading>> = {
  json: readJsonOutlines,
  dxf: readDxfOutlines,
  svg: readSvgOutlines,
};

/** Reads a file of outlines and lays them on sheets; or every fault, one line each. */
export async function nestFile(
  call: NestCall,
  help: NestingHelp,
): Promise<NestOutcome | { readonly faults: readonly string[] }> {
  const ending = call.file.split('.').at(-1)!.toLowerCase();
  const read = READERS[ending];
  if (!read) return { faults: [`${call.file}: is no .json, .dxf or .svg file: give outlines in one of these`] };
  try {
    const reading = read(await readText(call.file, 4 * LIMITS.fileCharacters), call.file);
    if (reading.faults.length > 0) return { faults: reading.faults.map(sayFault) };
    const answer = await nestPanels(
      {
        panels: reading.outlines.map((o) => ({
          mark: o.mark,
          outline: o.outline,
          quantity: o.quantity,
          rotations: o.rotations ?? call.rotations ?? undefined,
        })),
        sheets: call.sheets,
        spacing: call.cutter.spacing_mm,
        margin: call.cutter.margin_mm,
        seed: call.seed,
        effort: call.cutter.effort,
        ...(call.timeLimitMs === null ? {} : { timeLimitMs: call.timeLimitMs }),
      },
      help,
    );
    if (answer.faults.length > 0)
      return { faults: answer.faults.map((f) => `${call.file}: ${f.place}: ${f.wrong}: ${f.mend}`) };
    return { reading, answer };
  } catch (error) {
    if (error instanceof FileFault) return { faults: [error.message] };
    throw error;
  }
}

/** The plan as nesting.json writes it. */
export function nestJson(call: NestCall, outcome: NestOutcome): object {
  const { answer } = outcome;
  return {
    format: 'strutwright-nesting/1',
    spacing_mm: call.cutter.spacing_mm,
    margin_mm: call.cutter.margin_mm,
    kerf: {
      kerf_mm: call.cutter.kerf_mm,
      measured: call.cutter.kerfMeasured,
      compensated: call.cutter.compensate,
      says: sayKerf(call.cutter),
    },
    sheets: answer.sheets.map((s, i) => {
      const kind = call.sheets.find((k) => k.name === s.sheet)!;
      return {
        mark: markOf(i),
        sheet: s.sheet,
        width_mm: kind.width,
        height_mm: kind.height,
        yield: s.yield,
        placements: s.placements,
      };
    }),
    lowerBound: answer.lowerBound,
    unplaced: answer.unplaced,
    ...(answer.stopped ? { stopped: answer.stopped } : {}),
  };
}

const markOf = (sheet: number): string => `sheet-${String(sheet + 1).padStart(2, '0')}`;

/** Writes the machine files of a plan, nesting.json and a manifest. */
export async function writeNest(call: NestCall, outcome: NestOutcome, write: WriteFile): Promise<void> {
  const writer = packWriter(write);
  const { answer, reading } = outcome;
  const panels = new Map(reading.outlines.map((o) => [o.mark, flatPanel(o)]));
  const files = new Map<string, Set<string>>();
  for (const [i, sheet] of answer.sheets.entries()) {
    const kind = call.sheets.find((k) => k.name === sheet.sheet)!;
    const planned = { ...sheet, mark: markOf(i), width: kind.width, height: kind.height, material: '', thickness: 0 };
    const drawing = sheetDrawing(planned, kind, panels, call.cutter, `${basename(call.file)}, ${markOf(i)}`);
    for (const [ending, text] of [
      ['svg', drawingToSvg(drawing)],
      ['dxf', drawingToDxf(drawing)],
    ] as const) {
      const path = `sheets/${markOf(i)}.${ending}`;
      await writer.put(path, text);
      for (const p of sheet.placements) files.set(p.mark, (files.get(p.mark) ?? new Set()).add(path));
    }
  }
  await writer.put('nesting.json', `${JSON.stringify(nestJson(call, outcome), null, 2)}\n`);
  const manifest = {
    format: 'strutwright-pack/1',
    title: basename(call.file),
    revision: 'A',
    program: `strutwright ${VERSION}`,
    status: answer.unplaced.length > 0 ? 'flagged' : 'clear',
    inputs: [{ path: basename(call.file), sha256: sha256(await readText(call.file, 4 * LIMITS.fileCharacters)) }],
    kerf: { kerf_mm: call.cutter.kerf_mm, measured: call.cutter.kerfMeasured, compensated: call.cutter.compensate },
    parts: reading.outlines.map((o) => ({
      mark: o.mark,
      kind: 'panel',
      digest: sha256(JSON.stringify([o.outline, o.holes])),
      files: [...(files.get(o.mark) ?? [])],
    })),
    files: writer.files(),
  };
  await write('manifest.json', new TextEncoder().encode(`${JSON.stringify(manifest, null, 2)}\n`));
}

/** A panel that is nothing but its outline and holes. */
function flatPanel(o: OutlinesReading['outlines'][number]): PanelPart {
  return {
    mark: o.mark,
    face: o.mark,
    group: null,
    material: null,
    thickness: 0,
    seating: 'between',
    flatness: 0,
    frame: { origin: [0, 0, 0], x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
    outline: o.outline,
    holes: o.holes,
    edges: [],
    engraving: [],
    area: 0,
    mass: null,
    holding: '',
    makeable: true,
  };
}
