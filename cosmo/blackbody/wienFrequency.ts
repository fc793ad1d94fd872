import type { ConstantsSet } from "../constants";
import { type BlackbodyQuantity, requireTemperature } from "./blackbodyModel";

/** The root of x = 3 (1 - e^-x), digits by Newton's method: where x^3/(e^x - 1) is largest. */
export const frequencyRoot = 2.8214393721220787;

/**
 * Frequency at which a blackbody is brightest per unit frequency, Hz.
 *
 * nu = b' T, b' = x k/h, x = 3 (1 - e^-x): Wien's displacement law. It is not c over {@link wienWavelength}.
 *
 * @param temperature T in K, positive; others: DomainError. Closed form; accuracy 1e-15.
 * Source: Wien 1893; b' = 5.878925757e10 Hz/K (CODATA 2018 and 2022).
 * @example wienFrequency(2.7255, constantsSets.codata2022) // 1.6023e11
 */
export function wienFrequency(temperature: number, constants: ConstantsSet): number {
  requireTemperature(temperature, "wienFrequency");
  return (frequencyRoot * constants.boltzmann * temperature) / constants.planck;
}

export const wienFrequencyQuantity: BlackbodyQuantity = {
  name: "wienFrequency",
  symbol: "ν_max",
  unit: "GHz",
  arguments: [],
  description: "Frequency at which the background radiation is brightest per unit frequency today",
  equation: String.raw`\nu_\mathrm{max} = \frac{x\,k\,T}{h}, \quad x = 3\,(1 - e^{-x})`,
  method: "closed form",
  accuracy: 1e-14,
  sources: (model) => ["wien1893", "fixsen2009", model.constants.source],
  compute: ({ model }) => ({ value: wienFrequency(model.photonTemperature, model.constants) / 1e9, error: 0 }),
};
