/** What the page is given: numbers in mm and N, marks as they stand on the parts. Written by assembly-html.ts. */
export interface PageData {
  readonly title: string;
  readonly revision: string;
  readonly date: string | null;
  /** Of the pack's content: ticks of another revision or another truss are not shown. */
  readonly key: string;
  readonly caution: string;
  readonly hold: readonly string[];
  readonly nodes: readonly PageNode[];
  readonly struts: readonly PageStrut[];
  readonly panels: readonly PagePanel[];
  readonly steps: readonly PageStep[];
  readonly findings: readonly { readonly level: string; readonly subject: string; readonly message: string }[];
}

export interface PageNode {
  readonly mark: string;
  readonly at: readonly [number, number, number];
  readonly radius: number;
  readonly sockets: number;
  readonly files: readonly string[];
}

export interface PageStrut {
  readonly mark: string;
  /** Node indices. */
  readonly ends: readonly [number, number];
  readonly section: string;
  readonly radius: number;
  readonly cut: string;
  /** N, tension positive; null: unknown. */
  readonly force: number | null;
  readonly forceText: string;
  readonly utilisation: string;
  /** Papers of the pack that it stands in. */
  readonly files: readonly string[];
}

export interface PagePanel {
  readonly mark: string;
  /** Corners in the truss's axes. */
  readonly corners: readonly (readonly [number, number, number])[];
  readonly words: string;
  readonly files: readonly string[];
}

export interface PageStep {
  readonly say: string;
  readonly nodes: readonly number[];
  readonly struts: readonly { readonly index: number; readonly how: string }[];
  readonly panels: readonly number[];
  /** Node indices propped in this step, and all that are propped once it is done. */
  readonly props: readonly number[];
  readonly propped: readonly number[];
  readonly notes: readonly string[];
}
