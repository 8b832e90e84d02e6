import { closePairs } from '../maths/close-pairs.js';
import { loopFailure } from '../maths/loop-crossing.js';
import { distance, isFinite3, type Vec3 } from '../maths/vec3.js';
import { LIMITS } from '../model/limits.js';
import { caseNameProblem } from '../model/marks.js';
import { ROUND_OFF } from '../model/tolerance.js';
import { OUTSIDE_CELL } from '../model/truss.js';
import { type Fault, quoted } from './fault.js';
import type { JsonDocument, Path } from './json-document.js';
import { items, listOfTexts, textOf } from './loose.js';
import { MarkList } from './mark-list.js';

/**
 * What a schema cannot say of a truss file: marks, names that lead nowhere, geometry that is no truss. Works on whatever
 * part of the file has the right types, so that one run reports everything.
 */
export function checkTruss(document: JsonDocument): Fault[] {
  const faults: Fault[] = [];
  const tell = (path: Path, what: string, mend: string): void => {
    faults.push(document.fault(document.offset(path), what, mend));
  };
  const nodes = new MarkList(document, 'nodes', 'node', tell);
  const members = new MarkList(document, 'members', 'strut', tell);
  const faces = new MarkList(document, 'faces', 'face', tell);
  const cells = new MarkList(document, 'cells', 'cell', tell, [OUTSIDE_CELL]);

  const at = positions(document);
  const tolerance = ROUND_OFF.coincident.value * sizeOf([...at.values()].map((p) => p.at));
  const coinciding = checkCoincidence(at, tolerance, tell);
  checkMembers(document, nodes, members, at, tolerance, tell);
  // A face at two nodes that coincide is degenerate for that reason alone.
  for (const mark of coinciding) at.delete(mark);
  checkFaces(document, nodes, faces, at, tell);
  checkCells(document, faces, cells, tell);
  for (const list of ['supports', 'loads'] as const)
    items(document.value, list).forEach((item, i) => {
      nodes.mustHold(textOf(item, 'node'), [list, i, 'node'], list === 'supports' ? 'the support' : 'the load');
      const name = list === 'loads' ? textOf(item, 'case') : null;
      const problem = name === null ? null : caseNameProblem(name);
      if (problem) tell([list, i, 'case'], `${quoted(name!)} ${problem.what}`, problem.mend);
      const fixed = list === 'supports' ? textOf(item, 'fixed') : null;
      if (fixed !== null && /^[xyz]+$/.test(fixed) && new Set(fixed).size < fixed.length)
        tell([list, i, 'fixed'], `${quoted(fixed)} names a direction twice`, 'name each of x y z once');
    });
  return faults;
}

type Tell = (path: Path, what: string, mend: string) => void;

interface Position {
  readonly mark: string;
  readonly at: Vec3;
  readonly index: number;
}

/** Nodes whose mark and coordinates can be used. */
function positions(document: JsonDocument): Map<string, Position> {
  const found = new Map<string, Position>();
  items(document.value, 'nodes').forEach((item, index) => {
    const [mark, at] = [textOf(item, 'id'), (item as { at?: unknown } | null)?.at];
    const numbers = Array.isArray(at) && at.length === 3 && at.every((v) => typeof v === 'number');
    // A number that is not finite reads as 0, which would put the node where it is not.
    const sound =
      numbers &&
      (document.reported.size === 0 ||
        at.every((_, k) => !document.reported.has(document.offset(['nodes', index, 'at', k]))));
    if (mark !== null && sound && isFinite3(at as unknown as Vec3) && !found.has(mark))
      found.set(mark, { mark, at: at as unknown as Vec3, index });
  });
  return found;
}

function sizeOf(points: readonly Vec3[]): number {
  let size = 0;
  for (const k of [0, 1, 2] as const) {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const p of points) [low, high] = [Math.min(low, p[k]), Math.max(high, p[k])];
    size = Math.max(size, high - low);
  }
  return size;
}

function checkCoincidence(at: ReadonlyMap<string, Position>, tolerance: number, tell: Tell): ReadonlySet<string> {
  const list = [...at.values()];
  const coinciding = new Set<string>();
  for (const [i, j] of closePairs(
    list.map((p) => p.at),
    tolerance,
  )) {
    const [first, second] = [list[i]!, list[j]!];
    tell(
      ['nodes', second.index, 'at'],
      `node ${quoted(second.mark)} is at the same place as node ${quoted(first.mark)}`,
      'move one of them, or make them one node',
    );
    coinciding.add(first.mark).add(second.mark);
  }
  return coinciding;
}

function checkMembers(
  document: JsonDocument,
  nodes: MarkList,
  members: MarkList,
  at: ReadonlyMap<string, Position>,
  tolerance: number,
  tell: Tell,
): void {
  const byPair = new Map<string, string>();
  items(document.value, 'members').forEach((item, i) => {
    const ends = listOfTexts(item, 'ends');
    const who = members.name(i);
    const path: Path = ['members', i, 'ends'];
    const known = ends.map((end, k) => nodes.mustHold(end, [...path, k], who));
    const [a, b] = ends;
    if (typeof a !== 'string' || typeof b !== 'string') return;
    if (a === b) tell(path, `${who} has no length: both ends are at node ${quoted(a)}`, 'name two different nodes');
    if (a === b || !known.every(Boolean)) return;
    const [p, q] = [at.get(a)?.at, at.get(b)?.at];
    if (p && q && distance(p, q) <= tolerance)
      tell(path, `${who} has no length: its two nodes are at the same place`, 'move one of them');
    const pair = JSON.stringify(a < b ? [a, b] : [b, a]);
    const other = byPair.get(pair);
    if (other !== undefined) tell(path, `${who} joins the same two nodes as ${other}`, 'remove one of them');
    else byPair.set(pair, who);
  });
}

function checkFaces(
  document: JsonDocument,
  nodes: MarkList,
  faces: MarkList,
  at: ReadonlyMap<string, Position>,
  tell: Tell,
): void {
  items(document.value, 'faces').forEach((item, i) => {
    const loop = listOfTexts(item, 'nodes');
    const who = faces.name(i);
    const path: Path = ['faces', i, 'nodes'];
    const known = loop.map((mark, k) => nodes.mustHold(mark, [...path, k], who));
    if (Array.isArray((item as { nodes?: unknown } | null)?.nodes) && loop.length < 3)
      tell(path, `${who} has fewer than three nodes`, 'name at least three, in order round the face');
    const seen = new Set<unknown>();
    let repeated = false;
    loop.forEach((mark, k) => {
      if (typeof mark === 'string' && seen.has(mark)) {
        repeated = true;
        tell([...path, k], `${who} names node ${quoted(mark)} twice`, 'name each node of the loop once');
      }
      seen.add(mark);
    });
    const points = loop.map((mark) => (typeof mark === 'string' ? at.get(mark)?.at : undefined));
    if (repeated || loop.length < 3 || loop.length > LIMITS.corners || !known.every(Boolean) || points.some((p) => !p))
      return;
    const failure = loopFailure(points as Vec3[]);
    if (failure === 'straight') tell(path, `the nodes of ${who} lie on one line`, 'name nodes that span a plane');
    if (failure === 'crossing') tell(path, `${who} crosses itself`, 'name its nodes in order round the face');
  });
}

function checkCells(document: JsonDocument, faces: MarkList, cells: MarkList, tell: Tell): void {
  items(document.value, 'cells').forEach((item, i) => {
    const seen = new Set<unknown>();
    listOfTexts(item, 'faces').forEach((mark, k) => {
      const path: Path = ['cells', i, 'faces', k];
      faces.mustHold(mark, path, cells.name(i));
      if (typeof mark === 'string' && seen.has(mark))
        tell(path, `${cells.name(i)} names face ${quoted(mark)} twice`, 'name each face once');
      seen.add(mark);
    });
  });
  const vertices = new Set<string>();
  const reciprocal = (document.value as { reciprocal?: unknown } | null)?.reciprocal;
  items(reciprocal, 'vertices').forEach((item, i) => {
    const path: Path = ['reciprocal', 'vertices', i, 'cell'];
    const mark = textOf(item, 'cell');
    cells.mustHold(mark, path, 'the force diagram');
    if (mark !== null && vertices.has(mark))
      tell(path, `cell ${quoted(mark)} has two vertices in the force diagram`, 'keep one of the two');
    if (mark !== null) vertices.add(mark);
  });
}
