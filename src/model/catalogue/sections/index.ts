import type { Section } from '../../section.js';
import { DOWEL_SECTIONS } from './dowels.js';
import { SAWN_SECTIONS } from './sawn.js';
import { TUBE_SECTIONS } from './tubes.js';

/** Sections by name. A job adds its own under `sections`. */
export const SECTIONS: ReadonlyMap<string, Section> = new Map(
  [DOWEL_SECTIONS, SAWN_SECTIONS, TUBE_SECTIONS].flat().map((s) => [s.name, s]),
);
