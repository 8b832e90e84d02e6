/** Pieces to cut and the bars for them; mm. */
export interface StockRequest {
  readonly pieces: readonly StockPiece[];
  readonly stock: readonly StockKind[];
  /** Width of the cut, mm. */
  readonly kerf: number;
  /** Trimmed off an end of each bar before the first piece, blade included, mm; default 0. */
  readonly endTrim?: number;
  /** How many ends of a bar are trimmed so; default 1. */
  readonly trimmedEnds?: 0 | 1 | 2;
  /**
   * Worth of what is left: an offcut of at least `least` mm counts as `share` (0 to 1) of its bar's price for its length. Absent:
   * offcuts are worth nothing.
   */
  readonly offcuts?: { readonly least: number; readonly share: number };
  /** Whole number; another seed, another search. Default 1. */
  readonly seed?: number;
  /** Net for callers, ms; absent: the answer depends on the input and the seed alone. */
  readonly timeLimitMs?: number;
  /** Work of the search as a multiple of the usual; default 1. */
  readonly effort?: number;
}

export interface StockPiece {
  readonly mark: string;
  readonly length: number;
  readonly quantity: number;
}

export interface StockKind {
  readonly name: string;
  readonly length: number;
  /** Of one bar, in any currency; default 1. Nought for an offcut in the rack, which is then used first. */
  readonly price?: number | undefined;
  /** How many there are; absent: any number. */
  readonly available?: number | undefined;
  /** Ends trimmed of this kind instead of the request's `trimmedEnds`: 0 for an offcut with sawn ends. */
  readonly trimmedEnds?: 0 | 1 | 2 | undefined;
}

export interface StockAnswer {
  /** Equal bars stand together; in each bar the cuts are in sawing order, longest first. */
  readonly bars: readonly CutBar[];
  /** Price of all bars, less what their kept offcuts are worth. */
  readonly cost: number;
  /** No plan of these pieces costs less. Nought when pieces are left uncut: nothing is claimed then. */
  readonly lowerBound: number;
  /** What the kept offcuts are worth, in price. */
  readonly credit: number;
  /** cost = lowerBound: no plan costs less. */
  readonly proven: boolean;
  /** Pieces that no bar holds, never dropped in silence. */
  readonly uncut: readonly UncutPiece[];
  /** Input that could not be used; the pieces it names are left out. */
  readonly faults: readonly StockFault[];
  readonly stopped?: 'time';
}

export interface CutBar {
  /** Name of the kind of bar. */
  readonly stock: string;
  readonly cuts: readonly { readonly mark: string; readonly length: number }[];
  /** What is left in one piece after the last cut, mm; nought when the last cut turns the rest to dust. */
  readonly offcut: number;
}

export interface UncutPiece {
  readonly mark: string;
  readonly length: number;
  readonly quantity: number;
  readonly reason: 'too-long' | 'no-stock-left';
  /** Longest piece that any bar gives, mm. */
  readonly longest: number;
}

export interface StockFault {
  /** "pieces[3] S4": where in the request. */
  readonly place: string;
  readonly wrong: string;
  readonly mend: string;
}
