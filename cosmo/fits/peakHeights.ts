/**
 * Radiation over matter density at last scattering: r = 0.042 w_m^-1 (z_star/1000).
 *
 * @param matterDensity omega_m; @param lastScattering z_*. Source: Hu, Fukugita, Zaldarriaga & Tegmark 2001 (memory).
 * @example radiationToMatterAt(0.143, 1090) // 0.32
 */
export function radiationToMatterAt(matterDensity: number, lastScattering: number): number {
  return (0.042 / matterDensity) * (lastScattering / 1000);
}

/**
 * Phase of the first peak for n_s = 1: phi_1 = 0.267 (r/0.3)^0.1.
 *
 * @param ratio radiation over matter at last scattering. First peak only. Source: Hu et al. 2001 (memory).
 * @example firstPeakPhase(0.3) // 0.267
 */
export function firstPeakPhase(ratio: number): number {
  return 0.267 * (ratio / 0.3) ** 0.1;
}

/**
 * Height of the second peak over the first: H2 = 0.925 w_m^0.18 2.4^(n-1)/[1 + (w_b/0.0164)^(12 w_m^0.52)]^0.2.
 *
 * @param baryonDensity omega_b; @param matterDensity omega_m; @param spectralIndex n_s. Source: Hu et al. 2001 (memory).
 * @example secondPeakHeightRatio(0.0224, 0.143, 0.965) // 0.46
 */
export function secondPeakHeightRatio(baryonDensity: number, matterDensity: number, spectralIndex: number): number {
  const baryons = 1 + (baryonDensity / 0.0164) ** (12 * matterDensity ** 0.52);
  return (0.925 * matterDensity ** 0.18 * 2.4 ** (spectralIndex - 1)) / baryons ** 0.2;
}

/**
 * Height of the third peak over the first: H3 = 2.17 [1 + (w_b/0.044)^2]^-1 w_m^0.59 3.6^(n-1)/[1 + 1.63 (1 - w_b/0.071) w_m].
 *
 * Arguments as {@link secondPeakHeightRatio}. Source: Hu et al. 2001 (memory).
 * @example thirdPeakHeightRatio(0.0224, 0.143, 0.965) // 0.451
 */
export function thirdPeakHeightRatio(baryonDensity: number, matterDensity: number, spectralIndex: number): number {
  const baryons = 1 + (baryonDensity / 0.044) ** 2;
  const matter = 1 + 1.63 * (1 - baryonDensity / 0.071) * matterDensity;
  return (2.17 * matterDensity ** 0.59 * 3.6 ** (spectralIndex - 1)) / (baryons * matter);
}
