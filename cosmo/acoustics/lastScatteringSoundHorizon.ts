import type { ModelEvaluation, ModelPart } from "../expansion";
import { historyQuantity, lastScatteringRedshift, throughLastScattering } from "../lastScattering";
import { soundHorizon } from "./soundHorizon";

const horizonPart: ModelPart<number> = {
  name: "sound horizon at last scattering",
  compute: (evaluation) => soundHorizon(evaluation, lastScatteringRedshift(evaluation)).value,
};

/**
 * r_* = r_s(z_*), Mpc: the comoving sound horizon at last scattering.
 *
 * Accuracy 5e-11. Source: Planck 2018 VI, table 2.
 * @example lastScatteringSoundHorizon(evaluation) // 144.4
 */
export function lastScatteringSoundHorizon(evaluation: ModelEvaluation): number {
  return evaluation.once(horizonPart);
}

export const lastScatteringSoundHorizonQuantity = historyQuantity({
  name: "lastScatteringSoundHorizon",
  symbol: "r_*",
  unit: "Mpc",
  description: "Comoving sound horizon at last scattering",
  equation: "r_* = r_s(z_*)",
  method: "adaptive quadrature to the z_* of the full computation",
  methodBesideFits: "r_s at z_*",
  steps: ["lastScattering", "soundHorizon"],
  needsHistory: throughLastScattering,
  accuracy: 5e-11,
  sources: ["planck2018Parameters"],
  compute: lastScatteringSoundHorizon,
});
