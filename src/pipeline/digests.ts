import { sha256 } from '../machine/hash.js';
import type { PanelPart, Parts, StrutPart } from '../model/parts.js';
import type { PackPart } from './pack-writer.js';

const digestOf = (made: unknown): string => sha256(new TextEncoder().encode(JSON.stringify(made)));

/** To the saw's and the cutter's resolution: 0.001 mm. */
const round = (v: number): number => Math.round(v * 1000) / 1000 + 0;

/** Digest of what is cut: section, material, length, ends as marked; null where there is no length. */
export function strutDigest(strut: StrutPart): string | null {
  if (strut.cutLength === null) return null;
  return digestOf([
    strut.mark,
    strut.section?.name,
    strut.section?.material,
    round(strut.cutLength),
    strut.ends.map((e) => [e.node, e.detail]),
  ]);
}

/** Digest of what is cut: outline, holes and engraving in the panel's own frame, material, thickness; null where there is no outline. */
export function panelDigest(panel: PanelPart): string | null {
  if (!panel.makeable || panel.outline.length === 0) return null;
  const line = (points: readonly (readonly [number, number])[]) => points.map(([x, y]) => [round(x), round(y)]);
  return digestOf([
    panel.mark,
    panel.material?.name,
    panel.thickness,
    line(panel.outline),
    panel.holes.map(line),
    panel.engraving.map(line),
  ]);
}

/** One entry a strut and a panel for the manifest; `filesOf` names the files that hold a panel's cut. */
export function cutParts(parts: Parts, filesOf: (panel: PanelPart) => readonly string[]): readonly PackPart[] {
  return [
    ...parts.struts.map((s): PackPart => ({ mark: s.mark, kind: 'strut', digest: strutDigest(s), files: [] })),
    ...parts.panels.map(
      (p): PackPart => ({
        mark: p.mark,
        kind: 'panel',
        digest: filesOf(p).length > 0 ? panelDigest(p) : null,
        files: filesOf(p),
      }),
    ),
  ];
}
