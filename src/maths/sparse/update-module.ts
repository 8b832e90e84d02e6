/**
 * WebAssembly code of the front's update, in which the factorisation spends nine tenths of its time: two lanes of double
 * precision at once and no bounds checks make it two to three times as fast as the same loops in JavaScript.
 *
 * update(a, b, stride, wide, rowFrom, rowTo, columnFrom, columnTo, depthFrom, depthTo): all i32; a and b are byte addresses,
 * stride and wide bytes a row. For rows i and columns j in tiles of 4 x 2, tiles above the diagonal left out:
 * a[i, j] -= sum over k in [depthFrom, depthTo) of a[i, k] b[j, k].
 */
export function updateModule(): Uint8Array<ArrayBuffer> {
  return Uint8Array.from([
    ...[0, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
    ...section(1, [1, 0x60, PARAMETERS, ...new Array<number>(PARAMETERS).fill(I32), 0]),
    ...section(2, [1, ...name('e'), ...name('m'), 2, 0, 1]), // memory e.m, at least one page
    ...section(3, [1, 0]),
    ...section(7, [1, ...name('update'), 0, 0]),
    ...section(10, [1, ...sized([2, ...count(I32_LOCALS), I32, ...count(12), V128, ...body(), END])]),
  ]);
}

const PARAMETERS = 10;
const I32_LOCALS = 9;
const I32 = 0x7f;
const V128 = 0x7b;
const END = 0x0b;

// Parameters, then locals, by number.
const [A, B, STRIDE, WIDE, ROW_FROM, ROW_TO, COLUMN_FROM, COLUMN_TO, DEPTH_FROM, DEPTH_TO] = [
  0, 1, 2, 3, 4, 5, 6, 7, 8, 9,
] as const;
const [I, J, LEFT, A0, A1, A2, A3, B0, B1] = [10, 11, 12, 13, 14, 15, 16, 17, 18] as const;
const ROWS = [A0, A1, A2, A3] as const;
/** Sums of the tile: row r, column c. */
const sumOf = (r: number, c: number): number => 19 + 2 * r + c;
const [X, Y, V] = [27, 28, 29] as const;

/** LEB128, unsigned. */
function count(n: number): number[] {
  const out: number[] = [];
  for (let v = n; ; v >>>= 7) {
    if (v < 0x80) return [...out, v];
    out.push((v & 0x7f) | 0x80);
  }
}
/** LEB128, signed, for small constants. */
const constant = (n: number): number[] =>
  n >= -64 && n < 64 ? [0x41, n & 0x7f] : [0x41, (n & 0x7f) | 0x80, (n >> 7) & 0x7f];
const sized = (bytes: readonly number[]): number[] => [...count(bytes.length), ...bytes];
const section = (id: number, bytes: readonly number[]): number[] => [id, ...sized(bytes)];
const name = (text: string): number[] => sized([...text].map((c) => c.charCodeAt(0)));

const get = (x: number): number[] => [0x20, x];
const set = (x: number): number[] => [0x21, x];
const add = [0x6a];
const subtract = [0x6b];
const multiply = [0x6c];
const and = [0x71];
const atLeast = [0x4e]; // i32.ge_s
const greater = [0x4a]; // i32.gt_s
const simd = (op: number): number[] => [0xfd, ...count(op)];
const load = (offset: number): number[] => [...simd(0x00), 0, offset];
const loadOne = [...simd(0x5d), 0, 0]; // one double, the other lane nought
const store = [...simd(0x0b), 0, 0];
const addLanes = simd(0xf0);
const subtractLanes = simd(0xf1);
const multiplyLanes = simd(0xf2);
const zeroLanes = [...simd(0x0c), ...new Array<number>(16).fill(0)];
/** Low lanes of two vectors, and their high lanes. */
const lowLanes = [...simd(0x0d), 0, 1, 2, 3, 4, 5, 6, 7, 16, 17, 18, 19, 20, 21, 22, 23];
const highLanes = [...simd(0x0d), 8, 9, 10, 11, 12, 13, 14, 15, 24, 25, 26, 27, 28, 29, 30, 31];

/** while (!stop) body: a block that the loop leaves by branching out of it. */
const loop = (stop: readonly number[], inside: readonly number[]): number[] => [
  ...[0x02, 0x40, 0x03, 0x40],
  ...stop,
  ...[0x0d, 1],
  ...inside,
  ...[0x0c, 0, END, END],
];
const when = (condition: readonly number[], inside: readonly number[]): number[] => [
  ...condition,
  0x04,
  0x40,
  ...inside,
  END,
];

/** The tile's sums of one pair of depths (or of a single one), read at an offset from the row pointers. */
function accumulate(read: readonly number[]): number[] {
  return [
    ...get(B0),
    ...read,
    ...set(X),
    ...get(B1),
    ...read,
    ...set(Y),
    ...ROWS.flatMap((row, r) => [
      ...get(row),
      ...read,
      ...set(V),
      ...[X, Y].flatMap((column, c) => [
        ...get(sumOf(r, c)),
        ...get(V),
        ...get(column),
        ...multiplyLanes,
        ...addLanes,
        ...set(sumOf(r, c)),
      ]),
    ]),
  ];
}

const advance = (bytes: number): number[] =>
  [B0, B1, ...ROWS].flatMap((p) => [...get(p), ...constant(bytes), ...add, ...set(p)]);

function body(): number[] {
  const eight = [...constant(8), ...multiply];
  const tile = [
    // Row pointers at the first depth.
    ...get(A),
    ...get(I),
    ...get(STRIDE),
    ...multiply,
    ...add,
    ...get(DEPTH_FROM),
    ...eight,
    ...add,
    ...set(A0),
    ...[A1, A2, A3].flatMap((row, r) => [...get(ROWS[r]), ...get(STRIDE), ...add, ...set(row)]),
    ...get(B),
    ...get(J),
    ...get(WIDE),
    ...multiply,
    ...add,
    ...get(DEPTH_FROM),
    ...eight,
    ...add,
    ...set(B0),
    ...get(B0),
    ...get(WIDE),
    ...add,
    ...set(B1),
    ...[0, 1, 2, 3].flatMap((r) => [0, 1].flatMap((c) => [...zeroLanes, ...set(sumOf(r, c))])),
    ...get(DEPTH_TO),
    ...get(DEPTH_FROM),
    ...subtract,
    ...set(LEFT),
    ...loop(
      [...constant(4), ...get(LEFT), ...greater],
      [
        ...accumulate(load(0)),
        ...accumulate(load(16)),
        ...advance(32),
        ...get(LEFT),
        ...constant(4),
        ...subtract,
        ...set(LEFT),
      ],
    ),
    ...when(
      [...get(LEFT), ...constant(2), ...atLeast],
      [...accumulate(load(0)), ...advance(16), ...get(LEFT), ...constant(2), ...subtract, ...set(LEFT)],
    ),
    ...when(get(LEFT), accumulate(loadOne)),
    // a[i, j..j+1] -= [low + high of the first sum, of the second].
    ...[0, 1, 2, 3].flatMap((r) => [
      ...get(A),
      ...get(I),
      ...constant(r),
      ...add,
      ...get(STRIDE),
      ...multiply,
      ...add,
      ...get(J),
      ...eight,
      ...add,
      ...set(A0),
      ...get(A0),
      ...get(A0),
      ...load(0),
      ...get(sumOf(r, 0)),
      ...get(sumOf(r, 1)),
      ...lowLanes,
      ...get(sumOf(r, 0)),
      ...get(sumOf(r, 1)),
      ...highLanes,
      ...addLanes,
      ...subtractLanes,
      ...store,
    ]),
  ];
  const first = [
    ...get(ROW_FROM),
    ...set(I),
    ...when(
      [...get(J), ...get(ROW_FROM), ...greater],
      [...get(ROW_FROM), ...get(J), ...get(ROW_FROM), ...subtract, ...constant(-4), ...and, ...add, ...set(I)],
    ),
  ];
  return [
    ...get(COLUMN_FROM),
    ...set(J),
    ...loop(
      [...get(J), ...get(COLUMN_TO), ...atLeast],
      [
        ...first,
        ...loop([...get(I), ...get(ROW_TO), ...atLeast], [...tile, ...get(I), ...constant(4), ...add, ...set(I)]),
        ...get(J),
        ...constant(2),
        ...add,
        ...set(J),
      ],
    ),
  ];
}
