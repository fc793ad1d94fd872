import { DomainError } from "../errors";
import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { Computed, QuantityArgument } from "../quantity";
import { luminosityDistance } from "./luminosityDistance";
import { antipodeNote } from "./transverseDistance";

const where = "distanceModulus";

/** A redshift at which there is a distance to take the logarithm of. */
const positiveRedshift: QuantityArgument = {
  name: "z",
  symbol: "z",
  unit: "",
  rule: "must be finite and above 0",
  accepts: (z) => z > 0 && Number.isFinite(z),
};

/**
 * Distance modulus at a redshift, mag.
 *
 * mu = 5 log10(D_L/10 pc).
 *
 * @param z redshift above 0; 0 and below: DomainError. Beyond the turning point of a closed model: NoAnswerError.
 * Accuracy 1e-13, relative; near z = 2e-9, where mu crosses 0, 2e-12 mag. Source: Hogg 1999, eq. 25.
 * @example distanceModulus(evaluation, 1).value // 44.16 near Planck's parameters
 */
export function distanceModulus(evaluation: ModelEvaluation, z: number): Computed {
  if (!positiveRedshift.accepts(z)) {
    throw new DomainError({ where, argument: "redshift", rule: positiveRedshift.rule, value: z });
  }
  const distance = luminosityDistance(evaluation, 0, z, where);
  const relative = distance.error / distance.value;
  return { value: 5 * Math.log10(distance.value) + 25, error: (5 / Math.LN10) * relative };
}

export const distanceModulusQuantity: ModelQuantity = {
  name: where,
  symbol: "μ",
  unit: "mag",
  arguments: [positiveRedshift],
  description: "Distance modulus",
  equation: String.raw`\mu(z) = 5 \log_{10}\frac{D_L(z)}{10\,\mathrm{pc}}`,
  method: "from the luminosity distance",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  notes: antipodeNote,
  compute: (evaluation, [z]) => distanceModulus(evaluation, z!),
};
