import { lightSpeed, megaparsec } from "../constants";
import { expansionPart, type ModelEvaluation, type ModelQuantity, requireRedshift } from "../expansion";
import { hundredKmPerSecondPerMpc } from "../model";
import { integrate, type NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

/** c/(100 km/s/Mpc) in Mpc: 2997.92458. */
export const unitHubbleDistance = lightSpeed / hundredKmPerSecondPerMpc / megaparsec;

/**
 * Line-of-sight comoving distance D_C between two redshifts, Mpc.
 *
 * D_C(z1, z2) = c int_z1^z2 dz/H. Negative when z2 is below z1.
 *
 * @param from z1, @param to z2: above -1. Beyond the turning point of a closed model: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in ln(1+z), where the integrand is smooth at all epochs. Accuracy 1e-12.
 * Source: Hogg 1999, eq. 15.
 * @example comovingDistance(evaluation, 0, 1.1).value
 */
export function comovingDistance(evaluation: ModelEvaluation, from: number, to: number): NumericalResult {
  requireRedshift(evaluation, Math.max(from, to), "comovingDistance");
  const expansion = evaluation.once(expansionPart);
  const integrand = (s: number) => {
    const a = Math.exp(-s);
    return 1 / (a * expansion.rate(a));
  };
  const result = integrate(integrand, Math.log1p(from), Math.log1p(to));
  return { ...result, value: unitHubbleDistance * result.value, error: unitHubbleDistance * result.error };
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
  accuracy: 1e-12,
  sources: ["hogg1999"],
  compute: (evaluation, values) => comovingDistance(evaluation, ...redshiftPair(values)),
};

/** (z) stands for (0, z). */
export function redshiftPair(values: readonly number[]): [number, number] {
  return values.length === 2 ? [values[0]!, values[1]!] : [0, values[0]!];
}
