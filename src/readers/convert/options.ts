import type { UpAxis } from '../../model/raw-geometry.js';
import type { LengthUnit } from '../../model/units.js';
import type { PairForce } from '../geometry/csv.js';
import type { MarkMemory } from './mark-memory.js';

/** How lines and loops become a truss. */
export interface ConvertOptions {
  readonly unit: LengthUnit;
  readonly up: UpAxis;
  /** Ends no farther apart than this become one node, mm; null: one millionth of the figure's size. */
  readonly merge: number | null;
  /** Whether struts are split where they cross and where a node lies on them. */
  readonly split: boolean;
  /** Whether faces are looked for where the file has none. */
  readonly findFaces: boolean;
  /** Whether every face becomes a panel. */
  readonly panels: boolean;
  readonly forces: readonly PairForce[];
  readonly memory: MarkMemory | null;
}
