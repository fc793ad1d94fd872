import { gigayear } from "../constants";
import { NoAnswerError } from "../errors";
import { hundredKmPerSecondPerMpc } from "../model";
import { cosmologicalConstantLimits, fitQuantity, type PublishedFit } from "./publishedFit";

const carrollFit: PublishedFit = {
  source: "carroll1992",
  label: "Carroll, Press & Turner 1992",
  statement: "a few percent, without radiation",
  limits: cosmologicalConstantLimits,
};

/**
 * Age today in units of 1/H0.
 *
 * H0 t0 = (2/3) |1 - Oa|^-1/2 S^-1(sqrt(|1 - Oa|/Oa)), Oa = Om - 0.3 Otot + 0.3, Otot = Om + OL, S^-1 asinh for Oa <= 1, asin above.
 *
 * @param matter Omega_m; @param lambda Omega_Lambda. Where Oa is not positive: NaN. Exact for flat models with matter and a
 * constant; a few percent otherwise. Source: Carroll, Press & Turner 1992 (memory).
 * @example carrollAge(0.3, 0.7) // 0.9641
 */
export function carrollAge(matter: number, lambda: number): number {
  const effective = matter - 0.3 * (matter + lambda) + 0.3;
  const rest = 1 - effective;
  // asinh(x)/x and asin(x)/x are one there, to below rounding.
  if (Math.abs(rest) < 1e-9) return 2 / 3 / Math.sqrt(effective);
  const root = Math.sqrt(Math.abs(rest) / effective);
  const angle = rest > 0 ? Math.asinh(root) : Math.asin(root);
  return ((2 / 3) * angle) / Math.sqrt(Math.abs(rest));
}

export const ageCarrollQuantity = fitQuantity({
  name: "age.carroll1992",
  symbol: "t_0",
  unit: "Gyr",
  description: "Age of the universe today by a published approximation",
  equation: String.raw`t_0 = \frac{2}{3 H_0}\,|1-\Omega_a|^{-1/2}\,S^{-1}\!\left(\sqrt{|1-\Omega_a|/\Omega_a}\right), \quad \Omega_a = \Omega_m - 0.3\,\Omega_\mathrm{tot} + 0.3`,
  fit: carrollFit,
  compute: (model) => {
    const value = carrollAge(model.matterFraction, model.darkEnergyFraction);
    if (!Number.isFinite(value)) {
      throw new NoAnswerError({
        where: "age.carroll1992",
        reason: `the approximation has no value at Omega_m ${model.matterFraction} and Omega_DE ${model.darkEnergyFraction}`,
      });
    }
    return value / (hundredKmPerSecondPerMpc * model.reducedHubble * gigayear);
  },
});
