import { writeStl } from '../../documents/formats/stl.js';
import { sha256 } from '../../machine/hash.js';
import type { Job } from '../../model/job/index.js';
import type { StrutPart } from '../../model/parts.js';
import type { Section } from '../../model/section.js';
import { shapeGauge } from '../../shaping/gauge.js';
import type { PackPart, PackWriter } from '../pack-writer.js';

/** Writes the fit gauge of the section that most struts have as nodes/gauge.stl, and one for each other section beside it. */
export async function writeGauges(struts: readonly StrutPart[], job: Job, writer: PackWriter): Promise<PackPart[]> {
  const parts: PackPart[] = [];
  for (const [i, section] of byUse(struts).entries()) {
    const piece = await shapeGauge(section, job);
    if (!piece) continue;
    const mark = i === 0 ? 'gauge' : `gauge-${section.name}`;
    const bytes = writeStl(piece.positions, piece.triangles, `gauge ${section.name}`);
    const path = `nodes/${mark}.stl`;
    await writer.put(path, bytes);
    const digest = sha256(bytes);
    parts.push({ mark, kind: 'gauge', digest, form: digest, revision: job.revision, files: [path] });
  }
  return parts;
}

/** Sections of the struts, the most used first; of equals the first in the truss. */
function byUse(struts: readonly StrutPart[]): Section[] {
  const uses = new Map<string, { section: Section; count: number }>();
  for (const { section } of struts) {
    if (!section) continue;
    const use = uses.get(section.name);
    if (use) use.count++;
    else uses.set(section.name, { section, count: 1 });
  }
  return [...uses.values()].sort((a, b) => b.count - a.count).map((u) => u.section);
}
