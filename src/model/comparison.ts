import type { PartKind } from './part-kind.js';

/** One measure of a part that differs between two packs; null: not known there. */
export interface Difference {
  readonly name: string;
  readonly from: number | string | null;
  readonly to: number | string | null;
}

export interface ComparedPart {
  readonly kind: PartKind;
  readonly mark: string;
}

/** The object of `compare --json`, `strutwright-compare/1`. */
export interface Comparison {
  readonly format: 'strutwright-compare/1';
  readonly from: Issued;
  readonly to: Issued;
  readonly unchanged: readonly ComparedPart[];
  /** Cut and printed alike, with other letters on it; `was`: its mark before, where that differs. */
  readonly relabelled: readonly (ComparedPart & { readonly was: string })[];
  readonly changed: readonly (ComparedPart & { readonly what: readonly Difference[] })[];
  readonly new: readonly ComparedPart[];
  readonly withdrawn: readonly ComparedPart[];
  readonly totals: Readonly<Record<string, Readonly<Record<PartKind, number>>>>;
}

export interface Issued {
  readonly title: string;
  readonly revision: string;
  readonly date: string | null;
}
