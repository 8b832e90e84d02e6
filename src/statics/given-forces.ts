import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Truss } from '../model/truss.js';

/**
 * The forces that the truss file gives, N by member index, tension positive. null with a note where it gives none,
 * null with a finding a strut where it gives some and not others.
 */
export function givenForces(truss: Truss): {
  readonly forces: Float64Array | null;
  readonly findings: readonly Finding[];
} {
  const missing = truss.members.filter((m) => m.force === null);
  if (missing.length === truss.members.length) return { forces: null, findings: [finding('forces-missing', 'truss')] };
  if (missing.length > 0) return { forces: null, findings: missing.map((m) => finding('force-missing', m.mark)) };
  return { forces: Float64Array.from(truss.members, (m) => m.force!), findings: [] };
}
