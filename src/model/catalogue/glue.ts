import type { Source } from '../material.js';

/** Shear strength of a glue line between wood and a sanded printed socket, short-term, MPa; low for epoxy, high for white glue on plastic. */
export const GLUE_LINE: { readonly strength: number; readonly source: Source } = {
  strength: 3,
  source: { text: 'epoxy on sanded plastic, a judgement (from memory)', mark: 'memory', verified: false },
};
