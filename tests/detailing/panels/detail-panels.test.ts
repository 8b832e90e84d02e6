import { describe, expect, it } from 'vitest';
import { edgeInset } from '../../../src/detailing/panels/inset.js';
import { reachInSlab } from '../../../src/detailing/panels/strut-reach.js';

const seat = {
  seating: 'between' as const,
  thickness: 3,
  low: -1.5,
  high: 1.5,
  strutReach: 4,
  strutHalf: 4,
  dihedrals: [],
  gap: 1,
  movement: 0.2,
};

describe('inset of an edge', () => {
  it('between the struts is reach, gap and movement', () => {
    expect(edgeInset(seat, 'square')).toEqual({ inset: 5.2, bevel: 0 });
  });

  it('between the struts is at least (t/2)/tan(δ/2) for a sharp neighbour', () => {
    const delta = (30 * Math.PI) / 180;
    expect(edgeInset({ ...seat, dihedrals: [delta] }, 'square').inset).toBeCloseTo(1.5 / Math.tan(delta / 2) + 1.2, 12);
    // A valley of 330° leaves the same room as a ridge of 30°.
    expect(edgeInset({ ...seat, dihedrals: [2 * Math.PI - delta] }, 'square').inset).toBeCloseTo(
      1.5 / Math.tan(delta / 2) + 1.2,
      12,
    );
  });

  it('over the struts runs to the plane that halves the angle, less half the gap', () => {
    const over = {
      ...seat,
      seating: 'over' as const,
      low: 4,
      high: 7,
      strutReach: null,
      movement: 0,
      dihedrals: [Math.PI / 2],
    };
    // At a right angle tan(δ/2) = 1: 4 mm out at the lower face, 7 at the upper; gap/2 across a 45° plane is 0.5 √2.
    expect(edgeInset(over, 'square').inset).toBeCloseTo(-(4 - Math.SQRT1_2), 12);
    const bevelled = edgeInset(over, 'bevelled');
    expect(bevelled.inset).toBeCloseTo(-(7 - Math.SQRT1_2), 12);
    expect(bevelled.bevel).toBeCloseTo(Math.PI / 4, 12);
    // In a valley of 270° both faces stay back, the upper one more.
    expect(edgeInset({ ...over, dihedrals: [1.5 * Math.PI] }, 'square').inset).toBeCloseTo(7 + Math.SQRT1_2, 12);
    // Flat neighbours share the strut: half the gap each.
    expect(edgeInset({ ...over, dihedrals: [Math.PI] }, 'square').inset).toBeCloseTo(0.5, 12);
  });
});

describe('reach of a strut in a slab', () => {
  const round = { name: 'r', shape: { kind: 'round' as const, diameter: 10 }, material: 'm', measured: null };
  const bar = {
    name: 'b',
    shape: { kind: 'rectangle' as const, width: 20, height: 10 },
    material: 'm',
    measured: null,
  };
  const axes = { x: [1, 0, 0] as const, y: [0, 1, 0] as const, z: [0, 0, 1] as const };

  it('of a round one is the radius in its plane and a chord beside it', () => {
    expect(reachInSlab(round, axes, [0, 1, 0], [0, 0, 1], -1, 1)).toBe(5);
    expect(reachInSlab(round, axes, [0, 1, 0], [0, 0, 1], 3, 6)).toBeCloseTo(4, 12);
    expect(reachInSlab(round, axes, [0, 1, 0], [0, 0, 1], 5, 8)).toBeNull();
  });

  it("of a turned rectangle is the slab's part of it", () => {
    expect(reachInSlab(bar, axes, [0, 1, 0], [0, 0, 1], -1, 1)).toBe(10);
    const s = Math.SQRT1_2;
    const turned = { x: [1, 0, 0] as const, y: [0, s, s] as const, z: [0, -s, s] as const };
    // Corners at (10.6, 3.5) and (3.5, 10.6): the slab below 1 mm cuts the long side.
    expect(reachInSlab(bar, turned, [0, 1, 0], [0, 0, 1], -1, 1)).toBeCloseTo(1 + 5 * Math.SQRT2, 9);
  });
});
