import type { ConstantsSet } from "../constants";
import { fermiDiracEnergy } from "./fermiDirac";

/**
 * T_nu today = (4/11)^(1/3) (N_eff/3)^(1/4) T_cmb, K: the temperature that gives three massless species the energy of N_eff.
 *
 * @param effectiveNumber N_eff, 0 or more.
 * @param photonTemperature T_cmb in K.
 * @example neutrinoTemperature(3.044, 2.7255) // 1.9525
 */
export function neutrinoTemperature(effectiveNumber: number, photonTemperature: number): number {
  return Math.cbrt(4 / 11) * (effectiveNumber / 3) ** 0.25 * photonTemperature;
}

/**
 * omega of one massless species: (7/8) (4/11)^(4/3) (N_eff/3) omega_gamma.
 *
 * @example masslessSpeciesDensity(3.044, 2.4728e-5) // 5.698e-6
 */
export function masslessSpeciesDensity(effectiveNumber: number, photonDensity: number): number {
  return (7 / 8) * (4 / 11) ** (4 / 3) * (effectiveNumber / 3) * photonDensity;
}

/**
 * y = m c^2/(k T_nu) today.
 *
 * @param mass in eV; @param temperature T_nu in K, above 0.
 */
export function massToTemperature(mass: number, temperature: number, constants: ConstantsSet): number {
  return (mass * constants.elementaryCharge) / (constants.boltzmann * temperature);
}

/**
 * omega_nu of the massive species today: sum over masses of omega_massless rho(y)/rho(0).
 *
 * 0.06 eV at N_eff 3.046 and T_cmb 2.7255 K gives 6.4522e-4.
 *
 * @param masses eV, those above zero; @param temperature T_nu in K; @param speciesDensity omega of one massless species.
 */
export function massiveNeutrinoDensity(
  masses: readonly number[],
  temperature: number,
  speciesDensity: number,
  constants: ConstantsSet,
): number {
  let sum = 0;
  for (const mass of masses) {
    if (mass > 0 && temperature > 0) {
      sum += speciesDensity * fermiDiracEnergy(massToTemperature(mass, temperature, constants));
    }
  }
  return sum;
}
