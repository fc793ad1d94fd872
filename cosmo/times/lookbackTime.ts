import {
  backgroundIntegral,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireRedshift,
  unitHubbleTime,
} from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/**
 * Time that passed from redshift z2 to z1, Gyr; the lookback time when z1 is 0.
 *
 * t_L(z1, z2) = int_z1^z2 dz/[(1+z) H]. Negative when z2 is below z1: the time still to come.
 *
 * @param from z1, @param to z2: above -1. Beyond the turning point of a closed model: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in ln(1+z). Accuracy 1e-13. Source: Hogg 1999, eq. 30.
 * @example lookbackTime(evaluation, 0, 1).value // 7.95 near Planck's parameters
 */
export function lookbackTime(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  where = "lookbackTime",
): NumericalResult {
  return timeIntegral(evaluation, from, to, unitHubbleTime, where);
}

/** The time between two redshifts in a unit: unit int dz/[(1+z) H/100]. */
export function timeIntegral(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  unit: number,
  where: string,
): NumericalResult {
  requireRedshift(evaluation, from, where);
  requireRedshift(evaluation, to, where);
  const expansion = evaluation.once(expansionPart);
  return backgroundIntegral(where, unit, (s) => 1 / expansion.rate(Math.exp(-s)), Math.log1p(from), Math.log1p(to), {
    breakpoints: expansion.kinks,
  });
}

export const lookbackTimeQuantity: ModelQuantity = {
  name: "lookbackTime",
  symbol: "t_L",
  unit: "Gyr",
  arguments: [redshiftArgument],
  acceptsPair: true,
  description: "Lookback time, or the time between two redshifts",
  equation: String.raw`t_L(z_1, z_2) = \int_{z_1}^{z_2} \frac{dz}{(1+z) H(z)}`,
  method: "adaptive Gauss-Kronrod quadrature in ln(1+z)",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, values) =>
    values.length === 2 ? lookbackTime(evaluation, values[0]!, values[1]!) : lookbackTime(evaluation, 0, values[0]!),
};
