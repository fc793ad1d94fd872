import {
  backgroundIntegral,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireRedshift,
  unitHubbleDistance,
} from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";
import { redshiftPair } from "./redshiftPair";

/**
 * Line-of-sight comoving distance D_C between two redshifts, Mpc.
 *
 * D_C(z1, z2) = c int_z1^z2 dz/H. Negative when z2 is below z1.
 *
 * @param from z1, @param to z2: above -1. Beyond the turning point of a closed model: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in ln(1+z), where the integrand is smooth at all epochs. Accuracy 1e-13.
 * Source: Hogg 1999, eq. 15.
 * @example comovingDistance(evaluation, 0, 1.1).value
 */
export function comovingDistance(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  where = "comovingDistance",
): NumericalResult {
  requireRedshift(evaluation, from, where);
  requireRedshift(evaluation, to, where);
  const expansion = evaluation.once(expansionPart);
  const integrand = (s: number) => {
    const a = Math.exp(-s);
    return 1 / (a * expansion.rate(a));
  };
  return backgroundIntegral(where, unitHubbleDistance, integrand, Math.log1p(from), Math.log1p(to), {
    breakpoints: expansion.kinks,
  });
}

export const comovingDistanceQuantity: ModelQuantity = {
  name: "comovingDistance",
  symbol: "D_C",
  unit: "Mpc",
  arguments: [redshiftArgument],
  acceptsPair: true,
  description: "Line-of-sight comoving distance",
  equation: String.raw`D_C(z_1, z_2) = c \int_{z_1}^{z_2} \frac{dz}{H(z)}`,
  method: "adaptive Gauss-Kronrod quadrature in ln(1+z)",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, values) => comovingDistance(evaluation, ...redshiftPair(values)),
};
