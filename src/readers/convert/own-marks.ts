import { markKey, markProblem } from '../../model/marks.js';

/**
 * The identifiers of a file as marks: as they are; plain numbers with N or S in front, where all of a list are numbers.
 * What is no mark, or stands twice, is left to be numbered.
 */
export function ownMarks(
  nodes: readonly (string | null)[],
  struts: readonly (string | null)[],
): {
  readonly nodes: readonly (string | null)[];
  readonly struts: readonly (string | null)[];
  readonly prefixed: boolean;
} {
  const numbered = (list: readonly (string | null)[]): boolean =>
    list.some((m) => m !== null) && list.every((m) => m === null || /^[0-9]{1,20}$/.test(m));
  const of = (list: readonly (string | null)[], prefix: string): (string | null)[] => {
    const marks = numbered(list) ? list.map((m) => (m === null ? null : prefix + m)) : list;
    const seen = new Set<string>();
    return marks.map((mark) => {
      if (mark === null || markProblem(mark) || seen.has(markKey(mark))) return null;
      seen.add(markKey(mark));
      return mark;
    });
  };
  return { nodes: of(nodes, 'N'), struts: of(struts, 'S'), prefixed: numbered(nodes) || numbered(struts) };
}
