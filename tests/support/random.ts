/** Random numbers from a seed, for tests that print the seed they ran with. */

/** 32-bit mixing generator (the "mulberry" step): the same numbers from the same seed anywhere. */
export function seeded(seed: number) {
  let state = seed >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  return {
    between: (low: number, high: number) => low + (high - low) * next(),
    /** Even in the logarithm. */
    decades: (low: number, high: number) => low * (high / low) ** next(),
    whole: (low: number, high: number) => low + Math.floor(next() * (high - low + 1)),
    pick: <T>(from: readonly [T, ...T[]]): T => from[Math.floor(next() * from.length)] ?? from[0],
    shuffled: <T>(from: readonly T[]): T[] => {
      const out = [...from];
      for (let i = out.length - 1; i > 0; i--) {
        const j = Math.floor(next() * (i + 1));
        [out[i], out[j]] = [out[j] as T, out[i] as T];
      }
      return out;
    },
    chance: (share: number) => next() < share,
  };
}
export type Random = ReturnType<typeof seeded>;

/** TEST_SEED repeats a run; without it every run draws anew. */
export function testSeed(): number {
  const given = process.env.TEST_SEED;
  return given === undefined ? Math.floor(Math.random() * 2 ** 31) : Number(given);
}
