/** How errors of the parts meet the play that the joints leave. Lengths mm, forces N; chances 0 to 1. */
export interface FitUp {
  /** By strut, in the truss's order. */
  readonly struts: readonly StrutFit[];
  /** Closed loops of struts whose lengths must agree: one a state of self-stress, the worst first. */
  readonly loops: readonly LoopFit[];
  readonly samples: number;
  /** Share of seeded samples in which every loop closes within the play. */
  readonly chance: number;
  /** A share of all cases that closes at least: a bound that holds whatever the loops share, by Boole's inequality over the struts. */
  readonly chanceBound: number;
  readonly wanted: number;
  /** Widest tolerance of the cut length with which the wanted share of seeded samples closes, mm; null: not even with perfect cuts. */
  readonly cutNeeded_mm: number | null;
  /** Node that the errors move most: standard deviation, mm. */
  readonly movedMost: { readonly node: string; readonly deviation_mm: number } | null;
}

export interface StrutFit {
  readonly mark: string;
  /** Standard deviation of the strut's length between its nodes, mm. */
  readonly deviation_mm: number;
  /** Play of both ends together, mm. */
  readonly play_mm: number;
  /** Share of the play that two standard deviations of its worst loop ask of it; 0: in no loop. */
  readonly share: number;
  /** Its budget: play that it needs for the wanted chance, mm, when every strut has that much of its own; 0: in no loop. */
  readonly needed_mm: number;
  /** Standard deviation of the force that is locked in where nothing gives but the struts, N. */
  readonly locked_N: number;
  /** Standard deviation of the sideways miss at its far end from the sockets' angles, mm, and what it can take. */
  readonly sideways_mm: number;
  readonly aside_mm: number;
}

export interface LoopFit {
  readonly struts: readonly string[];
  /** Standard deviation of the closing error over the play that can take it up: below a half closes nearly always. */
  readonly ratio: number;
}
