import { describe, expect, it } from 'vitest';
import { anyRotation, QUARTER_TURNS, type Rotation } from './motions.js';

/** What one mm and one N are in a system of units. */
export interface UnitSystem {
  readonly name: string;
  readonly mm: number;
  readonly newton: number;
}

export const UNIT_SYSTEMS: readonly UnitSystem[] = [
  { name: 'mm and N', mm: 1, newton: 1 },
  { name: 'inches and pounds-force', mm: 1 / 25.4, newton: 1 / 4.4482216152605 },
];

/** What a published value is made of, by its powers of length and force. */
export const DIMENSION = {
  number: [0, 0],
  length: [1, 0],
  force: [0, 1],
  moment: [1, 1],
  bendingStiffness: [2, 1],
} as const;

/** One published value, as a program that takes any consistent units must give it in every system and every axes. */
export interface PublishedCheck {
  /** What and whose; the source stands in the file beside it. */
  readonly name: string;
  /** mm and N. */
  readonly wanted: number;
  readonly dimension: keyof typeof DIMENSION;
  /** Largest relative difference. */
  readonly within: number;
  /** quarter: supports along the axes must stay so; any: nothing does. */
  readonly turns: 'any' | 'quarter';
  /** The value in the system's units, the whole turned by r. */
  readonly value: (system: UnitSystem, r: Rotation) => number;
}

const TURNS: Readonly<Record<PublishedCheck['turns'], readonly Rotation[]>> = {
  quarter: QUARTER_TURNS,
  any: [...QUARTER_TURNS, anyRotation(1), anyRotation(2), anyRotation(3)],
};

/** Every check of a table in every system of units and every turn: a row cannot be written without them. */
export function holdEverywhere(title: string, checks: readonly PublishedCheck[]): void {
  describe(title, () => {
    for (const check of checks)
      for (const system of UNIT_SYSTEMS)
        it(`${check.name}, in ${system.name}`, () => {
          const [length, force] = DIMENSION[check.dimension];
          const unit = system.mm ** length * system.newton ** force;
          TURNS[check.turns].forEach((r, turn) => {
            const got = check.value(system, r) / unit;
            const off = Math.abs(got / check.wanted - 1);
            expect(off, `turn ${turn}: ${got} against ${check.wanted}`).toBeLessThan(check.within);
          });
        });
  });
}
