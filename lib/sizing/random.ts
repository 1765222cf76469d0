/** Random numbers from a seed: the same in every browser and on the server. */

/** Uniform in (0, 1): a 32-bit counter through an integer mixer, halves never reach the ends. */
export function uniform(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = state;
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    mixed = (mixed ^ (mixed >>> 15)) >>> 0;
    return (mixed + 0.5) / 2 ** 32;
  };
}

/** Standard normal by the Box-Muller transform, one value of the pair. */
export function normal(next: () => number): number {
  return Math.sqrt(-2 * Math.log(next())) * Math.cos(2 * Math.PI * next());
}
