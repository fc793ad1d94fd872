/** Seeded samples for tests of chains; everything here is invented. */

/** Uniform numbers between 0 and 1 (Park & Miller 1988). */
export function uniformNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (16807 * state) % 2147483647;
    return state / 2147483647;
  };
}

/** Normal numbers (Box & Muller 1958). */
export function normalNumbers(seed: number): () => number {
  const uniform = uniformNumbers(seed);
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

/** x_t = phi x_(t-1) + noise, from its stationary distribution with variance 1. */
export function autoregressive(count: number, phi: number, seed: number): Float64Array {
  const normal = normalNumbers(seed);
  const values = new Float64Array(count);
  values[0] = normal();
  const noise = Math.sqrt(1 - phi * phi);
  for (let i = 1; i < count; i++) values[i] = phi * values[i - 1]! + noise * normal();
  return values;
}
