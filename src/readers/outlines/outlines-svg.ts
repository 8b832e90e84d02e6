import { isUsable } from '../../model/limits.js';
import type { Point2 } from '../../model/parts.js';
import { LineFaults } from '../geometry/text-lines.js';
import { linePlaces } from '../line-places.js';
import { chain, panelsOf } from './contours.js';
import { arcPoints } from './flatten.js';
import type { OutlinesReading } from './outline.js';
import { withoutComments } from './svg-comments.js';
import { pathContours, type SvgContour } from './svg-path.js';

/** [a b c d e f]: x' = a x + c y + e, y' = b x + d y + f (SVG 1.1, 7.4). */
type Matrix = readonly [number, number, number, number, number, number];

/** mm of the absolute units of CSS 2.1, 4.3.2; px is 1/96 in. */
const UNITS: Readonly<Record<string, number>> = {
  mm: 1,
  cm: 10,
  in: 25.4,
  pt: 25.4 / 72,
  pc: 25.4 / 6,
  px: 25.4 / 96,
  '': 25.4 / 96,
};
/** Elements whose content is not drawn where it stands. */
const UNSEEN = new Set([
  'defs',
  'clipPath',
  'mask',
  'symbol',
  'pattern',
  'marker',
  'metadata',
  'style',
  'title',
  'desc',
]);

/**
 * Outlines of an SVG file: path, polygon, polyline, rect, circle, ellipse and line with their transforms; open ones are
 * joined end to end. The size of a unit comes from width and viewBox. y is turned up, so nothing is mirrored.
 */
export function readSvgOutlines(text: string, name: string): OutlinesReading {
  const log = new LineFaults(name);
  const leftOut = new Map<string, number>();
  if (log.tooLarge(text)) return { outlines: [], faults: log.faults, leftOut };
  const contours: SvgContour[] = [];
  const stack: { name: string; matrix: Matrix; seen: boolean }[] = [];
  let root: Matrix | null = null;
  let scale = 1;
  const { body, unended } = withoutComments(text);
  const places = linePlaces(body);
  if (unended >= 0)
    log.tell(places(unended).line, 'a comment or an instruction begins and does not end', 'export it again');
  for (const tag of body.matchAll(/<(\/?)([A-Za-z][\w:.-]*)((?:\s+[\w:.-]+\s*=\s*(?:"[^"]*"|'[^']*'))*)\s*(\/?)>/g)) {
    const element = tag[2]!.replace(/^svg:/, '');
    if (tag[1]) {
      while (stack.length > 0 && stack.pop()!.name !== element);
      continue;
    }
    const attributes = new Map(
      [...tag[3]!.matchAll(/([\w:.-]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g)].map((m) => [m[1]!, m[2] ?? m[3] ?? '']),
    );
    const { line } = places(tag.index);
    const above = stack.at(-1);
    if (element === 'svg' && !root) {
      const view = viewOf(attributes);
      if (!view) {
        log.tell(
          line,
          'has no width in mm, cm, in, pt or px, or no usable viewBox',
          'export it at true size with width, height and viewBox',
        );
        break;
      }
      root = view;
      scale = Math.hypot(view[0], view[1]);
    }
    const own = attributes.get('transform');
    const turned = own === undefined ? null : transformOf(own);
    if (own !== undefined && !turned)
      log.tell(line, `transform of ${element} cannot be read`, 'apply transforms before exporting');
    const matrix = times(above?.matrix ?? root ?? [1, 0, 0, 1, 0, 0], turned ?? [1, 0, 0, 1, 0, 0]);
    const hidden = attributes.get('display') === 'none' || /display\s*:\s*none/.test(attributes.get('style') ?? '');
    const seen = (above?.seen ?? true) && !UNSEEN.has(element) && !hidden && attributes.get('id') !== 'DO-NOT-CUT';
    if (!tag[4]) stack.push({ name: element, matrix, seen });
    if (!seen || element === 'svg' || element === 'g' || element === 'a') continue;
    const drawn = shapeOf(element, attributes, scale * Math.hypot(matrix[0], matrix[1]));
    if (drawn === undefined) {
      leftOut.set(element, (leftOut.get(element) ?? 0) + 1);
      continue;
    }
    const placed = drawn?.map(({ points, closed }) => ({ closed, points: points.map((p) => place(matrix, p)) }));
    // Numbers that are fine by themselves may be none in mm.
    if (placed?.every((c) => c.points.every((p) => p.every(isUsable)))) contours.push(...placed);
    else log.tell(line, `${element} has numbers that cannot be read`, 'export it again');
  }
  if (!root && log.faults.length === 0) log.tell(1, 'is not an SVG file', 'give a file with an svg element');
  if (log.faults.length > 0) return { outlines: [], faults: log.faults, leftOut };
  const joined = chain(contours.filter((c) => !c.closed).map((c) => c.points));
  if (joined.open > 0) leftOut.set('open contour', joined.open);
  const outlines = panelsOf([...contours.filter((c) => c.closed).map((c) => c.points), ...joined.closed]);
  if (outlines.length === 0) log.tell(1, 'holds no closed contour', 'draw each panel as a closed path');
  return { outlines, faults: log.faults, leftOut };
}

/** A point in mm, y turned up. */
const place = (m: Matrix, [x, y]: Point2): Point2 => [m[0] * x + m[2] * y + m[4], -(m[1] * x + m[3] * y + m[5])];

/** From user units to mm. */
function viewOf(attributes: ReadonlyMap<string, string>): Matrix | null {
  const length = (key: string): number | null => {
    const m = /^\s*([\d.]+(?:[eE][-+]?\d+)?)\s*(mm|cm|in|pt|pc|px|)\s*$/.exec(attributes.get(key) ?? '');
    return m ? Number(m[1]) * UNITS[m[2]!]! : null;
  };
  const box = (attributes.get('viewBox') ?? '')
    .trim()
    .split(/[\s,]+/)
    .map(Number);
  const width = length('width');
  if (width === null || !(width > 0)) return null;
  if (box.length !== 4) return [UNITS['']!, 0, 0, UNITS['']!, 0, 0];
  if (!box.every(Number.isFinite) || !(box[2]! > 0)) return null;
  const k = width / box[2]!;
  return [k, 0, 0, k, -box[0]! * k, -box[1]! * k];
}

const times = (a: Matrix, b: Matrix): Matrix => [
  a[0] * b[0] + a[2] * b[1],
  a[1] * b[0] + a[3] * b[1],
  a[0] * b[2] + a[2] * b[3],
  a[1] * b[2] + a[3] * b[3],
  a[0] * b[4] + a[2] * b[5] + a[4],
  a[1] * b[4] + a[3] * b[5] + a[5],
];

function transformOf(text: string): Matrix | null {
  let out: Matrix = [1, 0, 0, 1, 0, 0];
  const rest = text.replace(
    /\s*(matrix|translate|scale|rotate|skewX|skewY)\s*\(([^)]*)\)\s*,?/g,
    (_, kind: string, list: string) => {
      const n = list
        .trim()
        .split(/[\s,]+/)
        .map(Number);
      const rad = ((n[0] ?? 0) * Math.PI) / 180;
      const [cx, cy] = [n[1] ?? 0, n[2] ?? 0];
      const turn: Matrix = [Math.cos(rad), Math.sin(rad), -Math.sin(rad), Math.cos(rad), 0, 0];
      const m: Matrix =
        kind === 'matrix'
          ? (n as unknown as Matrix)
          : kind === 'translate'
            ? [1, 0, 0, 1, n[0]!, n[1] ?? 0]
            : kind === 'scale'
              ? [n[0]!, 0, 0, n[1] ?? n[0]!, 0, 0]
              : kind === 'rotate'
                ? times(times([1, 0, 0, 1, cx, cy], turn), [1, 0, 0, 1, -cx, -cy])
                : kind === 'skewX'
                  ? [1, 0, Math.tan(rad), 1, 0, 0]
                  : [1, Math.tan(rad), 0, 1, 0, 0];
      out = times(out, m);
      return '';
    },
  );
  return rest.trim() === '' && out.length === 6 && out.every(Number.isFinite) ? out : null;
}

/** Contours of a shape; null: unreadable; undefined: nothing that is cut. */
function shapeOf(
  element: string,
  attributes: ReadonlyMap<string, string>,
  scale: number,
): SvgContour[] | null | undefined {
  const n = (key: string): number => Number.parseFloat(attributes.get(key) ?? '0');
  const finite = (c: SvgContour): SvgContour[] | null =>
    c.points.every((p) => Number.isFinite(p[0]) && Number.isFinite(p[1])) ? [c] : null;
  if (element === 'path') return pathContours(attributes.get('d') ?? '', scale);
  if (element === 'polygon' || element === 'polyline') {
    const v = (attributes.get('points') ?? '')
      .trim()
      .split(/[\s,]+/)
      .map(Number);
    const points = Array.from({ length: Math.floor(v.length / 2) }, (_, k): Point2 => [v[2 * k]!, v[2 * k + 1]!]);
    return finite({ points, closed: element === 'polygon' });
  }
  if (element === 'line')
    return finite({
      points: [
        [n('x1'), n('y1')],
        [n('x2'), n('y2')],
      ],
      closed: false,
    });
  if (element === 'rect') {
    const [x, y, w, h] = [n('x'), n('y'), n('width'), n('height')];
    const rx = Math.min(w / 2, attributes.has('rx') ? n('rx') : n('ry'));
    const ry = Math.min(h / 2, attributes.has('ry') ? n('ry') : n('rx'));
    if (!(rx > 0 && ry > 0))
      return finite({
        closed: true,
        points: [
          [x, y],
          [x + w, y],
          [x + w, y + h],
          [x, y + h],
        ],
      });
    const corner = (cx: number, cy: number, a: number): Point2[] => arcPoints([cx, cy], rx, ry, a, Math.PI / 2);
    return finite({
      closed: true,
      points: [
        ...corner(x + w - rx, y + ry, -Math.PI / 2),
        ...corner(x + w - rx, y + h - ry, 0),
        ...corner(x + rx, y + h - ry, Math.PI / 2),
        ...corner(x + rx, y + ry, Math.PI),
      ],
    });
  }
  if (element === 'circle' || element === 'ellipse') {
    const rx = element === 'circle' ? n('r') : n('rx');
    const ry = element === 'circle' ? n('r') : n('ry');
    if (!(rx > 0 && ry > 0)) return undefined;
    return finite({ closed: true, points: arcPoints([n('cx'), n('cy')], rx, ry, 0, 2 * Math.PI).slice(0, -1) });
  }
  return undefined;
}
