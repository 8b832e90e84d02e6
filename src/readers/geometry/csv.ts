import { nearest } from '../../maths/nearest.js';
import type { Vec3 } from '../../maths/vec3.js';
import { markKey, markProblem } from '../../model/marks.js';
import type { RawGeometry, RawLine, RawPoint, RawReading } from '../../model/raw-geometry.js';
import { LENGTH_IN_MM, type LengthUnit } from '../../model/units.js';
import { type Fault, quoted } from '../fault.js';
import { newtonsIn } from './force-unit.js';
import { type Column, cellOf, columnNamed, missingColumn, readTable, type Table } from './table.js';
import { groupName, LineFaults } from './text-lines.js';

const ID = ['id', 'mark', 'name', 'node', 'joint', 'point', 'strut', 'member', 'bar', 'no', 'number'];
const FROM = ['from', 'start', 'from node', 'start node', 'node a', 'a', 'node 1', 'node i', 'i', 'end 1'];
const TO = ['to', 'end', 'to node', 'end node', 'node b', 'b', 'node 2', 'node j', 'j', 'end 2'];
const FORCE = ['force', 'axial force', 'normal force', 'axial', 'n'];
const GROUP = ['group', 'layer'];
const SECTION = ['section', 'profile'];
const axis = (name: string): string[] => [name, `coordinate ${name}`, `${name} coordinate`];
const endAxis = (name: string, end: 1 | 2): string[] => [
  `${name}${end}`,
  `${name} ${end}`,
  end === 1 ? `from ${name}` : `to ${name}`,
];

/** The nearest name is looked for this often: in a table where none fits, it would take longer than all the rest. */
const SUGGESTIONS = 50;

/** A force that a table gives to the strut between two nodes, N, tension positive. */
export interface PairForce {
  readonly nodes: readonly [string, string];
  readonly force: number;
  readonly line: number;
}

/**
 * Reads struts from tables: either nodes (a name and x, y, z) with a second table of struts (from, to and perhaps a name, force,
 * group, section), or one table of struts with the coordinates of both ends (x1, y1, z1, x2, y2, z2). Columns are found by
 * plain names whatever the case; a unit in brackets behind a coordinate's name is the file's unit, behind a force's its own.
 */
export function readCsv(
  text: string,
  name: string,
  struts: { readonly text: string; readonly name: string } | null,
): RawReading<Fault> {
  const log = new LineFaults(name);
  const table = readTable(text, log);
  if (!table) return { geometry: null, faults: log.faults };
  if (endColumns(table)) {
    const { lines, unit } = linesByCoordinates(table, log);
    return result(log.faults, { unit, up: null, points: [], lines, loops: [], leftOut: new Map() });
  }
  const nodes = readNodes(table, log);
  if (!struts && log.faults.length === 0)
    log.tell(1, 'has nodes and no struts', 'give the table of struts with --members');
  if (!struts) return { geometry: null, faults: log.faults };
  const strutLog = new LineFaults(struts.name);
  const strutTable = readTable(struts.text, strutLog);
  const lines = strutTable ? linesByNodes(strutTable, nodes.points, strutLog) : [];
  return result([...log.faults, ...strutLog.faults], {
    unit: nodes.unit,
    up: null,
    points: nodes.points,
    lines,
    loops: [],
    leftOut: new Map(),
  });
}

const result = (faults: readonly Fault[], geometry: RawGeometry): RawReading<Fault> => ({
  geometry: faults.length === 0 ? geometry : null,
  faults,
});

/** Reads forces by node pair: columns from, to, force. */
export function readPairForces(
  text: string,
  name: string,
): { readonly forces: readonly PairForce[]; readonly faults: readonly Fault[] } {
  const log = new LineFaults(name);
  const table = readTable(text, log);
  if (!table) return { forces: [], faults: log.faults };
  const [from, to, force] = [columnNamed(table, FROM), columnNamed(table, TO), columnNamed(table, FORCE)];
  if (!from) missingColumn(log, table, 'the first node', FROM);
  if (!to) missingColumn(log, table, 'the second node', TO);
  if (!force) missingColumn(log, table, 'the force', FORCE);
  if (!from || !to || !force) return { forces: [], faults: log.faults };
  const forces = table.rows.map((row): PairForce => {
    const value = table.number(cellOf(row, force)) * newtonsIn(force.unit);
    if (Number.isNaN(value))
      log.tell(row.line, `the force ${quoted(cellOf(row, force))} is not a number`, 'write a number');
    return { nodes: [cellOf(row, from), cellOf(row, to)], force: value, line: row.line };
  });
  return { forces, faults: log.faults };
}

interface Named {
  readonly points: readonly RawPoint[];
  readonly unit: LengthUnit | null;
}

function readNodes(table: Table, log: LineFaults): Named {
  const id = columnNamed(table, ID);
  const axes = ['x', 'y', 'z'].map((name) => columnNamed(table, axis(name)));
  if (!id) missingColumn(log, table, "the nodes' names", ['node', 'id', 'mark']);
  axes.forEach((column, k) => {
    if (!column) missingColumn(log, table, 'xyz'[k]!, ['xyz'[k]!]);
  });
  if (!id || axes.some((a) => !a)) return { points: [], unit: null };
  const seen = new Map<string, number>();
  const points = table.rows.map((row): RawPoint => {
    const mark = cellOf(row, id);
    if (mark === '') log.tell(row.line, 'the node has no name', 'write one');
    const before = seen.get(markKey(mark));
    if (before !== undefined)
      log.tell(row.line, `the node ${quoted(mark)} stands in line ${before} too`, 'keep one of them');
    seen.set(markKey(mark), row.line);
    return { mark, at: pointOf(table, row, axes, log) };
  });
  mustBeMarks(table, id, 'node', log);
  return { points, unit: unitOf(axes, log) };
}

/** Identifiers are marks, or all of them plain numbers, which get a letter in front. */
function mustBeMarks(table: Table, id: Column, kind: string, log: LineFaults): void {
  const named = table.rows.map((row) => ({ mark: cellOf(row, id), line: row.line })).filter(({ mark }) => mark !== '');
  if (named.every(({ mark }) => /^[0-9]{1,20}$/.test(mark))) return;
  for (const { mark, line } of named) {
    const problem = markProblem(mark);
    if (problem) log.tell(line, `the ${kind} ${quoted(mark)} ${problem.what}`, problem.mend);
  }
}

function pointOf(
  table: Table,
  row: { readonly cells: readonly string[]; readonly line: number },
  axes: readonly (Column | null)[],
  log: LineFaults,
): Vec3 {
  const at = axes.map((column) => table.number(cellOf(row, column)));
  const wrong = at.findIndex(Number.isNaN);
  if (wrong >= 0)
    log.tell(
      row.line,
      `${quoted(cellOf(row, axes[wrong]!))} is not a coordinate`,
      'write a number with a decimal point or comma',
    );
  return at as unknown as Vec3;
}

/** The unit that the coordinates' columns name, if any; they must agree. */
function unitOf(axes: readonly (Column | null)[], log: LineFaults): LengthUnit | null {
  const units = new Set(axes.map((a) => a?.unit?.toLowerCase() ?? null));
  if (units.size > 1) log.tell(1, 'the coordinates are in different units', 'name one unit in all of their columns');
  const [unit] = units;
  return unit && Object.hasOwn(LENGTH_IN_MM, unit) ? (unit as LengthUnit) : null;
}

function linesByNodes(table: Table, nodes: readonly RawPoint[], log: LineFaults): RawLine[] {
  const byName = new Map(nodes.map((n) => [markKey(n.mark ?? ''), n]));
  const [from, to] = [columnNamed(table, FROM), columnNamed(table, TO)];
  if (!from) missingColumn(log, table, 'the first node', FROM);
  if (!to) missingColumn(log, table, 'the second node', TO);
  if (!from || !to) return [];
  const attributes = attributesOf(table, log);
  return table.rows.flatMap((row): RawLine[] => {
    const ends = [from, to].map((column) => {
      const mark = cellOf(row, column);
      const node = byName.get(markKey(mark));
      if (!node) {
        const near =
          log.faults.length < SUGGESTIONS
            ? nearest(
                mark,
                nodes.map((n) => n.mark ?? ''),
              )
            : null;
        log.tell(
          row.line,
          `names node ${quoted(mark)}, which the nodes do not have`,
          near ? `write ${quoted(near)}, or add the node` : 'add the node',
        );
      }
      return node?.at;
    });
    const [a, b] = ends;
    return a && b ? [{ ends: [a, b], ...attributes(row) }] : [];
  });
}

/** Columns of both ends' coordinates, x1 to z2; null where the table has none such. */
function endColumns(table: Table): readonly [(Column | null)[], (Column | null)[]] | null {
  const of = (end: 1 | 2): (Column | null)[] => ['x', 'y', 'z'].map((name) => columnNamed(table, endAxis(name, end)));
  const ends = [of(1), of(2)] as const;
  return ends.every((axes) => axes.every(Boolean)) ? ends : null;
}

function linesByCoordinates(table: Table, log: LineFaults): { lines: RawLine[]; unit: LengthUnit | null } {
  const ends = endColumns(table)!;
  const attributes = attributesOf(table, log);
  const lines = table.rows.map(
    (row): RawLine => ({
      ends: [pointOf(table, row, ends[0], log), pointOf(table, row, ends[1], log)],
      ...attributes(row),
    }),
  );
  return { lines, unit: unitOf(ends.flat(), log) };
}

type Row = Table['rows'][number];

/** What a row says of its strut beside its ends. */
function attributesOf(table: Table, log: LineFaults): (row: Row) => Omit<RawLine, 'ends'> {
  const [id, force, group, section] = [ID, FORCE, GROUP, SECTION].map((names) => columnNamed(table, names));
  if (id) mustBeMarks(table, id, 'strut', log);
  return (row) => {
    const text = cellOf(row, force ?? null);
    const value = text === '' ? null : table.number(text) * newtonsIn(force?.unit ?? null);
    if (value !== null && Number.isNaN(value))
      log.tell(row.line, `the force ${quoted(text)} is not a number`, 'write a number');
    return {
      mark: cellOf(row, id ?? null) || null,
      layer: groupName(cellOf(row, group ?? null)),
      force: value,
      section: groupName(cellOf(row, section ?? null)),
    };
  };
}
