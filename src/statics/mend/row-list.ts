/** Equations being collected: entries of a Jacobian and the value of each equation. */
export interface RowList {
  readonly rows: number[];
  readonly columns: number[];
  readonly entries: number[];
  /** What each equation comes to; nought where it holds. */
  readonly values: number[];
}

export const emptyRows = (): RowList => ({ rows: [], columns: [], entries: [], values: [] });
