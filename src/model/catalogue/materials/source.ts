import type { Source } from '../../material.js';

/** A value remembered and not looked up again. */
export const FROM_MEMORY: Source = { text: 'from memory', mark: 'memory', verified: false };

/** A value remembered, with the standard or handbook where it stands. */
export const remembered = (text: string): Source => ({
  text: `${text} (from memory)`,
  mark: 'memory',
  verified: false,
});

/** A value read in a source. */
export const seen = (text: string): Source => ({ text, mark: 'seen', verified: true });
