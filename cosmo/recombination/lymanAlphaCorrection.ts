import calibration from "./calibrationCoefficients.json";

/** Width of the correction in d = ln[(1+z)/1090]. */
const width = 0.4;

/** Redshift at which the correction is centered, plus one. */
const center = 1090;

/** F of the calibrated tier: Seager, Sasselov & Scott 1999 raise the case-B coefficient by 1.14. */
export const calibratedRecombinationFactor = 1.14;

/** (c0, c1, c2) as the fit script wrote them. */
export const fittedCoefficients: readonly number[] = calibration.coefficients;

/**
 * This project's own smooth correction of K for the radiative transfer of Lyman alpha, as a factor.
 *
 * K -> K {1 + (c0 + c1 d + c2 d^2) e^(-(d/0.4)^2)}, d = ln[(1+z)/1090].
 *
 * Calibrated, not derived: c0, c1, c2 are fitted by `npm run calibrate` to three printed numbers (z_*, z_drag, k_D) of one
 * published column, Planck 2018 VI table 2, TT,TE,EE+lowE+lensing. How well it predicts the other columns is tested in
 * test/published/.
 *
 * @param onePlusRedshift 1 + z; @param coefficients (c0, c1, c2).
 */
export function lymanAlphaCorrection(
  onePlusRedshift: number,
  coefficients: readonly number[] = fittedCoefficients,
): number {
  const d = Math.log(onePlusRedshift / center);
  const scaled = d / width;
  return 1 + (coefficients[0]! + d * (coefficients[1]! + d * coefficients[2]!)) * Math.exp(-scaled * scaled);
}
