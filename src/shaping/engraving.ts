import { layOutText, strokeGlyph } from '../maths/stroke-text.js';
import { glyphShape } from './glyph-solid.js';
import type { Kernel } from './kernel.js';
import type { MeshBuilder } from './mesh-builder.js';

/** Where a line of text is cut: maps text coordinates (x along the line, y up from its middle, mm) and a height over the surface to space. */
export type TextSurface = (x: number, y: number, height: number) => readonly [number, number, number];

export interface Lettering {
  readonly capHeight: number;
  readonly stroke: number;
  readonly depth: number;
}

/** Lowest and highest ink of a line in capital heights, a plain capital at least: it is centred between these. */
function inkOf(text: string): readonly [number, number] {
  const glyphs = [...text].map(strokeGlyph);
  return [Math.min(0, ...glyphs.map((g) => g.low)), Math.max(1, ...glyphs.map((g) => g.high))];
}

/** Width and height of a line's ink with its strokes, mm. */
export function textSize(text: string, lettering: Lettering): { readonly width: number; readonly height: number } {
  const [low, high] = inkOf(text);
  return {
    width: layOutText(text, spacing(lettering)).width * lettering.capHeight + lettering.stroke,
    height: (high - low) * lettering.capHeight + lettering.stroke,
  };
}

/** Clear space between inks is one stroke and a half, plus the stroke itself. */
const spacing = (l: Lettering): number => (2.2 * l.stroke) / l.capHeight;

/** Adds the solid that cuts a centred line of text into a surface, `depth` deep and reaching a little out of it. */
export function addLettering(
  mesh: MeshBuilder,
  kernel: Kernel,
  text: string,
  lettering: Lettering,
  surface: TextSurface,
): void {
  const { capHeight, stroke, depth } = lettering;
  const { width, places } = layOutText(text, spacing(lettering));
  const [low, high] = inkOf(text);
  for (const { character, x } of places) {
    const shape = glyphShape(kernel, character, capHeight, stroke);
    const [dx, dy] = [(x - width / 2) * capHeight, -((high + low) / 2) * capHeight];
    const place = (p: readonly [number, number], h: number): number => mesh.point(...surface(p[0] + dx, p[1] + dy, h));
    const bottom = shape.points.map((p) => place(p, -depth));
    const top = shape.points.map((p) => place(p, OUT));
    for (const [a, b, c] of shape.triangles) {
      mesh.face(top[a]!, top[b]!, top[c]!);
      mesh.face(bottom[a]!, bottom[c]!, bottom[b]!);
    }
    for (const loop of shape.loops)
      loop.forEach((a, i) => {
        const b = loop[(i + 1) % loop.length]!;
        mesh.face(bottom[a]!, bottom[b]!, top[b]!);
        mesh.face(bottom[a]!, top[b]!, top[a]!);
      });
  }
}

/** How far the cutter stands out of the surface, mm: more than the flats of a many-sided sleeve fall inside its circle. */
const OUT = 0.4;
