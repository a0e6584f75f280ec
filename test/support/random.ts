/**
 * Seeded chance for tests: the same seed gives the same run on every machine.
 * mulberry32, public domain; from memory.
 */
export interface Random {
  /** even in 0…1, 1 excluded */
  even(): number;
  /** even within ± halfWidth */
  within(halfWidth: number): number;
  /** normal, mean 0 */
  normal(sd: number): number;
}

export function seeded(seed: number): Random {
  let state = seed >>> 0;
  const even = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return {
    even,
    within: (halfWidth) => (2 * even() - 1) * halfWidth,
    // Box & Muller 1958: two even values make a normal one
    normal: (sd) => sd * Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even()),
  };
}
