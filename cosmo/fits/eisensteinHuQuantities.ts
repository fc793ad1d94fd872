import type { ClosedModel } from "../model";
import {
  eisensteinHuDragRedshift,
  eisensteinHuEqualityRedshift,
  eisensteinHuEqualityWavenumber,
  eisensteinHuFit,
  eisensteinHuShortSoundHorizon,
  eisensteinHuSilkWavenumber,
  eisensteinHuSoundHorizon,
} from "./eisensteinHu";
import { densityLimits, fitQuantity, type PublishedFit } from "./publishedFit";
import { requireDensities } from "./requireDensities";

/** z_drag of the fit for a closed model. */
export function eisensteinHuDragRedshiftOf(model: ClosedModel): number {
  requireDensities(model, "dragRedshift.eisensteinHu1998");
  return eisensteinHuDragRedshift(model.baryonDensity, model.matterDensity);
}

/** The paper's sound horizon at a redshift above 0 for a closed model, Mpc. */
export function eisensteinHuSoundHorizonOf(model: ClosedModel, z: number): number {
  requireDensities(model, "soundHorizon.eisensteinHu1998");
  return eisensteinHuSoundHorizon(z, model.baryonDensity, model.matterDensity, model.photonTemperature);
}

const shortFit: PublishedFit = {
  source: "eisensteinHu1998",
  label: "Eisenstein & Hu 1998, eq. 26",
  statement: "stated to 2% of the long form, 1.9% above the full r_drag near Planck's parameters",
  limits: densityLimits([0.0125, Number.POSITIVE_INFINITY], [0.025, 0.5]),
};

export const equalityRedshiftEisensteinHuQuantity = fitQuantity({
  name: "equalityRedshift.eisensteinHu1998",
  symbol: "z_eq",
  unit: "",
  description: "Redshift of equality by a published fit",
  equation: String.raw`z_\mathrm{eq} = 2.50\times10^4\,\omega_m\,(T/2.7\,\mathrm{K})^{-4}`,
  fit: eisensteinHuFit,
  compute: (model) => {
    requireDensities(model, "equalityRedshift.eisensteinHu1998");
    return eisensteinHuEqualityRedshift(model.matterDensity, model.photonTemperature);
  },
});

export const equalityWavenumberEisensteinHuQuantity = fitQuantity({
  name: "equalityWavenumber.eisensteinHu1998",
  symbol: "k_eq",
  unit: "1/Mpc",
  description: "Wavenumber of the horizon at equality by a published fit",
  equation: String.raw`k_\mathrm{eq} = 0.0746\,\omega_m\,(T/2.7\,\mathrm{K})^{-2}`,
  fit: eisensteinHuFit,
  compute: (model) => {
    requireDensities(model, "equalityWavenumber.eisensteinHu1998");
    return eisensteinHuEqualityWavenumber(model.matterDensity, model.photonTemperature);
  },
});

export const dragRedshiftEisensteinHuQuantity = fitQuantity({
  name: "dragRedshift.eisensteinHu1998",
  symbol: "z_drag",
  unit: "",
  description: "Redshift of the drag epoch by a published fit",
  equation: String.raw`z_\mathrm{drag} = \frac{1291\,\omega_m^{0.251}}{1 + 0.659\,\omega_m^{0.828}}\,(1 + b_1 \omega_b^{b_2})`,
  fit: eisensteinHuFit,
  compute: eisensteinHuDragRedshiftOf,
});

export const dragSoundHorizonEisensteinHuQuantity = fitQuantity({
  name: "dragSoundHorizon.eisensteinHu1998",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Sound horizon at the drag epoch by a published fit, with the fit's own z_drag",
  equation: String.raw`s = \frac{2}{3 k_\mathrm{eq}}\sqrt{\frac{6}{R_\mathrm{eq}}}\,\ln\frac{\sqrt{1+R_d} + \sqrt{R_d+R_\mathrm{eq}}}{1+\sqrt{R_\mathrm{eq}}}`,
  fit: eisensteinHuFit,
  compute: (model) => eisensteinHuSoundHorizonOf(model, eisensteinHuDragRedshiftOf(model)),
});

export const dragSoundHorizonEisensteinHuShortQuantity = fitQuantity({
  name: "dragSoundHorizon.eisensteinHu1998.short",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Sound horizon at the drag epoch by the short form of a published fit",
  equation: String.raw`s = \frac{44.5\,\ln(9.83/\omega_m)}{\sqrt{1 + 10\,\omega_b^{0.75}}}`,
  fit: shortFit,
  compute: (model) => {
    requireDensities(model, "dragSoundHorizon.eisensteinHu1998.short");
    return eisensteinHuShortSoundHorizon(model.baryonDensity, model.matterDensity);
  },
});

export const silkWavenumberEisensteinHuQuantity = fitQuantity({
  name: "silkWavenumber.eisensteinHu1998",
  symbol: "k_Silk",
  unit: "1/Mpc",
  description: "Silk damping wavenumber of the matter transfer function by a published fit",
  equation: String.raw`k_\mathrm{Silk} = 1.6\,\omega_b^{0.52}\,\omega_m^{0.73}\,[1 + (10.4\,\omega_m)^{-0.95}]`,
  fit: eisensteinHuFit,
  compute: (model) => {
    requireDensities(model, "silkWavenumber.eisensteinHu1998");
    return eisensteinHuSilkWavenumber(model.baryonDensity, model.matterDensity);
  },
});
