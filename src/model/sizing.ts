/** A group of struts, or one that is in none, and the section it came out with. */
export interface SizeChoice {
  /** The group's name or the strut's mark. */
  readonly name: string;
  readonly struts: readonly string[];
  /** Section before; null where it was unknown. */
  readonly from: string | null;
  readonly to: string;
  /** Highest utilisation of its struts and their sockets, with the section it came out with; null where nothing judged them. */
  readonly utilisation: number | null;
  readonly rule: string;
}
