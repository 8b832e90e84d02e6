/** What a part of a pack is. */
export type PartKind = 'strut' | 'node' | 'panel' | 'cap' | 'guide' | 'gauge';

export const PART_KINDS: readonly PartKind[] = ['strut', 'node', 'panel', 'cap', 'guide', 'gauge'];
