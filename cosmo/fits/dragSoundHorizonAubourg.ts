import type { ClosedModel } from "../model";
import { type FitLimit, fitQuantity, type PublishedFit } from "./publishedFit";
import { requireDensities } from "./requireDensities";

const massLimit: FitLimit = {
  symbol: "Σm_ν",
  low: 0,
  high: 0.6,
  read: (model) => model.neutrinos.masses.reduce((sum, mass) => sum + mass, 0),
};

const effectiveNumber = (model: ClosedModel) => model.neutrinos.effectiveNumber;

/** Eq. 16, made for the standard number of neutrinos; 3.044 changes it by less than its accuracy. */
export const aubourgFit: PublishedFit = {
  source: "aubourg2015",
  label: "Aubourg et al. 2015, eq. 16",
  statement: "stated to 0.021% for N_eff 3.046",
  limits: [massLimit, { symbol: "N_eff", low: 3.04, high: 3.05, read: effectiveNumber }],
};

const aubourgWithNeutrinosFit: PublishedFit = {
  source: "aubourg2015",
  label: "Aubourg et al. 2015, eq. 17",
  statement: "stated to 0.119%",
  limits: [massLimit, { symbol: "N_eff", low: 3, high: 5, read: effectiveNumber }],
};

/**
 * r_drag, Mpc: 55.154 exp[-72.3 (w_nu + 0.0006)^2]/(w_cb^0.25351 w_b^0.12807).
 *
 * @param baryonDensity omega_b; @param baryonsAndCold omega_cb; @param neutrinoDensity omega_nu of the massive species.
 * Domain: N_eff 3.046, sum of masses below 0.6 eV (memory). Accuracy of the fit 0.021%. Source: Aubourg et al. 2015, eq. 16.
 * @example aubourgDragSoundHorizon(0.022383, 0.142493, 6.451e-4) // 147.02
 */
export function aubourgDragSoundHorizon(
  baryonDensity: number,
  baryonsAndCold: number,
  neutrinoDensity: number,
): number {
  const neutrinos = Math.exp(-72.3 * (neutrinoDensity + 0.0006) ** 2);
  return (55.154 * neutrinos) / (baryonsAndCold ** 0.25351 * baryonDensity ** 0.12807);
}

/**
 * r_drag, Mpc: 56.067 exp[-49.7 (w_nu + 0.002)^2]/{w_cb^0.2436 w_b^0.128876 [1 + (N_eff - 3.046)/30.60]}.
 *
 * Arguments as {@link aubourgDragSoundHorizon}, and @param effectiveNumber N_eff, 3 to 5. Accuracy of the fit 0.119%.
 * Source: Aubourg et al. 2015, eq. 17 (memory).
 * @example aubourgDragSoundHorizonWithNeutrinos(0.022383, 0.142493, 6.451e-4, 3.046) // 147.01
 */
export function aubourgDragSoundHorizonWithNeutrinos(
  baryonDensity: number,
  baryonsAndCold: number,
  neutrinoDensity: number,
  effectiveNumber: number,
): number {
  const neutrinos = Math.exp(-49.7 * (neutrinoDensity + 0.002) ** 2);
  const radiation = 1 + (effectiveNumber - 3.046) / 30.6;
  return (56.067 * neutrinos) / (baryonsAndCold ** 0.2436 * baryonDensity ** 0.128876 * radiation);
}

/** Eq. 16 for a closed model. */
export function aubourgOf(model: ClosedModel): number {
  requireDensities(model, "dragSoundHorizon.aubourg2015");
  return aubourgDragSoundHorizon(
    model.baryonDensity,
    model.baryonDensity + model.coldMatterDensity,
    model.neutrinoDensity,
  );
}

export const dragSoundHorizonAubourgQuantity = fitQuantity({
  name: "dragSoundHorizon.aubourg2015",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Sound horizon at the drag epoch by a published fit",
  equation: String.raw`r_\mathrm{drag} = \frac{55.154\,e^{-72.3(\omega_\nu + 0.0006)^2}}{\omega_{cb}^{0.25351}\,\omega_b^{0.12807}}`,
  fit: aubourgFit,
  compute: aubourgOf,
});

export const dragSoundHorizonAubourgWithNeutrinosQuantity = fitQuantity({
  name: "dragSoundHorizon.aubourg2015.effectiveNumber",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Sound horizon at the drag epoch by a published fit with N_eff",
  equation: String.raw`r_\mathrm{drag} = \frac{56.067\,e^{-49.7(\omega_\nu + 0.002)^2}}{\omega_{cb}^{0.2436}\,\omega_b^{0.128876}\,[1 + (N_\mathrm{eff} - 3.046)/30.60]}`,
  fit: aubourgWithNeutrinosFit,
  compute: (model) => {
    requireDensities(model, "dragSoundHorizon.aubourg2015.effectiveNumber");
    return aubourgDragSoundHorizonWithNeutrinos(
      model.baryonDensity,
      model.baryonDensity + model.coldMatterDensity,
      model.neutrinoDensity,
      model.neutrinos.effectiveNumber,
    );
  },
});
