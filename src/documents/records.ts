import type { FaceForm } from '../detailing/faces.js';
import type { AssemblyPlan } from '../model/assembly.js';
import type { Finding } from '../model/finding.js';
import type { FitUp } from '../model/fit-up.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import type { BedPlan, NestingPlan, StockPlan } from '../model/plan.js';
import type { ShapedPiece, WeakestSection } from '../model/shaped.js';
import type { Solution, Utilisation } from '../model/solution.js';
import type { Topology } from '../model/topology.js';
import type { Equilibrium } from '../statics/equilibrium.js';
import type { ReciprocalResult } from '../statics/reciprocal/result.js';

/** Everything that is known before anything is shaped or planned: what `check` reports. */
export interface Assessment {
  readonly job: Job;
  readonly topology: Topology;
  /** By face index. */
  readonly forms: readonly FaceForm[];
  readonly parts: Parts;
  /** The member forces that the papers show, N by member index, tension positive, and where they come from. */
  readonly forces: { readonly source: 'given' | 'reciprocal' | 'analysis'; readonly values: Float64Array } | null;
  readonly equilibrium: Equilibrium | null;
  readonly solution: Solution | null;
  /** What the reciprocal figure says, for check.json and the sheets; null: there is none. */
  readonly reciprocal: ReciprocalResult | null;
  readonly utilisations: readonly Utilisation[];
  /** Everything that the stages found, waived or not, in the stages' order. */
  readonly found: readonly Finding[];
  /** All findings, worst first; waived stops are in `waived` instead of stopping. */
  readonly findings: readonly Finding[];
  readonly waived: readonly Finding[];
  readonly checked: readonly string[];
  readonly notChecked: readonly string[];
  readonly status: 'clear' | 'flagged';
  /** Reasons of a hold, in words, one a stop that no waiver covers; empty: the pack is not on hold. */
  readonly hold: readonly string[];
}

/** A piece without its mesh, which was written and dropped. */
export type MadePiece = Omit<ShapedPiece, 'positions' | 'triangles'>;

/** A hub as it was made: its pieces in print orientation and the files that hold them (none where they are withheld). */
export interface MadeHub {
  readonly mark: string;
  readonly pieces: readonly MadePiece[];
  readonly files: readonly string[];
  /** The section of its plastic that is least for what it must pass on; null or absent: not measured. */
  readonly weakest?: WeakestSection | null;
}

/** Everything that the papers of a pack draw on. */
export interface PackRecords extends Assessment {
  /** By node mark; hubs that could not be made are missing. */
  readonly made: ReadonlyMap<string, MadeHub>;
  readonly stock: StockPlan | null;
  readonly nesting: NestingPlan | null;
  readonly beds: BedPlan | null;
  readonly assembly: AssemblyPlan | null;
  readonly fitUp: FitUp | null;
}
