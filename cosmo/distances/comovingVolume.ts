import { NoAnswerError } from "../errors";
import { backgroundIntegral, type ModelEvaluation, type ModelQuantity } from "../expansion";
import { curvedSine, curvedVolume } from "../numerics";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { comovingDistance } from "./comovingDistance";
import { redshiftPair, requireNotNegative, requireOrder } from "./redshiftPair";
import { curvaturePerArea } from "./transverseDistance";

const where = "comovingVolume";

/**
 * Comoving volume over the whole sky out to a redshift, or between two, Gpc3.
 *
 * V_C(z) = 4 pi int_0^D_C S_k^2 dD; V_C(z1, z2) = V_C(z2) - V_C(z1).
 *
 * @param from z1, 0 or more; @param to z2, at or above z1. Beyond the turning point of a closed model, or beyond pi curvature radii,
 * where a closed model has been counted whole: NoAnswerError.
 * Method: closed form in D_C, with a series for small curvature; a shell by quadrature over its depth, so that a thin one loses no
 * digits. Accuracy 1e-13.
 * Source: Hogg 1999, eq. 29.
 * @example comovingVolume(evaluation, 0, 1).value // 165 near Planck's parameters
 */
export function comovingVolume(evaluation: ModelEvaluation, from: number, to: number): Computed {
  requireNotNegative(from, where);
  requireOrder(from, to, where);
  const curvature = curvaturePerArea(evaluation);
  const outer = comovingDistance(evaluation, 0, to, where);
  if (curvature > 0 && outer.value * Math.sqrt(curvature) > Math.PI) {
    throw new NoAnswerError({
      where,
      reason: `redshift ${to} lies beyond the antipode of this closed model: all of space is nearer`,
    });
  }
  const area = (distance: number) => 4 * Math.PI * curvedSine(distance, curvature) ** 2;
  const error = (area(outer.value) * outer.error) / 1e9;
  if (from === 0) return { value: (4 * Math.PI * curvedVolume(outer.value, curvature)) / 1e9, error };
  const inner = comovingDistance(evaluation, 0, from, where);
  const width = comovingDistance(evaluation, from, to, where);
  const shell = backgroundIntegral(where, 1e-9, (depth) => area(inner.value + depth), 0, width.value);
  const innerShare = inner.value > 0 ? (2 * inner.error) / inner.value : 0;
  return { ...shell, error: shell.error + shell.value * innerShare + (area(outer.value) * width.error) / 1e9 };
}

export const comovingVolumeQuantity: ModelQuantity = {
  name: where,
  symbol: "V_C",
  unit: "Gpc3",
  arguments: [pastRedshiftArgument],
  acceptsPair: true,
  description: "Comoving volume over the whole sky",
  equation: String.raw`V_C(z) = 4\pi \int_0^{D_C(z)} S_k(D)^2\,dD`,
  method: "closed form in the line-of-sight comoving distance; a shell by quadrature over its depth",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, values) => comovingVolume(evaluation, ...redshiftPair(values)),
};
