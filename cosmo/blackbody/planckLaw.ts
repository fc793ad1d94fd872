import { type ConstantsSet, lightSpeed } from "../constants";
import { DomainError } from "../errors";
import type { QuantityArgument } from "../quantity";
import { type BlackbodyQuantity, requireTemperature } from "./blackbodyModel";

/**
 * Planck's law by frequency: brightness of a blackbody, W m-2 Hz-1 sr-1.
 *
 * B_nu = (2 h nu^3/c^2)/(e^(h nu/kT) - 1).
 *
 * @param frequency nu in Hz, 0 or more; at 0 the brightness is 0. @param temperature T in K, positive. Others: DomainError.
 * Closed form; accuracy 1e-14, relative, as long as the brightness is not below 1e-300. Source: Planck 1901.
 * @example planckLaw(160.23e9, 2.7255, constantsSets.codata2022) // 3.839e-18
 */
export function planckLaw(frequency: number, temperature: number, constants: ConstantsSet): number {
  requireTemperature(temperature, "planckLaw");
  if (!(frequency >= 0 && Number.isFinite(frequency))) {
    const rule = "must be finite and not negative";
    throw new DomainError({ where: "planckLaw", argument: "frequency", rule, value: frequency });
  }
  if (frequency === 0) return 0;
  const x = (constants.planck * frequency) / (constants.boltzmann * temperature);
  // In this order nothing overflows: e^x alone would beyond x = 709.
  const scale = (2 * constants.planck * frequency) / lightSpeed ** 2;
  return (scale * frequency * frequency * Math.exp(-x)) / -Math.expm1(-x);
}

const frequencyArgument: QuantityArgument = {
  name: "frequency",
  symbol: "ν",
  unit: "GHz",
  rule: "must be finite and positive",
  accepts: (value) => value > 0 && Number.isFinite(value),
};

/** 1e9 Hz a GHz; 1e20 MJy a W m-2 Hz-1. */
const perGigahertz = 1e9;
const inMegajansky = 1e20;

export const backgroundBrightnessQuantity: BlackbodyQuantity = {
  name: "backgroundBrightness",
  symbol: "B_ν",
  unit: "MJy/sr",
  arguments: [frequencyArgument],
  description: "Brightness of the background radiation today at a frequency",
  equation: String.raw`B_\nu = \frac{2 h \nu^3}{c^2}\,\frac{1}{e^{h\nu/kT} - 1}`,
  method: "closed form",
  accuracy: 1e-13,
  sources: (model) => ["planck1901", "fixsen2009", model.constants.source],
  compute: ({ model }, [frequency]) => {
    requireTemperature(model.photonTemperature, "backgroundBrightness");
    const value = inMegajansky * planckLaw(frequency! * perGigahertz, model.photonTemperature, model.constants);
    // The exponential turns the rounding of x into x times as much.
    const x =
      (model.constants.planck * frequency! * perGigahertz) / (model.constants.boltzmann * model.photonTemperature);
    return { value, error: Number.EPSILON * (4 + 2 * x) * value };
  },
};
