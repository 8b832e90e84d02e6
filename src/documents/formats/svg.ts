import type { Drawing, DrawingLine } from '../kit/drawing.js';

/** Width of lines in machine files, mm: a hair, so that cutters take them for cuts and not for fills. */
const HAIR = 0.1;

const number = (v: number): string => {
  const text = v.toFixed(4).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
};

const escapeXml = (text: string): string =>
  text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c]!);

/**
 * A drawing as SVG 1.1 at true size: width and height in mm, one user unit a millimetre, no px anywhere (readers guess
 * 72, 90 or 96 to the inch). One group a layer, in the order of cutting, its id the layer's name; arcs stay arcs.
 */
export function drawingToSvg(drawing: Drawing): string {
  const { width, height } = drawing;
  const groups = drawing.layers.map((layer) => {
    const lines = layer.lines.map((line) => `    <path d="${pathOf(line, height)}"/>`);
    return [
      `  <g id="${escapeXml(layer.name)}" fill="none" stroke="${layer.colour}" stroke-width="${HAIR}">`,
      `    <desc>${PURPOSE[layer.purpose]}</desc>`,
      ...lines,
      '  </g>',
    ].join('\n');
  });
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" width="${number(width)}mm" height="${number(height)}mm" viewBox="0 0 ${number(width)} ${number(height)}">`,
    `  <title>${escapeXml(drawing.title)}</title>`,
    ...groups,
    '</svg>',
    '',
  ].join('\n');
}

const PURPOSE = {
  outside: 'cut outside',
  inside: 'cut inside, before the outside',
  engrave: 'engrave',
  keep: 'do not cut',
} as const;

function pathOf(line: DrawingLine, height: number): string {
  const { corners, closed } = line;
  const first = corners[0];
  if (!first) return '';
  const parts = [`M${number(first.x)} ${number(height - first.y)}`];
  const sides = closed ? corners.length : corners.length - 1;
  for (let i = 0; i < sides; i++) {
    const [a, b] = [corners[i]!, corners[(i + 1) % corners.length]!];
    const last = closed && i === sides - 1;
    if (a.bulge === 0) {
      if (!last) parts.push(`L${number(b.x)} ${number(height - b.y)}`);
      continue;
    }
    // Chord c and bulge b: r = c (1 + b²) / 4|b|.
    const r = (Math.hypot(b.x - a.x, b.y - a.y) * (1 + a.bulge * a.bulge)) / (4 * Math.abs(a.bulge));
    const large = Math.abs(a.bulge) > 1 ? 1 : 0;
    // y is turned over on paper: anticlockwise here has sweep 0.
    parts.push(`A${number(r)} ${number(r)} 0 ${large} ${a.bulge > 0 ? 0 : 1} ${number(b.x)} ${number(height - b.y)}`);
  }
  if (closed) parts.push('Z');
  return parts.join('');
}
