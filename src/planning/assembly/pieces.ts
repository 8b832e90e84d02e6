import type { AssemblySetting } from './setting.js';

/** Nodes of each connected piece of the truss that has struts, the largest piece first. */
export function pieces(setting: AssemblySetting): readonly (readonly number[])[] {
  const seen = new Set<number>();
  const found: number[][] = [];
  setting.linksAt.forEach((links, start) => {
    if (links.length === 0 || seen.has(start)) return;
    const piece: number[] = [start];
    seen.add(start);
    for (const node of piece) {
      for (const link of setting.linksAt[node]!)
        for (const next of link.ends)
          if (!seen.has(next)) {
            seen.add(next);
            piece.push(next);
          }
    }
    found.push(piece);
  });
  return found.sort((a, b) => b.length - a.length || a[0]! - b[0]!);
}
