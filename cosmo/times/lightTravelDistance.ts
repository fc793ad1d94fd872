import { type ModelEvaluation, type ModelQuantity, unitHubbleDistance } from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";
import { timeIntegral } from "./lookbackTime";

/**
 * Distance that light travels between two redshifts, Mpc: c times the time that passes.
 *
 * d_T(z1, z2) = c int_z1^z2 dz/[(1+z) H]. Negative when z2 is below z1.
 *
 * @param from z1, @param to z2: above -1. Method, domain and accuracy as lookbackTime.
 * Source: Hogg 1999, eq. 30, times c.
 * @example lightTravelDistance(evaluation, 0, 1).value // 2438 near Planck's parameters
 */
export function lightTravelDistance(evaluation: ModelEvaluation, from: number, to: number): NumericalResult {
  return timeIntegral(evaluation, from, to, unitHubbleDistance, "lightTravelDistance");
}

export const lightTravelDistanceQuantity: ModelQuantity = {
  name: "lightTravelDistance",
  symbol: "d_T",
  unit: "Mpc",
  arguments: [redshiftArgument],
  acceptsPair: true,
  description: "Light-travel distance, c times the lookback time",
  equation: String.raw`d_T(z_1, z_2) = c \int_{z_1}^{z_2} \frac{dz}{(1+z) H(z)}`,
  method: "adaptive Gauss-Kronrod quadrature in ln(1+z)",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, values) =>
    values.length === 2
      ? lightTravelDistance(evaluation, values[0]!, values[1]!)
      : lightTravelDistance(evaluation, 0, values[0]!),
};
