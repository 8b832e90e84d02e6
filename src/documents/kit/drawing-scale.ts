/**
 * The largest scale of ISO 5455 (1:1, 1:2, 1:5 and tens of them; 2:1, 5:1, 10:1 enlarged) at which `size` mm fit in
 * `room` mm on both axes. Returns the factor and its name.
 */
export function drawingScale(
  size: readonly [number, number],
  room: readonly [number, number],
  largest = 50,
): { readonly factor: number; readonly name: string } {
  const fits = Math.min(
    size[0] > 0 ? room[0] / size[0] : Number.POSITIVE_INFINITY,
    size[1] > 0 ? room[1] / size[1] : Number.POSITIVE_INFINITY,
    largest,
  );
  for (let power = 3; power >= -9; power--)
    for (const step of [5, 2, 1]) {
      const factor = step * 10 ** power;
      if (factor <= fits * (1 + SLACK) && factor <= largest) return { factor, name: nameOf(step, power) };
    }
  return { factor: 1e-9, name: '1:1000000000' };
}

/** Round-off of room / size, so that what fits exactly fits. */
const SLACK = 1e-12;

function nameOf(step: number, power: number): string {
  if (power >= 0) return `${step * 10 ** power}:1`;
  // 5 x 10^-1 is 1:2, 2 x 10^-1 is 1:5, 1 x 10^-1 is 1:10.
  return `1:${(10 / step) * 10 ** (-power - 1)}`;
}
