import type { ModelGivens } from "../model";

/** Conventions by which a published fit stands in place of the full computation. */
const fitConventions = ["lastScattering", "drag", "soundHorizon"] as const;

/**
 * Whether the batch engine marches models with these shared givens: not with a published fit in place of the full computation,
 * nor with dark energy by a formula or a table.
 */
export function engineServes(shared: ModelGivens | undefined): boolean {
  if (fitConventions.some((name) => (shared?.conventions?.[name] ?? "full") !== "full")) return false;
  return shared?.darkEnergy?.equation === undefined && shared?.darkEnergy?.table === undefined;
}
