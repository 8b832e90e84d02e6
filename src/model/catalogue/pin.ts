import type { Source } from '../material.js';

/** Cross pins of sockets: drawn steel wire or bolt of no stated grade. Yield and tensile strength, MPa. */
export const PIN_STEEL: { readonly fy: number; readonly fu: number; readonly source: Source } = {
  fy: 235,
  fu: 360,
  source: { text: 'taken as S235 (from memory)', mark: 'memory', verified: false },
};
