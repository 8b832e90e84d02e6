import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import { bareLine, type RawGeometry, type RawLine, type RawLoop, type RawReading } from '../../model/raw-geometry.js';
import { type Fault, quoted } from '../fault.js';
import { groupName, LineFaults, plainNumber } from './text-lines.js';

/** Statements that carry no geometry. */
const IGNORED = new Set(['vn', 'vt', 'vp', 's', 'mtllib', 'usemtl', 'lod', 'bevel', 'c_interp', 'd_interp', 'mg']);

/**
 * Reads an OBJ text: `v`, `l` (every pair of neighbours a line), `f` (a loop), groups (`g`, else `o`) as layers; indices from 1,
 * negative ones from the last vertex back; a backslash joins lines. (Wavefront, Advanced Visualizer manual, appendix B1.)
 * An OBJ file says neither its unit nor which way is up.
 */
export function readObj(text: string, name: string): RawReading<Fault> {
  const log = new LineFaults(name);
  if (log.tooLarge(text)) return { geometry: null, faults: log.faults };
  const vertices: Vec3[] = [];
  const lines: RawLine[] = [];
  const loops: RawLoop[] = [];
  const leftOut = new Map<string, number>();
  let [group, object]: (string | null)[] = [null, null];

  let number = 0;
  let joined = '';
  for (const raw of text.replace(/^\ufeff/, '').split(/\r\n|\n|\r/)) {
    number++;
    if (raw.endsWith('\\')) {
      joined += `${raw.slice(0, -1)} `;
      continue;
    }
    const [statement, ...words] = (joined + raw).replace(/#.*$/, '').trim().split(/\s+/);
    joined = '';
    const points = (least: number): Vec3[] | null => corners(words, vertices, least, number, log);
    switch (statement) {
      case '':
      case undefined:
        break;
      case 'v': {
        const at = words.slice(0, 3).map(plainNumber);
        // The vertex keeps its place in the count even where it is wrong.
        vertices.push(at as unknown as Vec3);
        if (words.length < 3 || !isFinite3(at as unknown as Vec3))
          log.tell(number, 'a vertex is not three finite numbers', 'write v and x, y, z');
        break;
      }
      case 'l': {
        const line = points(2);
        for (let k = 1; line && k < line.length; k++) lines.push(bareLine(line[k - 1]!, line[k]!, group ?? object));
        break;
      }
      case 'f': {
        const loop = points(3);
        if (loop) loops.push({ points: loop, layer: group ?? object });
        break;
      }
      case 'g':
        group = groupName(words.join(' '));
        break;
      case 'o':
        object = groupName(words.join(' '));
        break;
      default:
        if (/^[a-z_]+$/i.test(statement)) {
          if (!IGNORED.has(statement)) leftOut.set(statement, (leftOut.get(statement) ?? 0) + 1);
        } else log.tell(number, `${quoted(statement)} is no statement of an OBJ file`, 'check that the file is OBJ');
    }
  }
  const geometry: RawGeometry = { unit: null, up: null, points: [], lines, loops, leftOut };
  return { geometry: log.faults.length === 0 ? geometry : null, faults: log.faults };
}

/** The vertices that an `l` or `f` names as i, i/j or i/j/k; null where one is not there. */
function corners(
  words: readonly string[],
  vertices: readonly Vec3[],
  least: number,
  line: number,
  log: LineFaults,
): Vec3[] | null {
  if (words.length < least) {
    log.tell(line, `has fewer than ${least} vertices`, 'name all of them on one line');
    return null;
  }
  const found: Vec3[] = [];
  for (const word of words) {
    const index = /^-?\d+(\/-?\d*){0,2}$/.test(word) ? Number.parseInt(word, 10) : 0;
    const vertex = vertices[index > 0 ? index - 1 : vertices.length + index];
    if (index === 0 || !vertex) {
      log.tell(line, `names vertex ${quoted(word)}, which does not stand above`, `name one of 1 to ${vertices.length}`);
      return null;
    }
    found.push(vertex);
  }
  return found;
}
