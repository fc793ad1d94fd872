/**
 * Dark energy's density over today's: f(a) = a^(-3 (1 + w0 + wa)) e^(-3 wa (1 - a)) for w(a) = w0 + wa (1 - a).
 *
 * @param a scale factor, above 0. Exact. Source: Chevallier & Polarski 2001; Linder 2003, eq. 7.
 * @example darkEnergyGrowth(0.5, -1, 0) // 1
 */
export function darkEnergyGrowth(a: number, w0: number, wa: number): number {
  const exponent = -3 * (1 + w0 + wa);
  if (exponent === 0 && wa === 0) return 1;
  return Math.exp(exponent * Math.log(a) - 3 * wa * (1 - a));
}
