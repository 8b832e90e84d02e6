/** Panels to nest and the sheets for them; mm and degrees. */
export interface NestingRequest {
  readonly panels: readonly NestingPanel[];
  readonly sheets: readonly NestingSheet[];
  /** Least distance between two panels, mm. */
  readonly spacing: number;
  /** Least distance between a panel and the sheet's edge, mm. */
  readonly margin: number;
  /** Whole number; another seed, another search. Default 1. */
  readonly seed?: number;
  /** Net for callers, ms; absent: the answer depends on the input and the seed alone. */
  readonly timeLimitMs?: number;
  /** Evaluations of the search as a multiple of the usual; default 1. */
  readonly effort?: number;
}

export interface NestingPanel {
  readonly mark: string;
  /** Corners in mm, in either sense, first not repeated. Never mirrored. */
  readonly outline: readonly (readonly [number, number])[];
  readonly quantity: number;
  /** Angles allowed, degrees; absent: any. */
  readonly rotations?: readonly number[] | undefined;
}

export interface NestingSheet {
  readonly name: string;
  readonly width: number;
  readonly height: number;
  /** How many there are; absent: any number. */
  readonly available?: number | undefined;
  /** Of an offcut, mm, within 0..width x 0..height; absent: the rectangle. */
  readonly outline?: readonly (readonly [number, number])[] | undefined;
}

export interface NestingAnswer {
  readonly sheets: readonly NestedSheet[];
  /** No plan of these panels has fewer sheets. */
  readonly lowerBound: number;
  /** Panels that stand on no sheet. */
  readonly unplaced: readonly {
    readonly mark: string;
    readonly quantity: number;
    readonly reason: 'too-large' | 'no-sheet-left';
  }[];
  /** Input that could not be used; the panels it names are left out. */
  readonly faults: readonly NestingFault[];
  readonly stopped?: 'time';
}

export interface NestedSheet {
  readonly sheet: string;
  /**
   * Where each panel stands: turned by `rotation_deg` anticlockwise about its outline's own 0,0, then moved by x, y;
   * the sheet's origin is its lower left corner.
   */
  readonly placements: readonly {
    readonly mark: string;
    readonly x: number;
    readonly y: number;
    readonly rotation_deg: number;
  }[];
  /** Area of the panels over area of the sheet. */
  readonly yield: number;
}

export interface NestingFault {
  /** "panels[3] P4": where in the request. */
  readonly place: string;
  readonly wrong: string;
  readonly mend: string;
}
