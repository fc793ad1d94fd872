import { type ConstantsSet, lightSpeed } from "../constants";
import { DomainError } from "../errors";
import type { BlackbodyQuantity } from "./blackbodyModel";

const zeta3 = 1.2020569031595942;

/**
 * Number density of the photons of a blackbody, 1/m3.
 *
 * n = 16 pi zeta(3) (kT/(h c))^3.
 *
 * @param temperature T in K, 0 or more; others: DomainError. Closed form; accuracy 1e-15. Source: Planck 1901.
 * @example photonNumberDensity(2.7255, constantsSets.codata2022) // 4.1073e8
 */
export function photonNumberDensity(temperature: number, constants: ConstantsSet): number {
  if (!(temperature >= 0 && Number.isFinite(temperature))) {
    const rule = "must be finite and not negative";
    throw new DomainError({ where: "photonNumberDensity", argument: "temperature", rule, value: temperature });
  }
  const perMeter = (constants.boltzmann * temperature) / (constants.planck * lightSpeed);
  return 16 * Math.PI * zeta3 * perMeter ** 3;
}

export const photonNumberDensityQuantity: BlackbodyQuantity = {
  name: "photonNumberDensity",
  symbol: "n_γ",
  unit: "1/cm3",
  arguments: [],
  description: "Photons of the background radiation today",
  equation: String.raw`n_\gamma = 16 \pi\,\zeta(3) \left(\frac{kT}{hc}\right)^3`,
  method: "closed form",
  accuracy: 1e-14,
  sources: (model) => ["planck1901", "fixsen2009", model.constants.source],
  compute: ({ model }) => ({ value: 1e-6 * photonNumberDensity(model.photonTemperature, model.constants), error: 0 }),
};
