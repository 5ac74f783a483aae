/**
 * A seeded source of numbers from 0 to below 1, of 53 bits each: xoshiro128** (Blackman & Vigna 2021), its state filled
 * from the seed by SplitMix32 (the finaliser of MurmurHash3 over a Weyl sequence).
 *
 * @param seed  whole number, 0 to 2³² − 1
 */
export function seededRandom(seed: number): () => number {
  const next = splitMix(seed);
  const s = Uint32Array.of(next(), next(), next(), next());
  return () => {
    const high = xoshiro128(s) >>> 5;
    const low = xoshiro128(s) >>> 6;
    return (high * 67108864 + low) / 9007199254740992;
  };
}

function splitMix(seed: number): () => number {
  let weyl = seed >>> 0;
  return () => {
    weyl = (weyl + 0x9e3779b9) >>> 0;
    let z = weyl;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return (z ^ (z >>> 16)) >>> 0;
  };
}

const rotate = (x: number, by: number): number => (x << by) | (x >>> (32 - by));

/** The next number of xoshiro128**, 0 to 2³² − 1; moves the state on. */
export function xoshiro128(s: Uint32Array): number {
  const result = Math.imul(rotate(Math.imul(s[1], 5), 7), 9) >>> 0;
  const t = s[1] << 9;
  s[2] ^= s[0];
  s[3] ^= s[1];
  s[1] ^= s[2];
  s[0] ^= s[3];
  s[2] ^= t;
  s[3] = rotate(s[3], 11);
  return result;
}

/** The numbers from 0 to n − 1 in an order drawn from a source (Fisher & Yates). */
export function shuffled(n: number, random: () => number): Uint32Array {
  const order = Uint32Array.from({ length: n }, (_, i) => i);
  for (let i = n - 1; i > 0; i--) {
    const j = Math.floor(random() * (i + 1));
    [order[i], order[j]] = [order[j], order[i]];
  }
  return order;
}
