import type { ClosedModel } from "../model";
import { densityLimits, fitQuantity, type PublishedFit } from "./publishedFit";
import { requireDensities } from "./requireDensities";

/** The fit, its accuracy and domain (memory). */
export const huSugiyamaFit: PublishedFit = {
  source: "huSugiyama1996",
  label: "Hu & Sugiyama 1996, eq. E-1",
  statement: "stated to about 1% (0.2% above the full computation near Planck's parameters)",
  limits: densityLimits([0.0025, 0.25], [0.025, 0.64]),
};

/**
 * z_* by the fit of Hu & Sugiyama.
 *
 * z_* = 1048 (1 + 0.00124 w_b^-0.738) (1 + g1 w_m^g2), g1 = 0.0783 w_b^-0.238/(1 + 39.5 w_b^0.763), g2 = 0.560/(1 + 21.1 w_b^1.81).
 *
 * @param baryonDensity omega_b, 0.0025 to 0.25; @param matterDensity omega_m, 0.025 to 0.64. Outside: the formula still, with a warning
 * in the quantity's notes. Accuracy of the fit about 1% (memory).
 * Source: Hu & Sugiyama 1996, eq. E-1. A later paper's prose misprints 0.0783 as 0.0738.
 * @example huSugiyamaLastScatteringRedshift(0.022383, 0.14314) // 1091.9
 */
export function huSugiyamaLastScatteringRedshift(baryonDensity: number, matterDensity: number): number {
  const g1 = (0.0783 * baryonDensity ** -0.238) / (1 + 39.5 * baryonDensity ** 0.763);
  const g2 = 0.56 / (1 + 21.1 * baryonDensity ** 1.81);
  return 1048 * (1 + 0.00124 * baryonDensity ** -0.738) * (1 + g1 * matterDensity ** g2);
}

/** The same for a closed model; without baryons or matter: NoAnswerError. */
export function huSugiyamaOf(model: ClosedModel): number {
  requireDensities(model, "lastScatteringRedshift.huSugiyama1996");
  return huSugiyamaLastScatteringRedshift(model.baryonDensity, model.matterDensity);
}

export const lastScatteringRedshiftHuSugiyamaQuantity = fitQuantity({
  name: "lastScatteringRedshift.huSugiyama1996",
  symbol: "z_*",
  unit: "",
  description: "Redshift of last scattering by a published fit",
  equation: String.raw`z_* = 1048\,(1 + 0.00124\,\omega_b^{-0.738})(1 + g_1 \omega_m^{g_2})`,
  fit: huSugiyamaFit,
  compute: huSugiyamaOf,
});
