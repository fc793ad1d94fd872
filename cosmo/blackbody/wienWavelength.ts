import { type ConstantsSet, lightSpeed } from "../constants";
import { type BlackbodyQuantity, requireTemperature } from "./blackbodyModel";

/** The root of x = 5 (1 - e^-x), digits by Newton's method: where x^5/(e^x - 1) is largest. */
export const wavelengthRoot = 4.965114231744276;

/**
 * Wavelength at which a blackbody is brightest per unit wavelength, m.
 *
 * lambda = b/T, b = h c/(k x), x = 5 (1 - e^-x): Wien's displacement law.
 *
 * @param temperature T in K, positive; others: DomainError. Closed form; accuracy 1e-15.
 * Source: Wien 1893; b = 2.897771955e-3 m K (CODATA 2018 and 2022).
 * @example wienWavelength(2.7255, constantsSets.codata2022) // 1.0632e-3
 */
export function wienWavelength(temperature: number, constants: ConstantsSet): number {
  requireTemperature(temperature, "wienWavelength");
  return (constants.planck * lightSpeed) / (constants.boltzmann * wavelengthRoot * temperature);
}

export const wienWavelengthQuantity: BlackbodyQuantity = {
  name: "wienWavelength",
  symbol: "λ_max",
  unit: "mm",
  arguments: [],
  description: "Wavelength at which the background radiation is brightest per unit wavelength today",
  equation: String.raw`\lambda_\mathrm{max} = \frac{h c}{x\,k\,T}, \quad x = 5\,(1 - e^{-x})`,
  method: "closed form",
  accuracy: 1e-14,
  sources: (model) => ["wien1893", "fixsen2009", model.constants.source],
  compute: ({ model }) => ({ value: 1000 * wienWavelength(model.photonTemperature, model.constants), error: 0 }),
};
