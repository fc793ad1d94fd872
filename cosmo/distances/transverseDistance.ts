import { type ModelEvaluation, type ModelQuantity, requireRedshift, unitHubbleDistance } from "../expansion";
import { curvedSine } from "../numerics";
import { type Computed, pastRedshiftArgument, type ValidityNote } from "../quantity";
import { comovingDistance } from "./comovingDistance";
import { redshiftPair, requireNotNegative, requireOrder } from "./redshiftPair";

/** Curvature of space, -Omega_k (H0/c)^2 in 1/Mpc^2: positive for a closed model, one over the square of the curvature radius. */
export function curvaturePerArea(evaluation: ModelEvaluation): number {
  const { curvature, reducedHubble } = evaluation.model;
  return -curvature * (reducedHubble / unitHubbleDistance) ** 2;
}

/**
 * Transverse comoving distance D_M, Mpc: comoving size at z2 over the angle that it fills for an observer at z1.
 *
 * D_M(z1, z2) = S_k[D_C(z1, z2)], S_k(d) = R sinh(d/R), d, or R |sin(d/R)| for Omega_k above, at or below 0, R = c/(H0 sqrt|Omega_k|).
 * In a closed model it falls again beyond pi/2 curvature radii, vanishes at the antipode and returns beyond it.
 *
 * @param from z1, 0 or more; @param to z2, at or above z1 (else DomainError). Beyond the turning point of a closed model: NoAnswerError.
 * Method: quadrature for D_C, then S_k with a series for small curvature. Accuracy 1e-13; near the antipode 1e-12 R.
 * Source: Hogg 1999, eq. 16.
 * @example transverseDistance(evaluation, 0, 1089.9).value // 13870 near Planck's parameters
 */
export function transverseDistance(
  evaluation: ModelEvaluation,
  from: number,
  to: number,
  where = "transverseDistance",
): Computed {
  requireRedshift(evaluation, from, where);
  requireRedshift(evaluation, to, where);
  requireNotNegative(from, where);
  requireOrder(from, to, where);
  const along = comovingDistance(evaluation, from, to, where);
  const curvature = curvaturePerArea(evaluation);
  const value = Math.abs(curvedSine(along.value, curvature));
  // d S_k/d D_C is the curved cosine, sqrt(1 - K S_k^2).
  const slope = Math.sqrt(Math.max(1, 1 - curvature * value * value));
  return { value, error: slope * along.error };
}

/** A warning where the line of sight of a closed model passes the antipode. */
export function antipodeNote(evaluation: ModelEvaluation, values: readonly number[]): readonly ValidityNote[] {
  const curvature = curvaturePerArea(evaluation);
  if (!(curvature > 0)) return [];
  const along = comovingDistance(evaluation, ...redshiftPair(values)).value;
  const radii = along * Math.sqrt(curvature);
  if (!(radii > Math.PI)) return [];
  return [
    {
      level: "warning",
      text: `the line of sight is ${radii.toPrecision(4)} curvature radii long: beyond pi it has passed the antipode of this closed model`,
    },
  ];
}

export const transverseDistanceQuantity: ModelQuantity = {
  name: "transverseDistance",
  symbol: "D_M",
  unit: "Mpc",
  arguments: [pastRedshiftArgument],
  acceptsPair: true,
  description: "Transverse comoving distance",
  equation: String.raw`D_M(z_1, z_2) = S_k\!\left[c \int_{z_1}^{z_2} \frac{dz}{H(z)}\right]`,
  method: "adaptive Gauss-Kronrod quadrature in ln(1+z), bent by the curvature",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, values) => transverseDistance(evaluation, ...redshiftPair(values)),
};
