/** Triangles under construction: points and faces, anticlockwise seen from outside. */
export class MeshBuilder {
  private readonly points: number[] = [];
  private readonly faces: number[] = [];

  point(x: number, y: number, z: number): number {
    this.points.push(x, y, z);
    return this.points.length / 3 - 1;
  }

  face(a: number, b: number, c: number): void {
    this.faces.push(a, b, c);
  }

  get empty(): boolean {
    return this.faces.length === 0;
  }

  /** Adds a solid between rings of corners, each anticlockwise seen from the far end, closed by a fan about `middle` at both ends. All rings have as many corners. */
  loft(
    rings: readonly { readonly z: number; readonly outline: readonly (readonly [number, number])[] }[],
    middle: readonly [number, number] = [0, 0],
  ): void {
    const n = rings[0]!.outline.length;
    const bottom = this.point(...middle, rings[0]!.z);
    const starts = rings.map((ring) => ring.outline.map(([x, y]) => this.point(x, y, ring.z))[0]!);
    const top = this.point(...middle, rings[rings.length - 1]!.z);
    for (let k = 0; k < n; k++) {
      const next = (k + 1) % n;
      this.face(bottom, starts[0]! + next, starts[0]! + k);
      for (let r = 0; r + 1 < starts.length; r++) {
        const [a, b] = [starts[r]!, starts[r + 1]!];
        this.face(a + k, a + next, b + next);
        this.face(a + k, b + next, b + k);
      }
      const last = starts[starts.length - 1]!;
      this.face(top, last + k, last + next);
    }
  }

  mesh(): { numProp: 3; vertProperties: Float32Array; triVerts: Uint32Array } {
    return { numProp: 3, vertProperties: Float32Array.from(this.points), triVerts: Uint32Array.from(this.faces) };
  }
}
