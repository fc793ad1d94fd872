import type { FlatGivens } from "../model";

/** Conventions by which a published fit stands in place of the full computation. */
const fitConventions = ["conventions.lastScattering", "conventions.drag", "conventions.soundHorizon"];

/**
 * Whether the batch engine marches models with these shared givens: not with a published fit in place of the full computation,
 * nor with dark energy by a formula or a table.
 */
export function engineServes(shared: FlatGivens): boolean {
  if (fitConventions.some((name) => (shared.get(name) ?? "full") !== "full")) return false;
  return !shared.has("darkEnergy.equation") && !shared.has("darkEnergy.table");
}
