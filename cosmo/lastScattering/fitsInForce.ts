import { aubourgFit, briedenFit, eisensteinHuFit, huSugiyamaFit, type PublishedFit } from "../fits";
import type { ClosedModel } from "../model";

/** A step of the computation that a convention may replace by a published fit. */
export type ReplaceableStep = "lastScattering" | "drag" | "soundHorizon" | "dragSoundHorizon";

/** A fit that stands in for a step under the model's conventions. */
export interface FitInForce {
  readonly fit: PublishedFit;
  /** What it gives: "z_*". */
  readonly gives: string;
  /** The convention that asked for it. */
  readonly convention: "conventions.lastScattering" | "conventions.drag" | "conventions.soundHorizon";
}

/** The fits in force among the steps that a number hangs on. */
export function fitsInForce(model: ClosedModel, steps: readonly ReplaceableStep[]): readonly FitInForce[] {
  const { lastScattering, drag, soundHorizon } = model.conventions;
  const inForce: FitInForce[] = [];
  const add = (fit: PublishedFit, gives: string, convention: FitInForce["convention"]) =>
    inForce.push({ fit, gives, convention });
  const direct = givesDragSoundHorizon(model);
  if (steps.includes("lastScattering") && lastScattering === "huSugiyama1996") {
    add(huSugiyamaFit, "z_*", "conventions.lastScattering");
  }
  if (steps.includes("drag") && drag === "eisensteinHu1998" && !(direct && steps.includes("dragSoundHorizon"))) {
    add(eisensteinHuFit, "z_drag", "conventions.drag");
  }
  if (steps.includes("soundHorizon") && soundHorizon === "eisensteinHu1998") {
    add(eisensteinHuFit, "r_s", "conventions.soundHorizon");
  }
  if (steps.includes("dragSoundHorizon") && direct) {
    add(soundHorizon === "aubourg2015" ? aubourgFit : briedenFit, "r_drag", "conventions.soundHorizon");
  }
  return inForce;
}

/** Whether the conventions give r_drag by a fit of its own, without z_drag. */
export function givesDragSoundHorizon(model: ClosedModel): boolean {
  const { soundHorizon } = model.conventions;
  return soundHorizon === "aubourg2015" || soundHorizon === "brieden2023";
}

/** The method line of a number with its fits: what is left of the computation, and which fits stand in. */
export function methodWithFits(left: string, inForce: readonly FitInForce[]): string | undefined {
  if (inForce.length === 0) return undefined;
  const fits = inForce.map(({ fit, gives, convention }) => `${gives} by the fit of ${fit.label} (${convention})`);
  return [left, ...fits].filter((piece) => piece !== "").join("; ");
}
