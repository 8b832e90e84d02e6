export type Level = 'stop' | 'warn' | 'note';

/** What a finding's subject marks. */
export type SubjectKind = 'node' | 'strut' | 'panel' | 'face' | 'cell' | 'support' | 'stock' | 'sheet' | 'truss';

/** A problem as data. Its words are made once, at the edge, from the catalogue's entry for its code. */
export interface Finding {
  readonly level: Level;
  readonly code: string;
  /** Mark of the part; "truss" for the structure as a whole. */
  readonly subject: string;
  readonly kind: SubjectKind;
  /** What was found, what it was held against, both in `unit`; null where there is no number. */
  readonly value: number | null;
  readonly limit: number | null;
  /** mm, N, MPa, deg, "" for a ratio. */
  readonly unit: string;
  /** Names that the sentence needs: other parts, a combination, a clause. */
  readonly about?: Readonly<Record<string, string | number>>;
}

/** What is true of every finding of one code. */
export interface FindingEntry {
  /** Level unless the finding itself says otherwise. */
  readonly level: Level;
  readonly kind: SubjectKind;
  readonly unit: string;
  /** false: material hazards, open meshes, instability. */
  readonly waivable: boolean;
  /** true: the part itself is unsound and its machine files are withheld while the stop stands. */
  readonly withholds: boolean;
  /** One sentence without the subject in front: what is wrong and how to mend it. */
  readonly words: (finding: Finding) => string;
}
