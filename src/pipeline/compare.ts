import { parse } from 'csv-parse/sync';
import type { ComparedPart, Comparison, Difference, Issued } from '../model/comparison.js';
import { PART_KINDS, type PartKind } from '../model/part-kind.js';
import type { ReadManifest, ReadPack } from './read-pack.js';

type Part = ReadManifest['parts'][number];

const keyOf = (p: { readonly kind: string; readonly mark: string }): string => `${p.kind} ${p.mark}`;

/**
 * What stands between two packs, part by part: by digest unchanged, by form relabelled only, else changed, new or withdrawn. A
 * part under a new mark that has the form of a withdrawn one counts as that one relabelled.
 */
export async function comparePacks(before: ReadPack, after: ReadPack): Promise<Comparison> {
  const [olds, news] = [before, after].map((p) => new Map(p.manifest.parts.map((part) => [keyOf(part), part]))) as [
    Map<string, Part>,
    Map<string, Part>,
  ];
  const [measuresBefore, measuresAfter] = [await measuresOf(before), await measuresOf(after)];
  const unchanged: ComparedPart[] = [];
  const relabelled: (ComparedPart & { was: string })[] = [];
  const changed: (ComparedPart & { what: Difference[] })[] = [];
  const added: Part[] = [];
  for (const [key, part] of news) {
    const old = olds.get(key);
    const who = { kind: part.kind, mark: part.mark };
    if (!old) added.push(part);
    else if (old.digest !== null && old.digest === part.digest) unchanged.push(who);
    else if (old.form !== null && old.form === part.form) relabelled.push({ ...who, was: old.mark });
    else {
      const what = differences(measuresBefore.get(key), measuresAfter.get(key));
      // Neither was made: with no measure that differs there is nothing to tell.
      if (old.digest === null && part.digest === null && what.length === 0) unchanged.push(who);
      else changed.push({ ...who, what });
    }
  }
  const gone = [...olds.values()].filter((p) => !news.has(keyOf(p)));
  const fresh = added.filter((part) => {
    const twin = part.form === null ? -1 : gone.findIndex((p) => p.kind === part.kind && p.form === part.form);
    if (twin < 0) return true;
    relabelled.push({ kind: part.kind, mark: part.mark, was: gone.splice(twin, 1)[0]!.mark });
    return false;
  });
  const plain = (parts: readonly Part[]): ComparedPart[] => parts.map(({ kind, mark }) => ({ kind, mark }));
  const groups = { unchanged, relabelled, changed, new: plain(fresh), withdrawn: plain(gone) };
  return {
    format: 'strutwright-compare/1',
    from: issueOf(before.manifest),
    to: issueOf(after.manifest),
    ...groups,
    totals: Object.fromEntries(Object.entries(groups).map(([name, parts]) => [name, countKinds(parts)])),
  };
}

const issueOf = ({ title, revision, date }: ReadManifest): Issued => ({ title, revision, date });

const countKinds = (parts: readonly ComparedPart[]): Record<PartKind, number> =>
  Object.fromEntries(PART_KINDS.map((kind) => [kind, parts.filter((p) => p.kind === kind).length])) as Record<
    PartKind,
    number
  >;

type Measures = ReadonlyMap<string, number | string | null>;

/** Measures that a person checks a part by, from the tables of a pack. */
async function measuresOf(pack: ReadPack): Promise<ReadonlyMap<string, Measures>> {
  const all = new Map<string, Map<string, number | string | null>>();
  const put = (key: string, name: string, value: number | string | null): void => {
    all.set(key, (all.get(key) ?? new Map()).set(name, value));
  };
  for (const row of rows(await pack.text('struts/cut-list.csv')))
    for (const name of ['cut_length_mm', 'section', 'from', 'to'])
      put(`strut ${row['mark']}`, name, cellValue(row[name]));
  for (const row of rows(await pack.text('nodes/bar-angles.csv')))
    put(`node ${row['node']}`, `angle_deg ${row['strut_a']} ${row['strut_b']}`, cellValue(row['angle_deg']));
  for (const row of rows(await pack.text('nodes/bar-directions.csv')))
    for (const name of ['setback_mm', 'socket_depth_mm'])
      put(`node ${row['node']}`, `${name} ${row['strut']}`, cellValue(row[name]));
  for (const row of rows(await pack.text('panels/panel-list.csv')))
    for (const name of ['area_mm2', 'thickness_mm', 'corners', 'flatness_mm'])
      put(`panel ${row['mark']}`, name, cellValue(row[name]));
  for (const [mark, outline] of outlines(await pack.text('panels/outlines.json')))
    for (const [i, length] of outline.entries()) put(`panel ${mark}`, `edge_mm ${i + 1}`, length);
  return all;
}

/** Edge lengths of each panel, by mark; nothing where the file is not what it should be. */
function outlines(text: string | null): [string, number[]][] {
  let file: unknown;
  try {
    file = JSON.parse(text ?? '{}');
  } catch {
    return [];
  }
  return Object.entries(file ?? {}).flatMap(([mark, panel]): [string, number[]][] => {
    const outline = (panel as { outline?: unknown } | null)?.outline;
    if (!Array.isArray(outline)) return [];
    const points = outline.filter(
      (p): p is [number, number] => Array.isArray(p) && p.every((v) => typeof v === 'number'),
    );
    return [
      [
        mark,
        points.map(([x, y], k) => {
          const [u, v] = points[(k + 1) % points.length]!;
          return Math.round(Math.hypot(u - x, v - y) * 1000) / 1000;
        }),
      ],
    ];
  });
}

type Row = Readonly<Record<string, string>>;

/** Rows of a table of a pack, comma or semicolon; none where there is no such table. */
function rows(text: string | null): readonly Row[] {
  if (text === null) return [];
  const semicolon = (text.split('\n')[0] ?? '').includes(';');
  try {
    const parsed: Row[] = parse(text, {
      bom: true,
      columns: true,
      delimiter: semicolon ? ';' : ',',
      relax_column_count: true,
    });
    return semicolon ? parsed.map(withPoints) : parsed;
  } catch {
    return [];
  }
}

const withPoints = (row: Row): Row =>
  Object.fromEntries(
    Object.entries(row).map(([name, cell]) => [name, /^-?\d+,\d+$/.test(cell) ? cell.replace(',', '.') : cell]),
  );

function cellValue(cell: string | undefined): number | string | null {
  if (cell === undefined || cell === '') return null;
  return Number.isFinite(Number(cell)) ? Number(cell) : cell;
}

/** Machines and hands do not see less than this: printed lengths and angles have three decimals. */
const SAME = 0.0015;

function differences(before: Measures | undefined, after: Measures | undefined): Difference[] {
  const names = [...new Set([...(before?.keys() ?? []), ...(after?.keys() ?? [])])];
  return names.flatMap((name): Difference[] => {
    const [from, to] = [before?.get(name) ?? null, after?.get(name) ?? null];
    const same = typeof from === 'number' && typeof to === 'number' ? Math.abs(from - to) < SAME : from === to;
    return same ? [] : [{ name, from, to }];
  });
}
