import type { SocketPath } from './case.js';

/** Loose: carries nothing. Chosen in a job, never assumed. */
export const loose: SocketPath = ({ actions }) =>
  actions.axial === 0 ? [{ utilisation: 0, rule: 'loose socket' }] : null;
