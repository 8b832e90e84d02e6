import { sha256 } from '../machine/hash.js';
import type { PanelPart, Parts, StrutPart } from '../model/parts.js';
import type { PackFile, PackPart } from './pack-writer.js';
import type { Lineage } from './since.js';

/** SHA-256 of a record as JSON. */
export const digestOf = (made: unknown): string => sha256(new TextEncoder().encode(JSON.stringify(made)));

/** To the saw's and the cutter's resolution: 0.001 mm. */
const round = (v: number): number => Math.round(v * 1000) / 1000 + 0;

/** Digests of what is cut: with its labels, and without. null where nothing is cut. */
interface Digests {
  readonly digest: string | null;
  readonly form: string | null;
}

const NOTHING: Digests = { digest: null, form: null };

/** Section, material and length; labels: the mark, and the nodes that both ends are marked with. */
export function strutDigests(strut: StrutPart): Digests {
  if (strut.cutLength === null) return NOTHING;
  const form = [strut.section?.name, strut.section?.material, round(strut.cutLength), strut.ends.map((e) => e.detail)];
  return { form: digestOf(form), digest: digestOf([form, strut.mark, strut.ends.map((e) => e.node)]) };
}

/** Outline, holes and bevels in the panel's own frame, material, thickness; labels: the mark and what is engraved. */
export function panelDigests(panel: PanelPart): Digests {
  if (!panel.makeable || panel.outline.length === 0) return NOTHING;
  const line = (points: readonly (readonly [number, number])[]) => points.map(([x, y]) => [round(x), round(y)]);
  const bevels = panel.edges.some((e) => e.bevel !== 0) ? [panel.edges.map((e) => round(e.bevel))] : [];
  const form = [panel.material?.name, panel.thickness, line(panel.outline), panel.holes.map(line), ...bevels];
  return { form: digestOf(form), digest: digestOf([form, panel.mark, panel.engraving.map(line)]) };
}

/** Struts and panels for the manifest, without files. */
export function cutParts(parts: Parts, lineage: Lineage): readonly PackPart[] {
  const entry = (kind: 'strut' | 'panel', mark: string, digests: Digests): PackPart => ({
    mark,
    kind,
    ...digests,
    revision: lineage.revision(kind, mark, digests.digest),
    files: [],
  });
  return [
    ...parts.struts.map((s) => entry('strut', s.mark, strutDigests(s))),
    ...parts.panels.map((p) => entry('panel', p.mark, panelDigests(p))),
  ];
}

/** A short digest of what a pack holds: sets the ticks of one content apart from another's. */
export const contentKey = (files: readonly PackFile[]): string =>
  digestOf(files.map((f) => [f.path, f.sha256])).slice(0, 16);
