import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Topology } from '../../model/topology.js';
import type { ResidualLimits } from '../equilibrium.js';
import type { CellComplex } from './complex.js';
import type { Reading } from './read.js';

const DEGREES = 180 / Math.PI;
/** A polygon this far out of square, rad, is not the strut's at all. */
const UNRELATED = 0.1;
/** Above this share of such polygons the diagram is of another form. */
const MOST = 0.25;

/**
 * Findings on how a diagram fits its form: struts out of square to their polygons (the angle in rad is the share of
 * the polygon's force that the strut cannot take, so the residual limits apply to it), edges that carry force but no
 * strut, struts in no cell; one finding for all where the diagram is of another form.
 */
export function judgeReading(
  topology: Topology,
  complex: CellComplex,
  reading: Reading,
  newtonPerArea: number,
  limits: ResidualLimits,
): Finding[] {
  const { truss } = topology;
  const inCell = new Set<number>();
  const found: Finding[] = [];
  const askew: Finding[] = [];
  let [struts, unrelated, largest] = [0, 0, 0];
  for (const a of reading.along) largest = Math.max(largest, Math.abs(a));
  complex.loops.forEach((loop, e) => {
    if (loop.cells.length === 0) return;
    const m = complex.member[e];
    if (m < 0) {
      if (Math.abs(reading.along[e]) > limits.residualWarn * largest)
        found.push(bareEdge(topology, complex, e, reading.along[e] * newtonPerArea));
      return;
    }
    inCell.add(m);
    struts++;
    const angle = reading.angles[e];
    if (angle > UNRELATED) unrelated++;
    const level = angle > limits.residualStop ? 'stop' : angle > limits.residualWarn ? 'warn' : null;
    if (level) {
      const limit = level === 'stop' ? limits.residualStop : limits.residualWarn;
      askew.push(
        finding('polygon-not-square', truss.members[m].mark, { level, value: angle * DEGREES, limit: limit * DEGREES }),
      );
    }
  });
  truss.members.forEach((member, m) => {
    if (!inCell.has(m)) found.push(finding('strut-outside-cells', member.mark));
  });
  if (unrelated > MOST * struts) {
    found.push(
      finding('diagram-of-another-form', 'truss', { value: Math.round((100 * unrelated) / struts), limit: 100 * MOST }),
    );
  } else found.push(...askew);
  return found;
}

function bareEdge(topology: Topology, complex: CellComplex, e: number, force: number): Finding {
  const { nodes, faces } = topology.truss;
  const face = complex.loops[e].faces.find((f) => f >= 0)!;
  const edge = `${nodes[complex.from[e]].mark}-${nodes[complex.to[e]].mark}`;
  return finding('edge-without-strut', faces[face].mark, { value: Math.abs(force), limit: 0, about: { edge } });
}
