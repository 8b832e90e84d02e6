export interface Stl {
  readonly count: number;
  readonly corners: Float32Array;
  readonly normals: Float32Array;
  readonly index: Uint32Array;
  readonly vertices: number;
}
export function readStl(bytes: Uint8Array): Stl;
export function inspect(stl: Stl): {
  open: number;
  degenerate: number;
  volume: number;
  shells: number;
  low: number[];
  high: number[];
  edges: number;
};
export function makeProbe(stl: Stl): (point: readonly number[]) => boolean;
export function crossings(stl: Stl): number;
