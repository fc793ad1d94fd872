/** dz, the half width of hydrogen's reionization at z_re; Lewis 2008. */
const hydrogenWidth = 0.5;

/** Middle and width of helium's second reionization; Lewis 2008. */
const secondHelium = { redshift: 3.5, width: 0.5 };

/**
 * Electrons that reionization frees, a hydrogen nucleus, on top of what recombination left.
 *
 * x_re = (f/2) [1 + tanh((y_re - y)/D)] + (f_He/2) [1 + tanh((3.5 - z)/0.5)], y = (1+z)^1.5, D = 1.5 (1 + z_re)^0.5 dz, dz = 0.5,
 * f = 1 + f_He: hydrogen and helium's first electron together, helium's second apart.
 *
 * @param z redshift, -1 < z; @param reionizationRedshift z_re, above 0; @param heliumRatio f_He. Exact.
 * Source: Lewis 2008, eqs. B1 to B3.
 * @example reionizationProfile(7.68, 7.68, 0.08) // half of 1.08
 */
export function reionizationProfile(z: number, reionizationRedshift: number, heliumRatio: number): number {
  const y = (1 + z) ** 1.5;
  const middle = (1 + reionizationRedshift) ** 1.5;
  const spread = 1.5 * Math.sqrt(1 + reionizationRedshift) * hydrogenWidth;
  const hydrogen = ((1 + heliumRatio) / 2) * (1 + Math.tanh((middle - y) / spread));
  const helium = (heliumRatio / 2) * (1 + Math.tanh((secondHelium.redshift - z) / secondHelium.width));
  return hydrogen + helium;
}
