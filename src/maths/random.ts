/** A stream of pseudo-random numbers in [0, 1), fixed by its seed: sfc32 (Doty-Humphrey, PractRand, 2010). */
export type Random = () => number;

export function seededRandom(seed: number): Random {
  let a = 0x9e3779b9 ^ seed;
  let b = 0x243f6a88;
  let c = 0xb7e15162 ^ Math.imul(seed, 0x85ebca6b);
  let counter = 1;
  const next = (): number => {
    const t = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = ((c << 21) | (c >>> 11)) + t;
    c |= 0;
    return (t >>> 0) / 4294967296;
  };
  // The first outputs still show the seed's pattern.
  for (let i = 0; i < 15; i++) next();
  return next;
}
