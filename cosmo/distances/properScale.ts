import { arcsecond } from "../constants";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { type Computed, pastRedshiftArgument } from "../quantity";
import { angularDiameterDistance } from "./angularDiameterDistance";
import { antipodeNote } from "./transverseDistance";

/**
 * Proper size that fills one second of arc at a redshift, kpc/arcsec.
 *
 * s = D_A times one arcsecond.
 *
 * @param z redshift, 0 or more. Beyond the turning point of a closed model: NoAnswerError. Accuracy 1e-13.
 * Source: Hogg 1999, section 6.
 * @example properScale(evaluation, 1).value // 8.2 near Planck's parameters
 */
export function properScale(evaluation: ModelEvaluation, z: number): Computed {
  const distance = angularDiameterDistance(evaluation, 0, z, "properScale");
  const factor = 1000 * arcsecond;
  return { value: factor * distance.value, error: factor * distance.error };
}

export const properScaleQuantity: ModelQuantity = {
  name: "properScale",
  symbol: "s",
  unit: "kpc/arcsec",
  arguments: [pastRedshiftArgument],
  description: "Proper size that fills one second of arc",
  equation: String.raw`s(z) = D_A(z)\,\frac{\pi}{648000}`,
  method: "from the angular-diameter distance",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, [z]) => properScale(evaluation, z!),
};
