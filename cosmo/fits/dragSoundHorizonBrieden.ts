import type { ClosedModel } from "../model";
import { fitQuantity, type PublishedFit } from "./publishedFit";
import { requireDensities } from "./requireDensities";

/** The quoting paper states no domain; N_eff near 3. */
export const briedenFit: PublishedFit = {
  source: "brieden2023",
  label: "Brieden, Gil-Marin & Verde 2023",
  statement: "no accuracy seen; whether its density counts neutrinos matters at 0.1%, here it does not count them",
  limits: [{ symbol: "N_eff", low: 2, high: 5, read: (model) => model.neutrinos.effectiveNumber }],
};

/**
 * r_drag, Mpc: 147.05 (w_b/0.02236)^-0.13 (w_bc/0.1432)^-0.23 (N_eff/3.04)^-0.1.
 *
 * @param baryonDensity omega_b; @param baryonsAndCold omega_bc, as the quoting paper writes it; @param effectiveNumber N_eff.
 * Source: Brieden, Gil-Marin & Verde 2023 (2212.04522), as quoted in 2503.14738.
 * @example briedenDragSoundHorizon(0.02236, 0.1432, 3.04) // 147.05
 */
export function briedenDragSoundHorizon(
  baryonDensity: number,
  baryonsAndCold: number,
  effectiveNumber: number,
): number {
  return (
    147.05 * (baryonDensity / 0.02236) ** -0.13 * (baryonsAndCold / 0.1432) ** -0.23 * (effectiveNumber / 3.04) ** -0.1
  );
}

/** The same for a closed model; without neutrinos it has none. */
export function briedenOf(model: ClosedModel): number {
  requireDensities(model, "dragSoundHorizon.brieden2023");
  return briedenDragSoundHorizon(
    model.baryonDensity,
    model.baryonDensity + model.coldMatterDensity,
    model.neutrinos.effectiveNumber,
  );
}

export const dragSoundHorizonBriedenQuantity = fitQuantity({
  name: "dragSoundHorizon.brieden2023",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Sound horizon at the drag epoch by a published fit",
  equation: String.raw`r_\mathrm{drag} = 147.05\left(\frac{\omega_b}{0.02236}\right)^{-0.13}\left(\frac{\omega_{bc}}{0.1432}\right)^{-0.23}\left(\frac{N_\mathrm{eff}}{3.04}\right)^{-0.1}`,
  fit: briedenFit,
  compute: briedenOf,
});
