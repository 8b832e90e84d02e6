import { expect, it } from 'vitest';
import { drillingTemplates } from '../../../src/documents/nodes/drilling-templates.js';
import { starRays } from '../../../src/documents/nodes/star-rays.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import { add, addScaled, cross, distance, dot, normalise, scale } from '../../../src/maths/vec3.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { packRecords } from '../pack-records.js';
import { checkPdf, outside, overlaps, textOf, wordsOf } from '../pdf.js';

const fonts = await loadFonts();
const base = defaultJob();

it('draws a star for every ball and the anchors of every foot at full size, with the bars to measure', async () => {
  const nodes = packRecords().parts.hubs.map((h) => h.mark);
  const records = packRecords({
    nodes: { ...base.nodes, system: 'drilled-ball', systems: { [nodes[0]!]: 'foot', [nodes[1]!]: 'foot' } },
  });
  const written = (await drillingTemplates(records, fonts))!;
  checkPdf(written.bytes);
  expect(overlaps(written.placed)).toEqual([]);
  expect(outside(written.bytes)).toEqual([]);
  const text = textOf(written.bytes);
  const made = records.parts.hubs.filter((h) => h.makeable);
  expect(made.length).toBeGreaterThan(10);
  for (const hub of made) expect(text).toContain(hub.mark);
  expect(text).toContain('3 anchors Ø 5.5 on a circle Ø 47.0');
  expect(wordsOf(written.bytes).pages[0]!.width).toBeCloseTo((210 * 72) / 25.4, 0);
  const bars = textOf(written.bytes).match(/100 mm both ways/g)!;
  expect(bars).toHaveLength(written.sheets);
});

it('is not written where nothing is drilled', async () => {
  expect(await drillingTemplates(packRecords(), fonts)).toBeNull();
});

it('has strips that end where the bores are once they lie on the ball', () => {
  const records = packRecords({ nodes: { ...base.nodes, system: 'drilled-ball' } });
  let checked = 0;
  for (const hub of records.parts.hubs.filter((h) => h.makeable)) {
    const [first, second] = hub.sockets;
    const a = first!.direction;
    const along = dot(second!.direction, a);
    const x = normalise(addScaled(second!.direction, a, -along));
    const y = cross(a, x);
    const radius = Math.hypot(first!.setback! + first!.depth, (first!.bore as number) / 2);
    starRays(hub).forEach((ray, i) => {
      // From the first bore's middle a great circle of the strip's length, in its direction seen from outside.
      const t = ray.length / radius;
      const heading = add(scale(x, Math.cos(ray.angle)), scale(y, Math.sin(ray.angle)));
      const end = add(scale(a, radius * Math.cos(t)), scale(heading, radius * Math.sin(t)));
      expect(distance(end, scale(hub.sockets[i + 1]!.direction, radius))).toBeLessThan(1e-6);
      checked++;
    });
  }
  expect(checked).toBeGreaterThan(50);
});

it('draws every cube as a net or face by face, each bore with its mark and its line, nothing over anything', async () => {
  for (const edge_mm of [undefined, 120]) {
    const records = packRecords({
      nodes: { ...base.nodes, system: 'drilled-cube', cube: { ...base.nodes.cube, ...(edge_mm ? { edge_mm } : {}) } },
    });
    const written = (await drillingTemplates(records, fonts))!;
    checkPdf(written.bytes);
    expect(overlaps(written.placed)).toEqual([]);
    expect(outside(written.bytes)).toEqual([]);
    const text = textOf(written.bytes);
    const made = records.parts.hubs.filter((h) => h.makeable);
    expect(made.length).toBeGreaterThan(5);
    for (const hub of made) {
      expect(text).toContain(hub.mark);
      for (const s of hub.sockets) expect(text).toMatch(new RegExp(`\\b${s.strut} on [xyz][+-]: `));
    }
    // Once on its face and once in its line, at both of its nodes.
    const bores = made.flatMap((h) => h.sockets.map((s) => s.strut));
    for (const strut of new Set(bores))
      expect(written.placed.filter((p) => p.text === strut)).toHaveLength(bores.filter((b) => b === strut).length);
  }
});
