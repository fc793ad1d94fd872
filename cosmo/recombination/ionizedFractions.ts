import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { pastRedshiftArgument } from "../quantity";
import { historyErrorFloor } from "./historyErrorFloor";
import { ionizationHistoryPart } from "./ionizationHistory";
import { recombinationNotes } from "./recombinationNotes";
import { recombinationSources } from "./tierStatement";

/**
 * x_e of recombination alone: free electrons a hydrogen nucleus, without reionization.
 *
 * @param z redshift, 0 or more. Method: the model's tier; see ionizationHistory.ts. Accuracy 5e-9 (Saha 3e-13).
 * @example residualIonizedFraction(evaluation, 1090)
 */
export function residualIonizedFraction(evaluation: ModelEvaluation, z: number): number {
  return evaluation.once(ionizationHistoryPart).ionized(Math.log1p(z));
}

/**
 * x_p = n_p/n_H of recombination alone.
 *
 * @param z redshift, 0 or more. Method and accuracy as {@link residualIonizedFraction}.
 */
export function hydrogenIonizedFraction(evaluation: ModelEvaluation, z: number): number {
  return evaluation.once(ionizationHistoryPart).hydrogen(Math.log1p(z));
}

const method = "implicit Runge-Kutta collocation of the model's recombination tier (Saha: Newton's method)";

export const residualIonizedFractionQuantity: ModelQuantity = {
  name: "residualIonizedFraction",
  symbol: "x_e",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Free electrons a hydrogen nucleus, recombination alone",
  equation: String.raw`x_e(z) = n_e/n_\mathrm{H}`,
  method,
  accuracy: 5e-9,
  sources: recombinationSources,
  usesHistory: true,
  errorFloor: historyErrorFloor(5e-9),
  notes: (evaluation, [z]) => recombinationNotes(evaluation, z),
  compute: (evaluation, [z]) => ({ value: residualIonizedFraction(evaluation, z!), error: 0 }),
};

export const hydrogenIonizedFractionQuantity: ModelQuantity = {
  name: "hydrogenIonizedFraction",
  symbol: "x_p",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Ionized share of hydrogen, recombination alone",
  equation: String.raw`x_p(z) = n_p/n_\mathrm{H}`,
  method,
  accuracy: 5e-9,
  sources: recombinationSources,
  usesHistory: true,
  errorFloor: historyErrorFloor(5e-9),
  notes: (evaluation, [z]) => recombinationNotes(evaluation, z),
  compute: (evaluation, [z]) => ({ value: hydrogenIonizedFraction(evaluation, z!), error: 0 }),
};
