import { GLUE_LINE } from '../model/catalogue/glue.js';
import { PIN_STEEL } from '../model/catalogue/pin.js';
import type { Job } from '../model/job/index.js';
import { isVerified, type Material } from '../model/material.js';
import type { Parts } from '../model/parts.js';

/** What the verdicts rest on and nobody has verified, by title, each once: materials of struts and hubs, the glue line, the pins. */
export function unverified(parts: Parts, job: Job): readonly string[] {
  const materials = [...parts.struts.map((s) => s.material), ...parts.hubs.map((h) => h.material)];
  const titles = materials.filter((m): m is Material => m !== null && !isVerified(m)).map((m) => m.title);
  const joints = new Set(parts.hubs.flatMap((h) => h.sockets.map((s) => s.joint)));
  if (joints.has('glued') && job.nodes.bondStrength_MPa === undefined && !GLUE_LINE.source.verified)
    titles.push('the glue line');
  if (joints.has('pinned') && !PIN_STEEL.source.verified) titles.push('the cross pins');
  return [...new Set(titles)];
}
