import { NoAnswerError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "./expansion";
import { requireRedshift } from "./requirePast";
import { askedValue, requireAsked } from "./solveRedshift";

const where = "redshiftAtTemperature";
const asked = askedValue("temperature", "T", "K");

/**
 * Redshift at which the background radiation had a temperature: z = T/T_cmb - 1, below 0 in the future.
 *
 * @param temperature K, above 0 (else NoAnswerError: it is never reached). Beyond a turning point: NoAnswerError. Exact.
 * Source: common practice, no source (the radiation cools as 1/a).
 * @example redshiftAtTemperature(evaluation, 3000) // 1099.7
 */
export function redshiftAtTemperature(evaluation: ModelEvaluation, temperature: number): number {
  requireAsked(asked, temperature, where);
  const today = evaluation.model.photonTemperature;
  if (!(today > 0 && temperature > 0)) {
    throw new NoAnswerError({
      where,
      reason:
        today > 0
          ? "the temperature 0 K is never reached"
          : "this model has no background radiation (photonTemperature is 0)",
    });
  }
  const z = temperature / today - 1;
  requireRedshift(evaluation, z, where);
  return z;
}

export const redshiftAtTemperatureQuantity: ModelQuantity = {
  name: where,
  symbol: "z",
  unit: "",
  arguments: [asked],
  description: "Redshift at which the background radiation had a temperature",
  equation: "1 + z = T/T_{cmb}",
  method: "closed form",
  accuracy: 1e-15,
  sources: ["fixsen2009"],
  compute: (evaluation, [temperature]) => {
    const value = redshiftAtTemperature(evaluation, temperature!);
    return { value, error: 2 * Number.EPSILON * (1 + value) };
  },
};
