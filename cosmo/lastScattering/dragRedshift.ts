import type { ModelEvaluation, ModelPart } from "../expansion";
import { eisensteinHuDragRedshiftOf } from "../fits";
import { historyQuantity } from "./historyQuantity";
import { opticalDepthPart } from "./opticalDepthHistory";

/** ln(1 + z_drag) under the model's conventions. */
export const dragEpochPart: ModelPart<number> = {
  name: "drag epoch",
  compute: (evaluation) =>
    evaluation.model.conventions.drag === "full"
      ? evaluation.once(opticalDepthPart).crossing("drag", 1)
      : Math.log1p(eisensteinHuDragRedshiftOf(evaluation.model)),
};

/**
 * z_drag: the redshift at which the drag depth is one and the baryons are let go; by the fit of Eisenstein & Hu 1998 where
 * `conventions.drag` says so.
 *
 * Method: Brent's root on the drag depth within one step of the history. Accuracy 1e-10.
 * Source: Hu & Sugiyama 1996; Eisenstein & Hu 1998 (definition).
 * @example dragRedshift(evaluation) // 1059.9 near Planck's parameters
 */
export function dragRedshift(evaluation: ModelEvaluation): number {
  return Math.expm1(evaluation.once(dragEpochPart));
}

export const dragRedshiftQuantity = historyQuantity({
  name: "dragRedshift",
  symbol: "z_drag",
  unit: "",
  description: "Redshift of the drag epoch: drag depth one",
  equation: String.raw`\tau_d(z_\mathrm{drag}) = 1`,
  method: "root of the drag depth, full computation",
  accuracy: 1e-10,
  methodBesideFits: "",
  steps: ["drag"],
  needsHistory: (model) => model.conventions.drag === "full",
  sources: ["huSugiyama1996", "eisensteinHu1998", "planck2018Parameters"],
  compute: dragRedshift,
});
