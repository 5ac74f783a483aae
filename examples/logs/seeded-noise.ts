/** One draw from a normal distribution about 0. @param sigma  its standard deviation */
type Noise = (sigma: number) => number;

/** Noise that is the same each time. @param seed  a whole number */
export function seededNoise(seed: number): Noise {
  let state = seed >>> 0;
  // Mulberry32, and the sum of twelve draws: near enough to a normal one, and exact arithmetic on every machine.
  const uniform = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  return (sigma) => {
    let sum = -6;
    for (let i = 0; i < 12; i += 1) sum += uniform();
    return sigma * sum;
  };
}
