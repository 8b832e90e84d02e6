import { readFileSync, writeFileSync } from 'node:fs';
import { PNG } from 'pngjs';

/**
 * Draws binary STL files side by side with a depth buffer and flat shading, to look at what was made:
 * node tests/tools/render-mesh.mjs OUT.png FILE.stl ... ; each file is seen from above-front and from above-back.
 */
const SIZE = 700;

function readStl(path) {
  const b = readFileSync(path);
  const n = b.readUInt32LE(80);
  const t = new Float32Array(9 * n);
  for (let i = 0; i < n; i++) for (let k = 0; k < 9; k++) t[9 * i + k] = b.readFloatLE(84 + 50 * i + 12 + 4 * k);
  return t;
}

function draw(png, offset, row, t, azimuth, elevation) {
  const [ca, sa, ce, se] = [Math.cos(azimuth), Math.sin(azimuth), Math.cos(elevation), Math.sin(elevation)];
  const view = new Float64Array(t.length);
  const [low, high] = [
    [1e9, 1e9],
    [-1e9, -1e9],
  ];
  for (let i = 0; i < t.length; i += 3) {
    const [x, y, z] = [t[i], t[i + 1], t[i + 2]];
    const [u, w] = [ca * x + sa * y, -sa * x + ca * y];
    view[i] = u;
    view[i + 1] = ce * z + se * w;
    view[i + 2] = ce * w - se * z;
    for (let k = 0; k < 2; k++) {
      low[k] = Math.min(low[k], view[i + k]);
      high[k] = Math.max(high[k], view[i + k]);
    }
  }
  const s = (SIZE - 40) / Math.max(high[0] - low[0], high[1] - low[1]);
  const depth = new Float64Array(SIZE * SIZE).fill(1e9);
  for (let i = 0; i < t.length; i += 9) {
    const p = [0, 3, 6].map((k) => [
      20 + (view[i + k] - low[0]) * s,
      SIZE - 20 - (view[i + k + 1] - low[1]) * s,
      view[i + k + 2],
    ]);
    const e1 = [0, 1, 2].map((k) => view[i + 3 + k] - view[i + k]);
    const e2 = [0, 1, 2].map((k) => view[i + 6 + k] - view[i + k]);
    const n = [e1[1] * e2[2] - e1[2] * e2[1], e1[2] * e2[0] - e1[0] * e2[2], e1[0] * e2[1] - e1[1] * e2[0]];
    const l = Math.hypot(...n) || 1;
    const shade = Math.max(0.12, Math.min(1, 0.25 + 0.75 * Math.abs((n[0] * -0.4 + n[1] * 0.6 + n[2] * -0.7) / l)));
    const minX = Math.max(0, Math.floor(Math.min(p[0][0], p[1][0], p[2][0])));
    const maxX = Math.min(SIZE - 1, Math.ceil(Math.max(p[0][0], p[1][0], p[2][0])));
    const minY = Math.max(0, Math.floor(Math.min(p[0][1], p[1][1], p[2][1])));
    const maxY = Math.min(SIZE - 1, Math.ceil(Math.max(p[0][1], p[1][1], p[2][1])));
    const area = (p[1][0] - p[0][0]) * (p[2][1] - p[0][1]) - (p[1][1] - p[0][1]) * (p[2][0] - p[0][0]);
    if (Math.abs(area) < 1e-9) continue;
    for (let y = minY; y <= maxY; y++)
      for (let x = minX; x <= maxX; x++) {
        const w0 = ((p[1][0] - x) * (p[2][1] - y) - (p[1][1] - y) * (p[2][0] - x)) / area;
        const w1 = ((p[2][0] - x) * (p[0][1] - y) - (p[2][1] - y) * (p[0][0] - x)) / area;
        const w2 = 1 - w0 - w1;
        if (w0 < 0 || w1 < 0 || w2 < 0) continue;
        const d = w0 * p[0][2] + w1 * p[1][2] + w2 * p[2][2];
        if (d >= depth[y * SIZE + x]) continue;
        depth[y * SIZE + x] = d;
        const at = 4 * ((y + row) * png.width + x + offset);
        png.data.set([230 * shade, 200 * shade, 150 * shade, 255], at);
      }
  }
}

const [out, ...files] = process.argv.slice(2);
const png = new PNG({ width: SIZE * files.length, height: SIZE * 2 });
png.data.fill(255);
files.forEach((file, i) => {
  const t = readStl(file);
  draw(png, i * SIZE, 0, t, 0.5, 0.6);
  draw(png, i * SIZE, SIZE, t, 0.5 + Math.PI, 0.6);
});
writeFileSync(out, PNG.sync.write(png));
