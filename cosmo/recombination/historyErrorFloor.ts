import type { ClosedModel } from "../model";

/** A twentieth of the stated bound covers what was measured against the references in 99.5% of their rows. */
const shareOfBound = 1 / 20;

/** Saha equilibrium is a root found to rounding; its exponents carry a rounding error of their own size. */
const equilibriumError = 3e-13;

/**
 * The least relative error to state for a quantity that hangs on the history, by tier.
 *
 * @param accuracy the quantity's stated bound.
 */
export function historyErrorFloor(accuracy: number): (model: ClosedModel) => number {
  return (model) => (model.recombination === "saha" ? Math.min(equilibriumError, accuracy) : accuracy * shareOfBound);
}
