import type { ModelEvaluation, ModelPart } from "../expansion";
import { aubourgOf, briedenOf } from "../fits";
import { dragRedshift, givesDragSoundHorizon, historyQuantity } from "../lastScattering";
import type { ClosedModel } from "../model";
import { soundHorizon } from "./soundHorizon";

const horizonPart: ModelPart<number> = {
  name: "sound horizon at the drag epoch",
  compute: (evaluation) => {
    const { model } = evaluation;
    if (model.conventions.soundHorizon === "aubourg2015") return aubourgOf(model);
    if (model.conventions.soundHorizon === "brieden2023") return briedenOf(model);
    return soundHorizon(evaluation, dragRedshift(evaluation)).value;
  },
};

/**
 * r_drag = r_s(z_drag), Mpc: the ruler of baryon acoustic oscillations; by a fit where `conventions.drag` or
 * `conventions.soundHorizon` says so.
 *
 * Accuracy 1e-10. Source: Eisenstein & Hu 1998; Planck 2018 VI, table 2.
 * @example dragSoundHorizon(evaluation) // 147.1
 */
export function dragSoundHorizon(evaluation: ModelEvaluation): number {
  return evaluation.once(horizonPart);
}

const needsHistory = (model: ClosedModel) => model.conventions.drag === "full" && !givesDragSoundHorizon(model);

export const dragSoundHorizonQuantity = historyQuantity({
  name: "dragSoundHorizon",
  symbol: "r_drag",
  unit: "Mpc",
  description: "Comoving sound horizon at the drag epoch",
  equation: String.raw`r_\mathrm{drag} = r_s(z_\mathrm{drag})`,
  method: "adaptive quadrature to the z_drag of the full computation",
  methodBesideFits: "",
  steps: ["drag", "soundHorizon", "dragSoundHorizon"],
  needsHistory,
  accuracy: 1e-10,
  sources: ["eisensteinHu1998", "planck2018Parameters"],
  compute: dragSoundHorizon,
});

export const dragSoundHorizonTimesReducedHubbleQuantity = historyQuantity({
  name: "dragSoundHorizonTimesReducedHubble",
  symbol: "r_drag h",
  unit: "Mpc",
  description: "Comoving sound horizon at the drag epoch times h",
  equation: String.raw`r_\mathrm{drag}\,h`,
  method: "product",
  steps: ["drag", "soundHorizon", "dragSoundHorizon"],
  needsHistory,
  accuracy: 1e-10,
  sources: ["eisensteinHu1998"],
  compute: (evaluation) => dragSoundHorizon(evaluation) * evaluation.model.reducedHubble,
});
