import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { transformPoint } from '../../src/maths/mat4.js';
import { clearanceAt } from '../../src/maths/polygon/clearance.js';
import { toRing } from '../../src/maths/polygon/ring.js';
import { dot, subtract, type Vec3 } from '../../src/maths/vec3.js';
import type { Job } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { readJob } from '../../src/readers/job.js';
import { readTruss } from '../../src/readers/truss.js';
import { shapeHub } from '../../src/shaping/shape-hub.js';

const EXAMPLES = join(import.meta.dirname, '../../examples');

function example(name: string, corner: Job['panels']['corner']) {
  const { job } = readJob(readFileSync(join(EXAMPLES, name, 'job.json'), 'utf8'), 'job.json');
  const { truss } = readTruss(readFileSync(join(EXAMPLES, name, 'truss.json'), 'utf8'), 'truss.json');
  return assess(truss!, { ...job!, panels: { ...job!.panels, corner } });
}

/** Corners of a mesh between the heights, and where its edges cross them, seen along the panel's normal. */
function slice(points: readonly Vec3[], triangles: Uint32Array, low: number, high: number): [number, number][] {
  const out: [number, number][] = points.filter((p) => p[2] >= low && p[2] <= high).map((p) => [p[0], p[1]]);
  for (let t = 0; t < triangles.length; t++) {
    const a = points[triangles[t]!]!;
    const b = points[triangles[t % 3 === 2 ? t - 2 : t + 1]!]!;
    for (const z of [low, high]) {
      if ((a[2] - z) * (b[2] - z) >= 0) continue;
      const s = (z - a[2]) / (b[2] - a[2]);
      out.push([a[0] + s * (b[0] - a[0]), a[1] + s * (b[1] - a[1])]);
    }
  }
  return out;
}

for (const [name, corner] of [
  ['lantern', 'straight'],
  ['lantern', 'follow'],
  ['canopy', 'round'],
] as const)
  it(`panels of the ${name}, corners ${corner}, keep the gap from the hubs' own meshes`, async () => {
    const { parts, topology, job } = example(name, corner);
    const hubs = new Map(parts.hubs.map((h) => [h.mark, h]));
    let looked = 0;
    let nearest = -Infinity;
    for (const panel of parts.panels.slice(0, 1)) {
      if (panel.outline.length === 0) continue;
      const ring = toRing(panel.outline);
      // The frame lies in the plane of the axes (between), or where the panel rests on the struts (over).
      const [low, high] =
        panel.seating === 'between' ? [-panel.thickness / 2, panel.thickness / 2] : [0, panel.thickness];
      for (const node of topology.truss.faces[topology.faceIndex.get(panel.face)!]!.nodes) {
        const shaped = await shapeHub(hubs.get(node)!, job);
        for (const piece of shaped.pieces) {
          const points = Array.from({ length: piece.positions.length / 3 }, (_, i): Vec3 => {
            const at = transformPoint(piece.placement, [
              piece.positions[3 * i]!,
              piece.positions[3 * i + 1]!,
              piece.positions[3 * i + 2]!,
            ]);
            const d = subtract(at, panel.frame.origin);
            return [dot(d, panel.frame.x), dot(d, panel.frame.y), dot(d, panel.frame.z)];
          });
          for (const [x, y] of slice(points, piece.triangles, low, high)) {
            looked++;
            nearest = Math.max(nearest, clearanceAt([ring], x, y));
          }
        }
      }
    }
    expect(looked).toBeGreaterThan(500);
    // Positions are single precision.
    expect(nearest).toBeLessThanOrEqual(-job.panels.gap_mm + 1e-3);
  });
