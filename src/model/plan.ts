/** Bars with their cuts, lengths in mm. */
export interface StockPlan {
  readonly bars: readonly PlannedBar[];
  readonly cost: number;
  readonly lowerBound: number;
  readonly proven: boolean;
  readonly stopped?: 'time';
}

export interface PlannedBar {
  readonly stock: string;
  readonly cuts: readonly { readonly mark: string; readonly length: number }[];
  readonly offcut: number;
}

/** Sheets with the panels on them; mm and degrees as in nesting.json. */
export interface NestingPlan {
  readonly sheets: readonly PlannedSheet[];
  readonly lowerBound: number;
  readonly stopped?: 'time';
}

export interface PlannedSheet {
  readonly sheet: string;
  readonly placements: readonly {
    readonly mark: string;
    readonly x: number;
    readonly y: number;
    readonly rotation_deg: number;
  }[];
  readonly yield: number;
}
