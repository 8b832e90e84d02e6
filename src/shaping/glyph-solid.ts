import { type Stroke, strokeGlyph } from '../maths/stroke-text.js';
import type { Kernel } from './kernel.js';

/** A character's strokes as a flat shape with triangles, mm; ink starts at x = 0, baseline y = 0. */
export interface GlyphShape {
  readonly points: readonly (readonly [number, number])[];
  readonly triangles: readonly (readonly [number, number, number])[];
  /** Closed loops of point indices, the solid on their left. */
  readonly loops: readonly (readonly number[])[];
}

/** Longest edge of a glyph's outline, mm: short enough to follow a sleeve's curve. */
const LONGEST_EDGE = 2;
const ROUND_SIDES = 4;

const caches = new WeakMap<Kernel, Map<string, GlyphShape>>();

/** The character drawn with a stroke of round ends; cut once for each kernel, height and stroke. */
export function glyphShape(kernel: Kernel, character: string, capHeight: number, stroke: number): GlyphShape {
  let cache = caches.get(kernel);
  if (!cache) caches.set(kernel, (cache = new Map()));
  const key = `${character} ${capHeight} ${stroke}`;
  let shape = cache.get(key);
  if (!shape) cache.set(key, (shape = makeShape(kernel, character, capHeight, stroke)));
  return shape;
}

function makeShape(kernel: Kernel, character: string, capHeight: number, stroke: number): GlyphShape {
  const { strokes } = strokeGlyph(character);
  const pens: [number, number][][] = [];
  for (const full of strokes) {
    const line = thin(full, SIMPLIFY / capHeight);
    for (let i = 0; i + 1 < line.length; i++) {
      const [a, b] = [line[i]!, line[i + 1]!].map((p) => [p[0] * capHeight, p[1] * capHeight] as const) as [
        readonly [number, number],
        readonly [number, number],
      ];
      pens.push(penStroke(a, b, stroke / 2));
    }
  }
  if (pens.length === 0) return { points: [], triangles: [], loops: [] };
  const section = kernel.CrossSection.ofPolygons(pens, 'NonZero');
  const simple = section.simplify(SIMPLIFY);
  const polygons = simple.toPolygons().map((loop) => refine(loop as [number, number][]));
  section.delete();
  simple.delete();
  const points: [number, number][] = [];
  const loops = polygons.map((loop) => loop.map((p) => points.push(p) - 1));
  const triangles = kernel.triangulate(polygons).map((t) => [t[0], t[1], t[2]] as [number, number, number]);
  return { points, triangles, loops };
}

/** mm; a fifth of a nozzle. */
const SIMPLIFY = 0.08;

/** A line with the points left out that lie within `most` of it (Douglas and Peucker 1973). */
function thin(line: Stroke, most: number): Stroke {
  const [a, b] = [line[0]!, line[line.length - 1]!];
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
  let [worst, at] = [0, 0];
  for (let i = 1; i + 1 < line.length; i++) {
    const p = line[i]!;
    const off =
      l > 0
        ? Math.abs((b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0])) / l
        : Math.hypot(p[0] - a[0], p[1] - a[1]);
    if (off > worst) [worst, at] = [off, i];
  }
  return worst > most ? [...thin(line.slice(0, at + 1), most).slice(0, -1), ...thin(line.slice(at), most)] : [a, b];
}

/** A capsule round the segment a-b, anticlockwise. */
function penStroke(a: readonly [number, number], b: readonly [number, number], r: number): [number, number][] {
  const base = Math.atan2(b[1] - a[1], b[0] - a[0]);
  const half = ROUND_SIDES / 2;
  const cap = (p: readonly [number, number], from: number): [number, number][] =>
    Array.from({ length: half + 1 }, (_, k) => {
      const angle = from + (Math.PI * k) / half;
      return [p[0] + r * Math.cos(angle), p[1] + r * Math.sin(angle)];
    });
  return [...cap(b, base - Math.PI / 2), ...cap(a, base + Math.PI / 2)];
}

function refine(loop: readonly (readonly [number, number])[]): [number, number][] {
  return loop.flatMap((a, i) => {
    const b = loop[(i + 1) % loop.length]!;
    const parts = Math.max(1, Math.ceil(Math.hypot(b[0] - a[0], b[1] - a[1]) / LONGEST_EDGE));
    return Array.from({ length: parts }, (_, k): [number, number] => [
      a[0] + ((b[0] - a[0]) * k) / parts,
      a[1] + ((b[1] - a[1]) * k) / parts,
    ]);
  });
}
