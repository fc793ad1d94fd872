import {
  askedValue,
  type ModelEvaluation,
  type ModelQuantity,
  redshiftNodesPart,
  requireAsked,
  solveRedshift,
  unitHubbleDistance,
  unitHubbleTime,
} from "../expansion";
import type { Computed, QuantityArgument } from "../quantity";
import { timeIntegral } from "./lookbackTime";

const time = askedValue("time", "t", "Gyr");
const distance = askedValue("distance", "d", "Mpc");

/**
 * Redshift from which light has travelled for a time.
 *
 * @param time Gyr, 0 or more; as long as the age of the universe, or longer: NoAnswerError.
 * Method: Brent's method in ln(1+z) on the lookback time. Accuracy 1e-12 of 1+z, less close to the age. Source: Hogg 1999, eq. 30, inverted.
 * @example redshiftAtLookbackTime(evaluation, 8).value // 1.01 near Planck's parameters
 */
export function redshiftAtLookbackTime(evaluation: ModelEvaluation, value: number): Computed {
  return solveTime(evaluation, value, time, unitHubbleTime, "redshiftAtLookbackTime", "lookback time");
}

/**
 * Redshift from which light has travelled a distance, c times the lookback time.
 *
 * @param distance Mpc, 0 or more; otherwise as {@link redshiftAtLookbackTime}.
 * @example redshiftAtLightTravelDistance(evaluation, 2400).value
 */
export function redshiftAtLightTravelDistance(evaluation: ModelEvaluation, value: number): Computed {
  const where = "redshiftAtLightTravelDistance";
  return solveTime(evaluation, value, distance, unitHubbleDistance, where, "light-travel distance");
}

function solveTime(
  evaluation: ModelEvaluation,
  value: number,
  argument: QuantityArgument,
  unit: number,
  where: string,
  subject: string,
): Computed {
  requireAsked(argument, value, where);
  const all = evaluation.once(redshiftNodesPart);
  const nodes = Float64Array.of(0, all[all.length - 1]!);
  const at = (s: number) => timeIntegral(evaluation, 0, Math.expm1(s), unit, where).value;
  return solveRedshift({ where, subject, unit: argument.unit, nodes, values: nodes.map(at), at }, value);
}

export const redshiftAtLookbackTimeQuantity: ModelQuantity = {
  name: "redshiftAtLookbackTime",
  symbol: "z",
  unit: "",
  arguments: [time],
  description: "Redshift from which light has travelled for a time",
  equation: "t_L(z) = t",
  method: "Brent's method in ln(1+z) on the lookback time",
  accuracy: 1e-10,
  sources: ["hogg1999", "brent1973"],
  compute: (evaluation, [value]) => redshiftAtLookbackTime(evaluation, value!),
};

export const redshiftAtLightTravelDistanceQuantity: ModelQuantity = {
  name: "redshiftAtLightTravelDistance",
  symbol: "z",
  unit: "",
  arguments: [distance],
  description: "Redshift from which light has travelled a distance",
  equation: "d_T(z) = d",
  method: "Brent's method in ln(1+z) on the light-travel distance",
  accuracy: 1e-10,
  sources: ["hogg1999", "brent1973"],
  compute: (evaluation, [value]) => redshiftAtLightTravelDistance(evaluation, value!),
};
