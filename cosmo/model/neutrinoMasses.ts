import { DomainError } from "../errors";
import { findRoot } from "../numerics";
import type { NeutrinoOrdering } from "./givens";

/** m2^2 - m1^2 in eV^2 (oscillation data, memory). */
export const smallSplitting = 7.42e-5;

/** m3^2 - m1^2 (normal) or m2^2 - m3^2 (inverted) in eV^2 (oscillation data, memory). */
export const largeSplitting = 2.51e-3;

/** The three masses above the lightest, m0, in eV, largest first. */
function massesAbove(lightest: number, ordering: "normal" | "inverted"): [number, number, number] {
  const base = lightest * lightest;
  if (ordering === "normal") {
    return [Math.sqrt(base + largeSplitting), Math.sqrt(base + smallSplitting), lightest];
  }
  return [Math.sqrt(base + largeSplitting), Math.sqrt(base + largeSplitting - smallSplitting), lightest];
}

/**
 * Three neutrino masses with a given sum.
 *
 * `oneMassive`: (sum, 0, 0); `degenerate`: sum/3 each; `normal`: m2^2 - m1^2 = 7.42e-5, m3^2 - m1^2 = 2.51e-3 eV^2;
 * `inverted`: m2^2 - m1^2 = 7.42e-5, m2^2 - m3^2 = 2.51e-3 eV^2 (splittings from memory).
 *
 * @param sum sum of the masses, eV; 0 or more, and not below the ordering's minimum (0.0587 normal, 0.0995 inverted).
 * @returns masses in eV, largest first; the sum is met to 1e-14.
 * @example neutrinoMassesFromSum(0.12, "degenerate") // [0.04, 0.04, 0.04]
 */
export function neutrinoMassesFromSum(sum: number, ordering: NeutrinoOrdering, where = "neutrinos"): number[] {
  if (ordering === "oneMassive") return [sum, 0, 0];
  if (ordering === "degenerate") return [sum / 3, sum / 3, sum / 3];
  const total = (lightest: number) => massesAbove(lightest, ordering).reduce((a, b) => a + b, 0);
  const minimum = total(0);
  if (!(sum >= minimum)) {
    throw new DomainError({
      where,
      argument: "neutrinos.massSum",
      rule: `must be at least ${minimum.toFixed(6)} eV, the least that the ${ordering} ordering allows`,
      value: sum,
    });
  }
  if (sum === minimum) return massesAbove(0, ordering);
  const lightest = findRoot((mass) => total(mass) - sum, 0, sum).value;
  return massesAbove(lightest, ordering);
}
