/** For each colour the nearest of the first eight of the DXF colour index that no earlier, different colour has taken. */
export function colourIndices(colours: readonly string[]): number[] {
  const taken = new Map<string, number>();
  return colours.map((hex) => {
    const known = taken.get(hex);
    if (known !== undefined) return known;
    const rgb = [1, 3, 5].map((i) => Number.parseInt(hex.slice(i, i + 2), 16));
    const free = BASE_COLOURS.map((_, i) => i + 1).filter((i) => ![...taken.values()].includes(i));
    const off = (i: number): number => BASE_COLOURS[i - 1]!.reduce((sum, v, k) => sum + (v - rgb[k]!) ** 2, 0);
    const index = free.length > 0 ? free.reduce((a, b) => (off(b) < off(a) ? b : a)) : 7;
    taken.set(hex, index);
    return index;
  });
}

/** Red, yellow, green, cyan, blue, magenta, black (or white, on a black ground), grey. */
const BASE_COLOURS: readonly (readonly [number, number, number])[] = [
  [255, 0, 0],
  [255, 255, 0],
  [0, 255, 0],
  [0, 255, 255],
  [0, 0, 255],
  [255, 0, 255],
  [0, 0, 0],
  [128, 128, 128],
];
