import { densityLimits, type PublishedFit } from "./publishedFit";

/** The fits of the paper; coefficients, accuracy and domain from memory. */
export const eisensteinHuFit: PublishedFit = {
  source: "eisensteinHu1998",
  label: "Eisenstein & Hu 1998, eqs 2 to 7",
  statement:
    "a few percent (its sound horizon is 2.6% above the full r_drag near Planck's parameters: never mix the two)",
  limits: densityLimits([0.0025, 0.25], [0.025, 0.64]),
};

/** The temperature that the paper's formulas are written around, K. */
const referenceTemperature = 2.7;

/**
 * z_eq = 2.50e4 w_m t^-4, t = T_cmb/2.7 K.
 *
 * @param matterDensity omega_m; @param temperature T_cmb in K. Source: Eisenstein & Hu 1998, eq. 2 (memory).
 * @example eisensteinHuEqualityRedshift(0.14314, 2.7255) // 3446
 */
export function eisensteinHuEqualityRedshift(matterDensity: number, temperature: number): number {
  return 2.5e4 * matterDensity * (temperature / referenceTemperature) ** -4;
}

/**
 * k_eq = 7.46e-2 w_m t^-2, 1/Mpc.
 *
 * Arguments as {@link eisensteinHuEqualityRedshift}. Source: Eisenstein & Hu 1998, eq. 3 (memory).
 * @example eisensteinHuEqualityWavenumber(0.14314, 2.7255) // 0.01048
 */
export function eisensteinHuEqualityWavenumber(matterDensity: number, temperature: number): number {
  return 7.46e-2 * matterDensity * (temperature / referenceTemperature) ** -2;
}

/**
 * z_drag = 1291 w_m^0.251/(1 + 0.659 w_m^0.828) (1 + b1 w_b^b2), b1 = 0.313 w_m^-0.419 (1 + 0.607 w_m^0.674), b2 = 0.238 w_m^0.223.
 *
 * @param baryonDensity omega_b; @param matterDensity omega_m. Source: Eisenstein & Hu 1998, eq. 4 (memory).
 * @example eisensteinHuDragRedshift(0.022383, 0.14314) // 1020.8
 */
export function eisensteinHuDragRedshift(baryonDensity: number, matterDensity: number): number {
  const b1 = 0.313 * matterDensity ** -0.419 * (1 + 0.607 * matterDensity ** 0.674);
  const b2 = 0.238 * matterDensity ** 0.223;
  const withoutBaryons = (1291 * matterDensity ** 0.251) / (1 + 0.659 * matterDensity ** 0.828);
  return withoutBaryons * (1 + b1 * baryonDensity ** b2);
}

/**
 * Sound horizon at a redshift, Mpc: s = 2/(3 k_eq) sqrt(6/R_eq) ln{[sqrt(1+R) + sqrt(R + R_eq)]/[1 + sqrt(R_eq)]}.
 *
 * R = 31.5 w_b t^-4 (1000/z), R_eq = R(z_eq), with the paper's own z_eq and k_eq. The formula divides by z, not by 1 + z.
 *
 * @param z above 0; @param baryonDensity omega_b; @param matterDensity omega_m; @param temperature T_cmb in K.
 * Source: Eisenstein & Hu 1998, eqs 5 and 6 (memory).
 * @example eisensteinHuSoundHorizon(1020.756, 0.022383, 0.14314, 2.7255) // 150.86
 */
export function eisensteinHuSoundHorizon(
  z: number,
  baryonDensity: number,
  matterDensity: number,
  temperature: number,
): number {
  const equality = eisensteinHuEqualityRedshift(matterDensity, temperature);
  const wavenumber = eisensteinHuEqualityWavenumber(matterDensity, temperature);
  const loading = (redshift: number) =>
    31.5 * baryonDensity * (temperature / referenceTemperature) ** -4 * (1000 / redshift);
  const atEquality = loading(equality);
  const here = loading(z);
  const ratio = (Math.sqrt(1 + here) + Math.sqrt(here + atEquality)) / (1 + Math.sqrt(atEquality));
  return (2 / (3 * wavenumber)) * Math.sqrt(6 / atEquality) * Math.log(ratio);
}

/**
 * Silk damping wavenumber of the matter transfer function, 1/Mpc: k_Silk = 1.6 w_b^0.52 w_m^0.73 [1 + (10.4 w_m)^-0.95].
 *
 * It is not k_D of the photons. Source: Eisenstein & Hu 1998, eq. 7 (memory).
 * @example eisensteinHuSilkWavenumber(0.022383, 0.14314) // 0.0905
 */
export function eisensteinHuSilkWavenumber(baryonDensity: number, matterDensity: number): number {
  return 1.6 * baryonDensity ** 0.52 * matterDensity ** 0.73 * (1 + (10.4 * matterDensity) ** -0.95);
}

/**
 * Sound horizon at the drag epoch in short, Mpc: s = 44.5 ln(9.83/w_m)/sqrt(1 + 10 w_b^0.75).
 *
 * Stated to 2% of the long form for w_b above 0.0125 and w_m from 0.025 to 0.5. Source: Eisenstein & Hu 1998, eq. 26 (memory).
 * @example eisensteinHuShortSoundHorizon(0.022383, 0.14314) // 149.8
 */
export function eisensteinHuShortSoundHorizon(baryonDensity: number, matterDensity: number): number {
  return (44.5 * Math.log(9.83 / matterDensity)) / Math.sqrt(1 + 10 * baryonDensity ** 0.75);
}
