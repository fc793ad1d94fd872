import { DomainError, NoAnswerError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { fitNotes, type PublishedFit, secondPeakHeightRatio, thirdPeakHeightRatio } from "../fits";
import type { QuantityArgument } from "../quantity";

const heightFit: PublishedFit = {
  source: "hu2001",
  label: "Hu, Fukugita, Zaldarriaga & Tegmark 2001",
  statement: "no domain seen, 3% from the measured heights near Planck's parameters",
  limits: [],
};

const where = "peakHeightRatio";

/**
 * Height of an acoustic peak over that of the first, as powers D_l of the temperature spectrum.
 *
 * H_2, H_3 by the fit of Hu et al. 2001 in omega_b, omega_m and n_s (fits/peakHeights.ts).
 *
 * @param peak m: 2 or 3; others: DomainError. A model without baryons or matter: NoAnswerError. Accuracy of the fit: 3% at the
 * measured peaks. Source: Hu, Fukugita, Zaldarriaga & Tegmark 2001 (memory).
 * @example peakHeightRatio(evaluation, 2) // 0.46
 */
export function peakHeightRatio(evaluation: ModelEvaluation, peak: number): number {
  const { baryonDensity, matterDensity, scalarSpectralIndex } = evaluation.model;
  if (!(baryonDensity > 0 && matterDensity > 0)) {
    throw new NoAnswerError({ where, reason: "this model has no baryons, so it has no acoustic peaks" });
  }
  if (peak === 2) return secondPeakHeightRatio(baryonDensity, matterDensity, scalarSpectralIndex);
  if (peak === 3) return thirdPeakHeightRatio(baryonDensity, matterDensity, scalarSpectralIndex);
  throw new DomainError({ where, argument: "peak", rule: peakArgument.rule, value: peak });
}

const peakArgument: QuantityArgument = {
  name: "peak",
  symbol: "m",
  unit: "",
  rule: "must be 2 or 3",
  accepts: (value) => value === 2 || value === 3,
};

export const peakHeightRatioQuantity: ModelQuantity = {
  name: where,
  symbol: "H_m",
  unit: "",
  arguments: [peakArgument],
  description: "Height of an acoustic peak of the temperature spectrum over that of the first",
  equation: String.raw`H_m = D_{\ell_m}/D_{\ell_1}`,
  method: "published fitting formula in the densities and the spectral index",
  accuracy: 1e-13,
  sources: ["hu2001"],
  notes: ({ model }) => fitNotes(heightFit, model),
  compute: (evaluation, [peak]) => {
    const value = peakHeightRatio(evaluation, peak!);
    return { value, error: 1e-14 * value };
  },
};
