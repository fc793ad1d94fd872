import { photonNumberDensity } from "../blackbody";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { gasPart } from "./gas";

/**
 * eta: baryons a photon of the background, the same at every time since electrons and positrons are gone.
 *
 * eta = n_b/n_gamma, n_b = n_H + 4 n_He: nuclei counted by their nucleons.
 *
 * A model without baryons or radiation: NoAnswerError. Closed form; accuracy 1e-14. Source: common practice, no source.
 * @example baryonToPhotonRatio(evaluation) // 6.1e-10 near Planck's parameters
 */
export function baryonToPhotonRatio(evaluation: ModelEvaluation): number {
  const gas = evaluation.once(gasPart);
  const baryons = gas.hydrogenDensity * (1 + 4 * gas.heliumRatio);
  return baryons / photonNumberDensity(gas.temperature, gas.constants);
}

export const baryonToPhotonRatioQuantity: ModelQuantity = {
  name: "baryonToPhotonRatio",
  symbol: "η",
  unit: "",
  arguments: [],
  description: "Baryons a photon of the background radiation",
  equation: String.raw`\eta = \frac{n_\mathrm{H} + 4\,n_\mathrm{He}}{n_\gamma}`,
  method: "closed form; nuclei counted by their nucleons",
  accuracy: 1e-13,
  sources: (model) => ["planck1901", model.constants.source, "ame2020"],
  compute: (evaluation) => ({ value: baryonToPhotonRatio(evaluation), error: 0 }),
};
