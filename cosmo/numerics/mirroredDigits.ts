/**
 * Digits of k in a base, mirrored about the point: one coordinate of Halton's quasi-random sequence (Halton 1960), in (0, 1).
 *
 * @param k a whole number, 1 or more; @param base a whole number, 2 or more; primes for the coordinates of one sequence.
 * @example mirroredDigits(6, 2) // 0.011 in binary: 0.375
 */
export function mirroredDigits(k: number, base: number): number {
  let value = 0;
  let fraction = 1 / base;
  for (let rest = k; rest > 0; rest = Math.floor(rest / base)) {
    value += (rest % base) * fraction;
    fraction /= base;
  }
  return value;
}
