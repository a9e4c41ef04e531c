/** A 32-bit hash of integers (the finaliser of MurmurHash3, public domain, by A. Appleby): the only chance in shared/. */
export const hash = (...values: number[]): number => {
  let h = 0x9e3779b9;
  for (const value of values) {
    h = Math.imul(h ^ (value | 0), 0x85ebca6b);
    h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
    h ^= h >>> 16;
  }
  return h >>> 0;
};

/** The same as a share 0 ≤ x < 1. */
export const chance = (...values: number[]): number => hash(...values) / 2 ** 32;

/** Smooth noise in −1..1 over `x`, with a knot at each whole number. */
export const wander = (x: number, seed: number): number => {
  const i = Math.floor(x);
  const f = x - i;
  const smooth = f * f * (3 - 2 * f);
  const a = chance(i, seed) * 2 - 1;
  const b = chance(i + 1, seed) * 2 - 1;
  return a + (b - a) * smooth;
};

/** An order of 0..n−1 for a round, by the seed (Fisher and Yates). Each comes once before any comes twice. */
export const shuffled = (n: number, seed: number, round: number): number[] => {
  const order = Array.from({ length: n }, (_, i) => i);
  for (let i = n - 1; i > 0; i -= 1) {
    const j = Math.floor(chance(i, seed, round) * (i + 1));
    const held = order[i] ?? 0;
    order[i] = order[j] ?? 0;
    order[j] = held;
  }
  return order;
};
