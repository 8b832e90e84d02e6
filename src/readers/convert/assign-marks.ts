import { distance, type Vec3 } from '../../maths/vec3.js';
import { markKey } from '../../model/marks.js';
import type { Remembered } from './mark-memory.js';

/** One thing that needs a mark. */
export interface Unmarked {
  readonly at: Vec3;
  /** Marks of the nodes it stands on, sorted; empty for a node. */
  readonly nodes: readonly string[];
  /** Its own mark where the file gives one. */
  readonly own: string | null;
}

export interface Assigned {
  readonly marks: readonly string[];
  readonly kept: number;
  readonly withdrawn: readonly string[];
}

/**
 * A mark for each thing: its own; else that of the remembered thing on the same nodes; else that of the nearest remembered
 * one within `reach`, nearest pair first; else the next number. A number that was ever used is not used again.
 * `prefix`: the letter in front of the number.
 */
export function assignMarks(
  things: readonly Unmarked[],
  remembered: Remembered,
  everUsed: readonly string[],
  prefix: string,
  reach: number,
): Assigned {
  const marks: (string | null)[] = things.map((t) => t.own);
  const taken = new Set(marks.flatMap((m) => (m === null ? [] : [markKey(m)])));
  const free = new Map(Object.entries(remembered).filter(([mark]) => !taken.has(markKey(mark))));
  const give = (i: number, mark: string): void => {
    marks[i] = mark;
    free.delete(mark);
    taken.add(markKey(mark));
  };

  const byNodes = new Map([...free].map(([mark, place]) => [(place.nodes ?? []).join(' '), mark]));
  things.forEach((thing, i) => {
    const mark = thing.nodes.length > 0 && marks[i] === null ? byNodes.get(thing.nodes.join(' ')) : undefined;
    if (mark !== undefined && free.has(mark)) give(i, mark);
  });
  for (const { i, mark } of nearestFirst(things, marks, free, reach))
    if (marks[i] === null && free.has(mark)) give(i, mark);

  const kept = marks.filter((m) => m !== null && Object.hasOwn(remembered, m)).length;
  let number = 0;
  const digits = new RegExp(`^${prefix}0*([0-9]+)$`, 'i');
  for (const mark of [...everUsed, ...Object.keys(remembered), ...taken])
    number = Math.max(number, Number(digits.exec(mark)?.[1] ?? 0));
  const width = Math.max(3, String(number + things.length).length);
  const done = marks.map((mark) => mark ?? `${prefix}${String(++number).padStart(width, '0')}`);
  return { marks: done, kept, withdrawn: [...free.keys()] };
}

/** Pairs of an unmarked thing and a free remembered mark within reach, by distance, then mark, then place in the list. */
function nearestFirst(
  things: readonly Unmarked[],
  marks: readonly (string | null)[],
  free: ReadonlyMap<string, { readonly at: Vec3 }>,
  reach: number,
): { readonly i: number; readonly mark: string }[] {
  const grid = new Map<string, [string, Vec3][]>();
  const cell = (v: number): number => Math.floor(v / reach);
  for (const [mark, { at }] of reach > 0 ? free : []) {
    const key = at.map(cell).join(' ');
    grid.set(key, [...(grid.get(key) ?? []), [mark, at]]);
  }
  const pairs: { i: number; mark: string; gap: number }[] = [];
  things.forEach(({ at }, i) => {
    if (marks[i] !== null || grid.size === 0) return;
    const [x, y, z] = at.map(cell) as [number, number, number];
    for (let a = x - 1; a <= x + 1; a++)
      for (let b = y - 1; b <= y + 1; b++)
        for (let c = z - 1; c <= z + 1; c++)
          for (const [mark, place] of grid.get(`${a} ${b} ${c}`) ?? []) {
            const gap = distance(at, place);
            if (gap <= reach) pairs.push({ i, mark, gap });
          }
  });
  return pairs.sort((a, b) => a.gap - b.gap || (a.mark < b.mark ? -1 : a.mark > b.mark ? 1 : a.i - b.i));
}
