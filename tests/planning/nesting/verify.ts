import { FillRule, intersect } from 'clipper2-ts';
import type { NestingAnswer, NestingRequest } from '../../../src/planning/nesting/request.js';

type P = readonly [number, number];

/** What spacing and margin promise, mm. */
const PROMISE = 0.001;

/**
 * What is wrong with a plan, in words; shares no code with the nesting. Places every outline anew from the answer's
 * numbers and looks at every pair of edges on a sheet.
 */
export function planErrors(request: NestingRequest, answer: NestingAnswer): string[] {
  const errors: string[] = [];
  const count = new Map<string, number>();
  const used = new Map<string, number>();
  answer.sheets.forEach((sheet, s) => {
    used.set(sheet.sheet, (used.get(sheet.sheet) ?? 0) + 1);
    const kind = request.sheets.find((k) => k.name === sheet.sheet);
    if (!kind) {
      errors.push(`sheet ${s}: no sheet ${sheet.sheet}`);
      return;
    }
    if (sheet.placements.length === 0) errors.push(`sheet ${s} is empty`);
    const placed = sheet.placements.map((p) => {
      const panel = request.panels.find((q) => q.mark === p.mark)!;
      count.set(p.mark, (count.get(p.mark) ?? 0) + 1);
      if (
        panel.rotations &&
        !panel.rotations.some((r) => Math.abs(((((p.rotation_deg - r) % 360) + 540) % 360) - 180) < 1e-9)
      )
        errors.push(`${p.mark} is turned by ${p.rotation_deg}`);
      const [c, sn] = [Math.cos((p.rotation_deg * Math.PI) / 180), Math.sin((p.rotation_deg * Math.PI) / 180)];
      return { mark: p.mark, at: panel.outline.map(([x, y]): P => [c * x - sn * y + p.x, sn * x + c * y + p.y]) };
    });
    for (const { mark, at } of placed) {
      const m = request.margin - PROMISE;
      if (kind.outline) {
        if (!at.every((q) => inside(q, kind.outline!)) && crossingDepth(at, kind.outline, true) > PROMISE)
          errors.push(`${mark} leaves the offcut`);
        if (request.margin > 0 && gap(at, kind.outline) < m)
          errors.push(`${mark} is nearer than the margin to the offcut's edge`);
      } else
        for (const [x, y] of at)
          if (x < m || y < m || x > kind.width - m || y > kind.height - m) {
            errors.push(`${mark} leaves sheet ${s} at ${x}, ${y}`);
            break;
          }
    }
    for (let i = 0; i < placed.length; i++)
      for (let j = 0; j < i; j++) {
        const [a, b] = [placed[i]!, placed[j]!];
        if (apart(a.at, b.at, request.spacing)) continue;
        if (crossingDepth(a.at, b.at, false) > PROMISE) errors.push(`${a.mark} and ${b.mark} overlap on sheet ${s}`);
        else if (request.spacing > PROMISE && gap(a.at, b.at) < request.spacing - PROMISE)
          errors.push(`${a.mark} and ${b.mark} are ${gap(a.at, b.at)} mm apart`);
      }
    const area =
      placed.reduce((sum, p) => sum + Math.abs(shoelace(p.at)), 0) /
      Math.abs(kind.outline ? shoelace(kind.outline) : kind.width * kind.height);
    if (Math.abs(area - sheet.yield) > 1e-9) errors.push(`sheet ${s}: yield ${sheet.yield}, not ${area}`);
  });
  for (const panel of request.panels) {
    const lost = answer.unplaced.find((u) => u.mark === panel.mark)?.quantity ?? 0;
    const faulty = answer.faults.some((f) => f.place.endsWith(` ${panel.mark}`));
    if (!faulty && (count.get(panel.mark) ?? 0) + lost !== panel.quantity)
      errors.push(`${panel.mark}: ${count.get(panel.mark) ?? 0} of ${panel.quantity}`);
  }
  for (const kind of request.sheets)
    if ((used.get(kind.name) ?? 0) > (kind.available ?? Infinity))
      errors.push(`more sheets ${kind.name} than there are`);
  if (answer.sheets.length < answer.lowerBound && answer.unplaced.length === 0)
    errors.push('fewer sheets than the lower bound');
  return errors;
}

function apart(a: readonly P[], b: readonly P[], spacing: number): boolean {
  const box = (q: readonly P[]): number[] => [
    Math.min(...q.map((p) => p[0])),
    Math.min(...q.map((p) => p[1])),
    Math.max(...q.map((p) => p[0])),
    Math.max(...q.map((p) => p[1])),
  ];
  const [p, q] = [box(a), box(b)];
  return p[0]! > q[2]! + spacing || q[0]! > p[2]! + spacing || p[1]! > q[3]! + spacing || q[1]! > p[3]! + spacing;
}

export function shoelace(q: readonly P[]): number {
  return q.reduce((sum, [x, y], i) => sum + x * q[(i + 1) % q.length]![1] - y * q[(i + 1) % q.length]![0], 0) / 2;
}

function inside([x, y]: P, q: readonly P[]): boolean {
  let odd = false;
  q.forEach(([ax, ay], i) => {
    const [bx, by] = q[(i + 1) % q.length]!;
    if (ay > y !== by > y && x < ax + ((y - ay) * (bx - ax)) / (by - ay)) odd = !odd;
  });
  return odd;
}

/** Thickness, 2 area / half perimeter, of the thickest piece of a in b (or of a outside b). */
function crossingDepth(a: readonly P[], b: readonly P[], outside: boolean): number {
  const scale = 1e6;
  const grid = (q: readonly P[]) =>
    (shoelace(q) < 0 ? [...q].reverse() : q).map(([x, y]) => ({
      x: Math.round(x * scale),
      y: Math.round(y * scale),
      z: 0,
    }));
  const whole = Math.abs(shoelace(a));
  const common = intersect([grid(a)], [grid(b)], FillRule.NonZero).map((path) =>
    path.map((p): P => [p.x / scale, p.y / scale]),
  );
  if (outside) return (whole - common.reduce((s, q) => s + shoelace(q), 0)) / Math.sqrt(whole);
  return Math.max(
    0,
    ...common.map((q) => {
      const round = q.reduce(
        (s, p, i) => s + Math.hypot(p[0] - q[(i + 1) % q.length]![0], p[1] - q[(i + 1) % q.length]![1]),
        0,
      );
      return round > 0 ? (2 * Math.abs(shoelace(q))) / round : 0;
    }),
  );
}

/** Least distance of two outlines: between a corner of one and an edge of the other, where they do not cross. */
function gap(a: readonly P[], b: readonly P[]): number {
  const one = (q: readonly P[], r: readonly P[]): number =>
    Math.min(
      ...q.map(([x, y]) =>
        Math.min(
          ...r.map(([ax, ay], i) => {
            const [bx, by] = r[(i + 1) % r.length]!;
            const [dx, dy] = [bx - ax, by - ay];
            const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / (dx * dx + dy * dy || 1)));
            return Math.hypot(x - ax - t * dx, y - ay - t * dy);
          }),
        ),
      ),
    );
  return Math.min(one(a, b), one(b, a));
}
