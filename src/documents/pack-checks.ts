import type { Parts } from '../model/parts.js';

/**
 * What only the making of a pack finds out: whether hubs come out as whole solids that a printer holds, whether letters have
 * room, whether pieces fit on bars and sheets, whether every strut gets in and how the frame closes.
 */
const PACK_CHECKS = ['hub solids', 'engraving', 'bars', 'building order', 'fit-up'] as const;

/** The checks that are left to the pack of these parts, in the words of check.json and the papers. */
export const packChecks = ({ panels }: Pick<Parts, 'panels'>): readonly string[] =>
  panels.length > 0 ? [...PACK_CHECKS, 'sheets'] : PACK_CHECKS;
