import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import { type DxfThing, numberOf } from './dxf-groups.js';
import { planeOf } from './dxf-plane.js';

/** From the axes of a block to those that it is inserted into. */
export type Place = (p: Vec3) => Vec3;

export interface Insert {
  /** One for each place of the array, rows within columns; a single one where the insert is no array. */
  readonly places: readonly Place[];
  /** The largest of the three scales, positive. */
  readonly scale: number;
}

/** How often an insert stands: columns (70) by rows (71), each 1 where absent. */
export const countOf = (insert: DxfThing): number => {
  const [columns, rows] = [numberOf(insert, 70, 1), numberOf(insert, 71, 1)].map((n) => (n === 0 ? 1 : n)) as [
    number,
    number,
  ];
  return columns * rows;
};

/**
 * Where an INSERT puts the points of its block (AutoCAD DXF reference, INSERT): less the block's base point, times the scales
 * (41, 42, 43), moved by column and row (44, 45), turned about z (50), moved to the insertion point, all in the plane of its
 * extrusion. null where a number is not finite or a scale is nought.
 */
export function insertOf(insert: DxfThing, base: Vec3): Insert | null {
  const at: Vec3 = [numberOf(insert, 10), numberOf(insert, 20), numberOf(insert, 30)];
  const scales: Vec3 = [numberOf(insert, 41, 1), numberOf(insert, 42, 1), numberOf(insert, 43, 1)];
  const turn = (numberOf(insert, 50) * Math.PI) / 180;
  const apart: Vec3 = [numberOf(insert, 44), numberOf(insert, 45), 0];
  const [columns, rows] = [numberOf(insert, 70, 1) || 1, numberOf(insert, 71, 1) || 1];
  const numbers = [at, scales, apart, base, [turn, columns, rows] as const];
  if (!numbers.every(isFinite3) || scales.includes(0) || columns < 0 || rows < 0) return null;
  const [cos, sin] = rightAngled(turn);
  const plane = planeOf(insert);
  const places: Place[] = [];
  for (let column = 0; column < columns; column++)
    for (let row = 0; row < rows; row++)
      places.push((p) => {
        const x = (p[0] - base[0]) * scales[0] + column * apart[0];
        const y = (p[1] - base[1]) * scales[1] + row * apart[1];
        return plane([at[0] + cos * x - sin * y, at[1] + sin * x + cos * y, at[2] + (p[2] - base[2]) * scales[2]]);
      });
  return { places, scale: Math.max(...scales.map(Math.abs)) };
}

/** Cosine and sine, exact at right angles, where the sine of π would leave 1e-16 of a length. */
function rightAngled(turn: number): [number, number] {
  const quarters = (turn * 2) / Math.PI;
  const whole = Math.round(quarters);
  if (Math.abs(quarters - whole) > 1e-12) return [Math.cos(turn), Math.sin(turn)];
  return [
    [1, 0],
    [0, 1],
    [-1, 0],
    [0, -1],
  ][((whole % 4) + 4) % 4] as [number, number];
}
