import type { Point2 } from '../../model/parts.js';
import { arcPoints, cubicPoints } from './flatten.js';

export interface SvgContour {
  readonly points: Point2[];
  readonly closed: boolean;
}

/** Contours of the `d` of an SVG path (SVG 1.1, 8.3), curves as chords; `scale` mm a unit sets their number. null: not readable. */
export function pathContours(d: string, scale: number): SvgContour[] | null {
  const tokens = d.match(/[a-zA-Z]|[-+]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?/g) ?? [];
  const contours: SvgContour[] = [];
  let points: Point2[] = [];
  let at: Point2 = [0, 0];
  let start: Point2 = [0, 0];
  let control: Point2 | null = null;
  let quadratic: Point2 | null = null;
  let command = '';
  let i = 0;
  const end = (closed: boolean): void => {
    if (points.length > 1) contours.push({ points, closed });
    points = [];
  };
  const number = (): number => (i < tokens.length && !/[a-zA-Z]/.test(tokens[i]![0]!) ? Number(tokens[i++]) : NaN);
  const go = (...to: Point2[]): void => {
    if (points.length === 0) points.push(at);
    points.push(...to);
    at = to.at(-1)!;
  };
  while (i < tokens.length) {
    if (/[a-zA-Z]/.test(tokens[i]![0]!)) command = tokens[i++]!;
    else if (command === '' || command === 'Z' || command === 'z') return null;
    const relative = command === command.toLowerCase();
    const [ox, oy]: Point2 = relative ? at : [0, 0];
    const point = (): Point2 => {
      const x = number();
      return [ox + x, oy + number()];
    };
    const kind = command.toUpperCase();
    let nextControl: Point2 | null = null;
    let nextQuadratic: Point2 | null = null;
    if (kind === 'Z') {
      end(true);
      at = start;
    } else if (kind === 'M') {
      end(false);
      at = point();
      start = at;
      // More pairs after a move are lines.
      command = relative ? 'l' : 'L';
    } else if (kind === 'L') go(point());
    else if (kind === 'H') go([ox + number(), at[1]]);
    else if (kind === 'V') go([at[0], oy + number()]);
    else if (kind === 'C' || kind === 'S') {
      const c1: Point2 = kind === 'C' ? point() : control ? [2 * at[0] - control[0], 2 * at[1] - control[1]] : at;
      const [c2, to] = [point(), point()];
      go(...cubicPoints(at, c1, c2, to, scale));
      nextControl = c2;
    } else if (kind === 'Q' || kind === 'T') {
      const c: Point2 = kind === 'Q' ? point() : quadratic ? [2 * at[0] - quadratic[0], 2 * at[1] - quadratic[1]] : at;
      const to = point();
      const third = (p: Point2): Point2 => [p[0] + (2 / 3) * (c[0] - p[0]), p[1] + (2 / 3) * (c[1] - p[1])];
      go(...cubicPoints(at, third(at), third(to), to, scale));
      nextQuadratic = c;
    } else if (kind === 'A') {
      const [rx, ry, turn] = [Math.abs(number()), Math.abs(number()), (number() * Math.PI) / 180];
      const [large, sweep] = [flag(), flag()];
      const to = point();
      go(...ellipse(at, to, rx, ry, turn, large, sweep));
    } else return null;
    if (
      !points.every((p) => Number.isFinite(p[0]) && Number.isFinite(p[1])) ||
      !Number.isFinite(at[0]) ||
      !Number.isFinite(at[1])
    )
      return null;
    control = nextControl;
    quadratic = nextQuadratic;
  }
  end(false);
  return contours;

  /** A flag may stand without a space before what follows: "00" or "01.5". */
  function flag(): boolean {
    const token = tokens[i] ?? '';
    if (token.length > 1 && /^[01]/.test(token)) {
      tokens[i] = token.slice(1);
      return token[0] === '1';
    }
    i++;
    return token === '1';
  }
}

/** From end points to the centre (SVG 1.1, F.6.5). */
function ellipse(
  a: Point2,
  b: Point2,
  rx0: number,
  ry0: number,
  turn: number,
  large: boolean,
  sweep: boolean,
): Point2[] {
  if (rx0 === 0 || ry0 === 0 || (a[0] === b[0] && a[1] === b[1])) return [b];
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const [hx, hy] = [(a[0] - b[0]) / 2, (a[1] - b[1]) / 2];
  const [x, y] = [c * hx + s * hy, -s * hx + c * hy];
  const grow = Math.sqrt(Math.max(1, (x / rx0) ** 2 + (y / ry0) ** 2));
  const [rx, ry] = [rx0 * grow, ry0 * grow];
  const top = Math.max(0, rx * rx * ry * ry - rx * rx * y * y - ry * ry * x * x);
  const k = Math.sqrt(top / (rx * rx * y * y + ry * ry * x * x)) * (large === sweep ? -1 : 1);
  const [px, py] = [(k * rx * y) / ry, (-k * ry * x) / rx];
  const centre: Point2 = [c * px - s * py + (a[0] + b[0]) / 2, s * px + c * py + (a[1] + b[1]) / 2];
  const from = Math.atan2((y - py) / ry, (x - px) / rx);
  let span = Math.atan2((-y - py) / ry, (-x - px) / rx) - from;
  if (sweep && span < 0) span += 2 * Math.PI;
  if (!sweep && span > 0) span -= 2 * Math.PI;
  return [...arcPoints(centre, rx, ry, from, span, turn).slice(1, -1), b];
}
