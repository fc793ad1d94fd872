import { lightSpeed } from "../constants";
import { hubbleRate, type ModelEvaluation, type ModelQuantity } from "../expansion";
import { redshiftArgument } from "../quantity";

/**
 * Hubble distance at a redshift, Mpc.
 *
 * D_H(z) = c/H(z).
 *
 * @param z redshift above -1; beyond a turning point: NoAnswerError. Closed form; accuracy 1e-13. Source: Hogg 1999, eq. 4.
 * @example hubbleDistance(evaluation, 0) // 4448 at 67.4 km/s/Mpc
 */
export function hubbleDistance(evaluation: ModelEvaluation, z: number): number {
  return lightSpeed / 1000 / hubbleRate(evaluation, z);
}

export const hubbleDistanceQuantity: ModelQuantity = {
  name: "hubbleDistance",
  symbol: "D_H",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Hubble distance at a redshift, c/H",
  equation: String.raw`D_H(z) = \frac{c}{H(z)}`,
  method: "closed form",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => ({ value: hubbleDistance(evaluation, z!), error: 0 }),
};
