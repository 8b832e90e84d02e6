import { quoted } from '../fault.js';
import { type LineFaults, plainNumber } from './text-lines.js';

/** One group of a DXF file: a code, its value, and the line of the value. */
export interface DxfGroup {
  readonly code: number;
  readonly text: string;
  readonly line: number;
}

/** One entity, or one thing of any other section: the groups from its type (code 0) up to the next. */
export interface DxfThing {
  readonly type: string;
  readonly line: number;
  readonly groups: readonly DxfGroup[];
}

/** The sections of a DXF text file (AutoCAD DXF reference, 2012: a code on one line, its value on the next). null, with the fault told, where it is none. */
export function dxfSections(text: string, log: LineFaults): ReadonlyMap<string, readonly DxfThing[]> | null {
  if (text.startsWith('AutoCAD Binary DXF')) {
    log.tell(1, 'is a binary DXF file', 'save it as a text DXF file');
    return null;
  }
  const rows = text.replace(/^\ufeff/, '').split(/\r\n|\n|\r/);
  const sections = new Map<string, DxfThing[]>();
  let section: DxfThing[] | null = null;
  let groups: DxfGroup[] = [];
  let opening = false;
  for (let i = 0; i + 1 < rows.length; i += 2) {
    const code = /^\s*-?\d{1,4}\s*$/.test(rows[i]!) ? Number(rows[i]) : Number.NaN;
    const value = rows[i + 1]!.trim();
    if (Number.isNaN(code)) {
      log.tell(
        i + 1,
        `${quoted(rows[i]!.trim())} is not a group code`,
        'check that the file is a DXF file, and export it again',
      );
      return null;
    }
    if (opening && code === 2) {
      section = sections.get(value) ?? [];
      sections.set(value, section);
      // Header variables come without a type: they are gathered as one thing.
      groups = [];
      section.push({ type: '', line: i + 2, groups });
      opening = false;
    } else if (code === 0) {
      opening = value === 'SECTION';
      if (value === 'EOF') return sections;
      if (value === 'ENDSEC') section = null;
      groups = [];
      section?.push({ type: value, line: i + 2, groups });
    } else if (code !== 999) groups.push({ code, text: value, line: i + 2 });
  }
  if (sections.size === 0) {
    log.tell(1, 'is not a DXF file', 'give a file with SECTION and ENTITIES');
    return null;
  }
  log.tell(rows.length, 'ends before its EOF', 'export it again');
  return null;
}

/** The first value of a code as text, or null. */
export const textOf = (thing: DxfThing, code: number): string | null =>
  thing.groups.find((g) => g.code === code)?.text ?? null;

/** The first value of a code as a number; `absent` where it is not there, NaN where it is no number. */
export function numberOf(thing: DxfThing, code: number, absent = 0): number {
  const text = textOf(thing, code);
  return text === null ? absent : plainNumber(text);
}
