import { sayFinding } from '../model/findings/index.js';
import type { Mended } from '../statics/mend/mend.js';

/** What `mend --json` prints: lengths in mm, forces in N. */
export interface MendReport {
  readonly format: 'strutwright-mend/1';
  readonly done: boolean;
  readonly steps: number;
  readonly before: { readonly flatness_mm: number; readonly residual_N: number | null };
  readonly after: { readonly flatness_mm: number; readonly residual_N: number | null };
  readonly largestMove_mm: number;
  readonly largestForceChange_N: number;
  readonly movements: readonly {
    readonly node: string;
    readonly by_mm: readonly number[];
    readonly distance_mm: number;
  }[];
  readonly findings: readonly { readonly level: string; readonly code: string; readonly message: string }[];
}

export function mendReport(mended: Mended): MendReport {
  return {
    format: 'strutwright-mend/1',
    done: mended.done,
    steps: mended.steps,
    before: { flatness_mm: mended.before.flatness, residual_N: mended.before.residual },
    after: { flatness_mm: mended.after.flatness, residual_N: mended.after.residual },
    largestMove_mm: mended.movements.reduce((most, m) => Math.max(most, m.distance), 0),
    largestForceChange_N: mended.forceChange,
    movements: mended.movements.map((m) => ({ node: m.node, by_mm: [...m.by], distance_mm: m.distance })),
    findings: mended.findings.map((f) => ({ level: f.level, code: f.code, message: sayFinding(f) })),
  };
}
