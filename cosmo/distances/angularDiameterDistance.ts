import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { redshiftPair } from "./redshiftPair";
import { antipodeNote, transverseDistance } from "./transverseDistance";

/**
 * Angular-diameter distance, Mpc: proper size at z2 over the angle that it fills for an observer at z1.
 *
 * D_A(z1, z2) = S_k[D_C(z1, z2)]/(1+z2), D_A(z) = D_M(z)/(1+z). Taking S_k of the difference of line-of-sight distances holds for
 * every sign of curvature, where Hogg's eq. 19 holds for an open or flat model and up to the equator of a closed one.
 *
 * @param from z1, 0 or more; @param to z2, at or above z1. Beyond the turning point of a closed model: NoAnswerError.
 * Accuracy 1e-13. Source: Hogg 1999, eqs 18 and 19.
 * @example angularDiameterDistance(evaluation, 0, 1.6).value // 1794 near Planck's parameters, its maximum
 */
export function angularDiameterDistance(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  where = "angularDiameterDistance",
): Computed {
  const transverse = transverseDistance(evaluation, from, to, where);
  return { value: transverse.value / (1 + to), error: transverse.error / (1 + to) };
}

export const angularDiameterDistanceQuantity: ModelQuantity = {
  name: "angularDiameterDistance",
  symbol: "D_A",
  unit: "Mpc",
  arguments: [pastRedshiftArgument],
  acceptsPair: true,
  description: "Angular-diameter distance",
  equation: String.raw`D_A(z_1, z_2) = \frac{D_M(z_1, z_2)}{1+z_2}`,
  method: "from the transverse comoving distance",
  accuracy: 5e-14,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, values) => angularDiameterDistance(evaluation, ...redshiftPair(values)),
};
