import { equalityRedshift, equalityRedshiftQuantity, type ModelEvaluation } from "../expansion";
import { historyQuantity, throughLastScattering } from "../lastScattering";
import { conformalTime } from "../times";
import { lastScatteringDistancePart } from "./acousticAngle";
import { soundHorizon } from "./soundHorizon";

/**
 * 100 theta_eq: angle of the comoving horizon at equality in units of 0.01 rad, theta_eq = eta(z_eq)/D_M(z_*).
 *
 * Accuracy 2e-12. Source: Planck 2018 VI, section 5.
 */
export function equalityHorizonAngle(evaluation: ModelEvaluation): number {
  const horizon = conformalTime(evaluation, equalityRedshift(evaluation)).value;
  return (100 * horizon) / evaluation.once(lastScatteringDistancePart);
}

/**
 * 100 theta_s,eq: angle of the sound horizon at equality in units of 0.01 rad, theta_s,eq = r_s(z_eq)/D_M(z_*).
 *
 * Accuracy 2e-12. Source: Planck 2018 VI, table 2.
 * @example equalitySoundAngle(evaluation) // 0.4493
 */
export function equalitySoundAngle(evaluation: ModelEvaluation): number {
  const horizon = soundHorizon(evaluation, equalityRedshift(evaluation)).value;
  return (100 * horizon) / evaluation.once(lastScatteringDistancePart);
}

const horizonAngle = historyQuantity({
  name: "equalityHorizonAngle",
  symbol: "100 θ_eq",
  unit: "rad",
  description: "Angle of the comoving horizon at equality, times 100",
  equation: String.raw`\theta_\mathrm{eq} = \frac{\eta(z_\mathrm{eq})}{D_M(z_*)}`,
  method: "quadrature",
  steps: ["lastScattering"],
  needsHistory: throughLastScattering,
  accuracy: 2e-12,
  sources: ["planck2018Parameters"],
  compute: equalityHorizonAngle,
});

const soundAngle = historyQuantity({
  name: "equalitySoundAngle",
  symbol: "100 θ_s,eq",
  unit: "rad",
  description: "Angle of the sound horizon at equality, times 100",
  equation: String.raw`\theta_\mathrm{s,eq} = \frac{r_s(z_\mathrm{eq})}{D_M(z_*)}`,
  method: "quadrature",
  steps: ["lastScattering", "soundHorizon"],
  needsHistory: throughLastScattering,
  accuracy: 2e-12,
  sources: ["planck2018Parameters"],
  compute: equalitySoundAngle,
});

/** Both carry the statement which matter defines equality. */
const withEqualityNote = (quantity: typeof horizonAngle): typeof horizonAngle => ({
  ...quantity,
  notes: (evaluation, values) => [
    ...quantity.notes!(evaluation, values),
    ...equalityRedshiftQuantity.notes!(evaluation, values),
  ],
});

export const equalityHorizonAngleQuantity = withEqualityNote(horizonAngle);
export const equalitySoundAngleQuantity = withEqualityNote(soundAngle);
