import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { redshiftPair } from "./redshiftPair";
import { antipodeNote, transverseDistance } from "./transverseDistance";

/**
 * Luminosity distance, Mpc: sqrt[L/(4 pi F)] for a source at z2 and an observer at z1.
 *
 * D_L(z) = (1+z) D_M(z); D_L(z1, z2) = (1+z2) D_M(z1, z2)/(1+z1)^2, which keeps D_L = [(1+z2)/(1+z1)]^2 D_A.
 *
 * @param from z1, 0 or more; @param to z2, at or above z1. Beyond the turning point of a closed model: NoAnswerError.
 * Accuracy 1e-13. Source: Hogg 1999, eq. 21; the pair by Etherington's reciprocity (common practice, no source).
 * @example luminosityDistance(evaluation, 0, 1.1).value
 */
export function luminosityDistance(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  where = "luminosityDistance",
): Computed {
  const transverse = transverseDistance(evaluation, from, to, where);
  const factor = (1 + to) / (1 + from) ** 2;
  return { value: factor * transverse.value, error: factor * transverse.error };
}

export const luminosityDistanceQuantity: ModelQuantity = {
  name: "luminosityDistance",
  symbol: "D_L",
  unit: "Mpc",
  arguments: [pastRedshiftArgument],
  acceptsPair: true,
  description: "Luminosity distance",
  equation: String.raw`D_L(z_1, z_2) = \frac{1+z_2}{(1+z_1)^2}\,D_M(z_1, z_2)`,
  method: "from the transverse comoving distance",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, values) => luminosityDistance(evaluation, ...redshiftPair(values)),
};
