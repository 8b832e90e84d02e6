/** The largest input that is read. Past these, memory and time on an ordinary machine are not promised. */
export const LIMITS = {
  /** Characters of one input file: ten times a truss of 50,000 nodes. */
  fileCharacters: 64_000_000,
  nodes: 50_000,
  members: 200_000,
  faces: 100_000,
  /** Corners of one face: whether it crosses itself takes the square of them. */
  corners: 1000,
  /** Nesting of brackets in a JSON file: the deepest key of a job stands at 6. */
  depth: 32,
  /** Largest magnitude of any number: its cube in other units is still far from what a double holds. */
  magnitude: 1e15,
  /** Smallest magnitude but nought: its cube in other units is still far from where doubles end. */
  leastMagnitude: 1e-100,
} as const;

/** Whether a number of an input file is one to reckon with. */
export const isUsable = (value: number): boolean =>
  value === 0 || (Math.abs(value) >= LIMITS.leastMagnitude && Math.abs(value) <= LIMITS.magnitude);
