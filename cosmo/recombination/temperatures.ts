import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { pastRedshiftArgument, redshiftArgument } from "../quantity";
import { historyErrorFloor } from "./historyErrorFloor";
import { ionizationHistoryPart } from "./ionizationHistory";
import { recombinationNotes } from "./recombinationNotes";
import { recombinationSources } from "./tierStatement";

/**
 * T_r(z) = T_cmb (1+z), K.
 *
 * @param z redshift above -1. Exact.
 * @example radiationTemperature(evaluation, 1090) // 2973 K
 */
export function radiationTemperature(evaluation: ModelEvaluation, z: number): number {
  return evaluation.model.photonTemperature * (1 + z);
}

/**
 * T_m(z), K: temperature of the gas, recombination alone (no heating by first light).
 *
 * dT_m/dz = [8 sigma_T a T_r^4/(3 H (1+z) m_e c)] x_e/(1 + f_He + x_e) (T_m - T_r) + 2 T_m/(1+z).
 *
 * @param z redshift, 0 or more. Method: integrated with the ionization history; in tier `saha` equal to T_r. Accuracy 2e-9.
 * Source: Peebles 1968; Seager, Sasselov & Scott 1999.
 */
export function matterTemperature(evaluation: ModelEvaluation, z: number): number {
  const history = evaluation.once(ionizationHistoryPart);
  return radiationTemperature(evaluation, z) * Math.exp(history.logTemperatureRatio(Math.log1p(z)));
}

export const radiationTemperatureQuantity: ModelQuantity = {
  name: "radiationTemperature",
  symbol: "T_r",
  unit: "K",
  arguments: [redshiftArgument],
  description: "Temperature of the background at a redshift",
  equation: String.raw`T_r(z) = T_\mathrm{cmb} (1+z)`,
  method: "closed form",
  accuracy: 1e-15,
  sources: ["fixsen2009"],
  compute: (evaluation, [z]) => ({ value: radiationTemperature(evaluation, z!), error: 0 }),
};

export const matterTemperatureQuantity: ModelQuantity = {
  name: "matterTemperature",
  symbol: "T_m",
  unit: "K",
  arguments: [pastRedshiftArgument],
  description: "Temperature of the gas, recombination alone",
  equation: String.raw`\frac{dT_m}{dz} = \frac{8\sigma_T a T_r^4}{3H(1+z)m_e c}\,\frac{x_e\,(T_m - T_r)}{1+f_\mathrm{He}+x_e} + \frac{2T_m}{1+z}`,
  method: "integrated with the ionization history",
  accuracy: 2e-9,
  sources: recombinationSources,
  usesHistory: true,
  errorFloor: historyErrorFloor(2e-9),
  notes: (evaluation, [z]) => [
    ...recombinationNotes(evaluation, z),
    { level: "note", text: "no heating by first light or reionization: not the temperature of gas today" },
  ],
  compute: (evaluation, [z]) => ({ value: matterTemperature(evaluation, z!), error: 0 }),
};
