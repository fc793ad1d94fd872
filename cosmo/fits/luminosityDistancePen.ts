import { lightSpeed } from "../constants";
import { NoAnswerError } from "../errors";
import { pastRedshiftArgument } from "../quantity";
import { cosmologicalConstantLimits, fitQuantity, type PublishedFit } from "./publishedFit";

const penFit: PublishedFit = {
  source: "pen1999",
  label: "Pen 1999",
  statement: "stated to 0.4% for 0.2 <= Omega_m <= 1, flat, without radiation",
  limits: [
    { symbol: "Ω_m", low: 0.2, high: 1, read: (model) => model.matterFraction },
    { symbol: "Ω_k", low: 0, high: 0, read: (model) => model.curvature },
    ...cosmologicalConstantLimits,
  ],
};

/**
 * Luminosity distance of a flat model with matter and a constant, in units of c/H0.
 *
 * D_L = (1+z) [e(1, O) - e(1/(1+z), O)], e(a, O) = 2 sqrt(s^3 + 1) [a^-4 - 0.1540 s a^-3 + 0.4304 s^2 a^-2 + 0.19097 s^3 a^-1 +
 * 0.066941 s^4]^-1/8, s^3 = (1 - O)/O.
 *
 * @param z 0 or more; @param matter Omega_m, above 0 and at most 1. Stated to 0.4% from 0.2 (measured 0.39%, as z goes to 0).
 * Source: Pen 1999 (astro-ph/9904172).
 * @example penLuminosityDistance(1, 0.3) // 1.544
 */
export function penLuminosityDistance(z: number, matter: number): number {
  const s = Math.cbrt((1 - matter) / matter);
  const eta = (a: number) => {
    const series = a ** -4 + s * (-0.154 * a ** -3 + s * (0.4304 * a ** -2 + s * (0.19097 / a + s * 0.066941)));
    return 2 * Math.sqrt(s ** 3 + 1) * series ** -0.125;
  };
  return (1 + z) * (eta(1) - eta(1 / (1 + z)));
}

export const luminosityDistancePenQuantity = fitQuantity({
  name: "luminosityDistance.pen1999",
  symbol: "D_L",
  unit: "Mpc",
  arguments: [pastRedshiftArgument],
  description: "Luminosity distance by a published fit for flat models",
  equation: String.raw`D_L = \frac{c\,(1+z)}{H_0}\,[\eta(1,\Omega_m) - \eta(\tfrac{1}{1+z},\Omega_m)]`,
  fit: penFit,
  compute: (model, [z]) => {
    const matter = model.matterFraction;
    if (!(matter > 0 && matter <= 1)) {
      throw new NoAnswerError({
        where: "luminosityDistance.pen1999",
        reason: `the fit is made for Omega_m above 0 and at most 1, this model has ${matter}`,
      });
    }
    return (lightSpeed / 1000 / model.hubble) * penLuminosityDistance(z!, matter);
  },
});
