/** Header, count, then 50 bytes a triangle: normal, three corners, two bytes of nothing; little-endian single precision. */
const HEADER = 80;
const TRIANGLE = 50;

/**
 * A mesh as binary STL, mm. Normals are the true unit normals: some checkers take zero normals for a text file.
 *
 * @param positions x, y, z a vertex; @param triangles three vertices each, anticlockwise seen from outside
 * @param title printable ASCII for the header; cut at 79 bytes; a leading "solid" would name a text file, so it is put off by a blank
 */
export function writeStl(positions: Float32Array, triangles: Uint32Array, title: string): Uint8Array {
  const count = triangles.length / 3;
  const bytes = new Uint8Array(HEADER + 4 + TRIANGLE * count);
  const view = new DataView(bytes.buffer);
  const text = (/^solid/i.test(title) ? ` ${title}` : title).slice(0, HEADER - 1);
  for (let i = 0; i < text.length; i++) bytes[i] = text.charCodeAt(i) & 0x7f;
  view.setUint32(HEADER, count, true);
  let at = HEADER + 4;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [3 * triangles[t]!, 3 * triangles[t + 1]!, 3 * triangles[t + 2]!];
    const [ux, uy, uz] = [0, 1, 2].map((k) => positions[b + k]! - positions[a + k]!) as [number, number, number];
    const [vx, vy, vz] = [0, 1, 2].map((k) => positions[c + k]! - positions[a + k]!) as [number, number, number];
    const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    const l = Math.hypot(nx, ny, nz) || 1;
    for (const v of [nx / l, ny / l, nz / l]) {
      view.setFloat32(at, v, true);
      at += 4;
    }
    for (const i of [a, b, c])
      for (let k = 0; k < 3; k++) {
        view.setFloat32(at, positions[i + k]!, true);
        at += 4;
      }
    at += 2;
  }
  return bytes;
}
