import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { baryonLoading } from "../lastScattering";
import { redshiftArgument } from "../quantity";

/**
 * Sound speed of the photon-baryon fluid over the speed of light.
 *
 * c_s/c = 1/sqrt[3 (1 + R(z))].
 *
 * @param z redshift above -1. Exact. Source: Hu & Sugiyama 1996.
 * @example soundSpeed(evaluation, 1090) // 0.453
 */
export function soundSpeed(evaluation: ModelEvaluation, z: number): number {
  return 1 / Math.sqrt(3 * (1 + baryonLoading(evaluation, z)));
}

export const soundSpeedQuantity: ModelQuantity = {
  name: "soundSpeed",
  symbol: "c_s/c",
  unit: "",
  arguments: [redshiftArgument],
  description: "Sound speed of the photon-baryon fluid over the speed of light",
  equation: String.raw`\frac{c_s}{c} = \frac{1}{\sqrt{3\,(1+R(z))}}`,
  method: "closed form",
  accuracy: 1e-14,
  sources: ["huSugiyama1996"],
  compute: (evaluation, [z]) => ({ value: soundSpeed(evaluation, z!), error: 0 }),
};
