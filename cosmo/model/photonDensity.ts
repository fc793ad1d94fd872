import { type ConstantsSet, lightSpeed, megaparsec, radiationConstant } from "../constants";

/** 100 km/s/Mpc in 1/s. */
export const hundredKmPerSecondPerMpc = 1e5 / megaparsec;

/**
 * rho_100 = 3 (100 km/s/Mpc)^2/(8 pi G), kg/m3: the density that omega = 1 stands for.
 *
 * @example unitDensity(constantsSets.codata2022) // 1.8783e-26
 */
export function unitDensity(constants: ConstantsSet): number {
  return (3 * hundredKmPerSecondPerMpc ** 2) / (8 * Math.PI * constants.gravitation);
}

/**
 * omega_gamma = a T^4/(c^2 rho_100): photons today.
 *
 * @param temperature T_cmb in K, 0 or more.
 * @example photonDensity(2.7255, constantsSets.codata2022) // 2.4728e-5
 */
export function photonDensity(temperature: number, constants: ConstantsSet): number {
  const energyDensity = radiationConstant(constants) * temperature ** 4;
  return energyDensity / (lightSpeed * lightSpeed) / unitDensity(constants);
}
