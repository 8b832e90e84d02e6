/**
 * Copies layers, one over the other, to a plain canvas without the room that the card covers: a print takes what a plain canvas
 * holds, and of a 3D one whatever was last shown. Room in css pixels.
 */
export function copyPicture(
  layers: readonly HTMLCanvasElement[],
  room: { readonly right: number; readonly bottom: number },
  onto: HTMLCanvasElement,
): void {
  layers.forEach((from, i) => {
    const w = Math.max(1, Math.round(from.width * (1 - room.right / from.clientWidth)));
    const h = Math.max(1, Math.round(from.height * (1 - room.bottom / from.clientHeight)));
    if (i === 0) [onto.width, onto.height] = [w, h];
    onto.getContext('2d')?.drawImage(from, 0, 0, w, h, 0, 0, onto.width, onto.height);
  });
}
