import { clearanceAt } from '../../maths/polygon/clearance.js';
import { type Ring, signedArea, toPoints, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import type { Point2 } from '../../model/parts.js';
import type { ReadOutline } from './outline.js';

/** Corners nearer than this are one, mm. */
const SAME = 1e-4;

/**
 * Closed contours as panels: one that lies in no other is an outline, one directly inside an outline is a hole of it,
 * one inside a hole is an outline again. Marks are P1, P2 ... in the order of the file.
 */
export function panelsOf(contours: readonly (readonly Point2[])[]): ReadOutline[] {
  const rings = contours.map((c) => tidyRing(toRing(c), SAME)).filter((r) => r.length >= 6);
  const areas = rings.map((ring) => Math.abs(signedArea(ring)));
  const boxes = rings.map(boxOf);
  const all = rings.map((_, k) => k);
  const holders = rings.map((ring, i) =>
    all.filter((k) => areas[k]! > areas[i]! && meet(boxes[k]!, boxes[i]!) && lies(ring, rings[k]!)),
  );
  const outlines = rings.map((_, i) => i).filter((i) => holders[i]!.length % 2 === 0);
  return outlines.map((i, count) => ({
    mark: `P${count + 1}`,
    outline: toPoints(rings[i]!),
    holes: rings.flatMap((r, k) =>
      holders[k]!.length === holders[i]!.length + 1 && holders[k]!.includes(i) ? [toPoints(r)] : [],
    ),
    quantity: 1,
  }));
}

type Box = readonly [number, number, number, number];

/** Least x and y, largest x and y. */
function boxOf(ring: Ring): Box {
  const box: [number, number, number, number] = [ring[0]!, ring[1]!, ring[0]!, ring[1]!];
  for (let i = 0; i < ring.length; i += 2) {
    box[0] = Math.min(box[0], ring[i]!);
    box[1] = Math.min(box[1], ring[i + 1]!);
    box[2] = Math.max(box[2], ring[i]!);
    box[3] = Math.max(box[3], ring[i + 1]!);
  }
  return box;
}

const meet = (a: Box, b: Box): boolean => a[0] <= b[2] && b[0] <= a[2] && a[1] <= b[3] && b[1] <= a[3];

/** Corners of a ring that are asked where they lie: with all of them two fine curves would take the product of their chords. */
const ASKED = 99;

/** Whether a ring lies in another: most of its corners do, so that a shared corner does not decide. */
function lies(ring: Ring, inside: Ring): boolean {
  const corners = ring.length / 2;
  const step = Math.max(1, Math.ceil(corners / ASKED));
  let [within, asked] = [0, 0];
  for (let c = 0; c < corners; c += step, asked++)
    if (clearanceAt([inside], ring[2 * c]!, ring[2 * c + 1]!) > 0) within++;
  return within > asked / 2;
}

/** Ends nearer than this join, mm: what drawings leave open by rounding. */
const JOIN = 0.01;

/** Open lines joined end to end into closed contours; `open` counts those that never close. */
export function chain(lines: readonly (readonly Point2[])[]): { readonly closed: Point2[][]; readonly open: number } {
  const left = lines.filter((l) => l.length >= 2).map((l) => [...l]);
  const closed: Point2[][] = [];
  let open = 0;
  const near = (a: Point2, b: Point2): boolean => Math.hypot(a[0] - b[0], a[1] - b[1]) <= JOIN;
  while (left.length > 0) {
    const line = left.shift()!;
    for (let grown = true; grown && !(line.length > 2 && near(line[0]!, line.at(-1)!)); ) {
      grown = false;
      const end = line.at(-1)!;
      const k = left.findIndex((l) => near(l[0]!, end) || near(l.at(-1)!, end));
      if (k < 0) continue;
      const next = left.splice(k, 1)[0]!;
      if (!near(next[0]!, end)) next.reverse();
      line.push(...next.slice(1));
      grown = true;
    }
    if (line.length > 3 && near(line[0]!, line.at(-1)!)) closed.push(line.slice(0, -1));
    else open++;
  }
  return { closed, open };
}
