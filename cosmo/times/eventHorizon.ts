import { NoAnswerError, NotConvergedError } from "../errors";
import {
  backgroundIntegral,
  type Expansion,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireRedshift,
  turnaroundRedshiftPart,
  unitHubbleDistance,
} from "../expansion";
import type { NumericalResult } from "../numerics";
import { redshiftArgument } from "../quantity";

const where = "eventHorizon";

/**
 * Comoving event horizon at a redshift, Mpc: how far light that leaves then will ever come.
 *
 * d_e(z) = c int_a^inf da/(a^2 H).
 *
 * @param z redshift above -1. It is finite only where the expansion speeds up for ever: dark energy positive and wa > 0, or wa = 0
 * and w0 < -1/3; or a formula or table with w below -1/3 where it is held, from a = 1000 on. Otherwise, or where the model falls back: NoAnswerError.
 * Method: adaptive Gauss-Kronrod in ln a up to today; beyond, for wa = 0 in u = a^((1 + 3 w0)/2), which brings infinity to 0
 * with a smooth integrand, for wa > 0 in ln a until the integrand has fallen by 1e-20. Accuracy 2e-13.
 * Source: Rindler's definition; common practice, no source.
 * @example eventHorizon(evaluation, 0).value // 5114 near Planck's parameters
 */
export function eventHorizon(evaluation: ModelEvaluation, z: number): NumericalResult {
  requireRedshift(evaluation, z, where);
  requireHorizon(evaluation);
  const expansion = evaluation.once(expansionPart);
  const { w0, wa } = evaluation.model.darkEnergy;
  const perFold = (s: number) => {
    const a = Math.exp(s);
    return a / Math.sqrt(expansion.squaredTerm(a));
  };
  const start = -Math.log1p(z);
  // A w that follows a formula or a table is no power law on its way: only the integrand itself tells where it has fallen.
  const future =
    wa > 0 || expansion.lateHeldState() !== undefined
      ? backgroundIntegral(where, unitHubbleDistance, perFold, Math.max(0, start), endOfFuture(perFold, start))
      : futureAtConstantState(expansion, -(1 + 3 * w0) / 2, Math.max(0, start));
  if (start >= 0) return future;
  const past = backgroundIntegral(where, unitHubbleDistance, perFold, start, 0, {
    breakpoints: expansion.kinks.map((t) => -t),
  });
  return {
    value: past.value + future.value,
    error: past.error + future.error,
    evaluations: past.evaluations + future.evaluations,
    converged: true,
  };
}

function requireHorizon(evaluation: ModelEvaluation): void {
  const turnaround = evaluation.once(turnaroundRedshiftPart);
  if (turnaround !== undefined) {
    throw new NoAnswerError({
      where,
      reason: `this model stops expanding at z = ${turnaround.toPrecision(8)} and falls back, so its future has no a to infinity`,
    });
  }
  const { darkEnergy, darkEnergyDensity } = evaluation.model;
  const { wa } = darkEnergy;
  const held = evaluation.once(expansionPart).lateHeldState();
  const w0 = held ?? darkEnergy.w0;
  if (!(darkEnergyDensity > 0 && (wa > 0 || (wa === 0 && w0 < -1 / 3)))) {
    const why = !(darkEnergyDensity > 0)
      ? "there is no dark energy to speed the expansion up"
      : wa < 0
        ? "with wa below 0 the dark energy fades in the far future"
        : held === undefined
          ? "with w0 at or above -1/3 the expansion never speeds up"
          : "with w at or above -1/3 where it is held the expansion does not speed up for ever";
    throw new NoAnswerError({
      where,
      reason: `the integral to the infinite future diverges, light reaches everything in the end: ${why}`,
    });
  }
}

/**
 * The integral from e^start to infinity for constant w0, with p = -(1 + 3 w0)/2 and u = a^-p:
 * c int_0^u du/{p sqrt[omega_DE + omega_k u^2 + (the rest of a^2 H^2) u^2]}, every term finite down to u = 0.
 */
function futureAtConstantState(expansion: Expansion, p: number, start: number): NumericalResult {
  const integrand = (u: number) => {
    const inverse = u ** (1 / p);
    // Beyond a = 1e60 nothing but dark energy and curvature is left above rounding, and a itself may leave the range of numbers.
    const rest =
      inverse < 1e-60
        ? 0
        : inverse * (expansion.baryonsAndCold + inverse * (expansion.radiation + expansion.neutrinoTerm(1 / inverse)));
    return 1 / (p * Math.sqrt(expansion.darkEnergy + u * u * (expansion.curvatureDensity + rest)));
  };
  return backgroundIntegral(where, unitHubbleDistance, integrand, 0, Math.exp(-p * start));
}

/** The ln a at which the integrand has fallen to 1e-20 of its largest; beyond, it falls ever faster. */
function endOfFuture(perFold: (s: number) => number, start: number): number {
  let largest = perFold(start);
  for (let s = Math.max(0, start); s < 700; s += 0.25) {
    const here = perFold(s);
    largest = Math.max(largest, here);
    if (here < 1e-20 * largest) return s;
  }
  throw new NotConvergedError({ where, reason: "the dark energy takes over later than at a = e^700" });
}

export const eventHorizonQuantity: ModelQuantity = {
  name: where,
  symbol: "d_e",
  unit: "Mpc",
  arguments: [redshiftArgument],
  description: "Comoving event horizon at a redshift",
  equation: String.raw`d_e(z) = c \int_{1/(1+z)}^{\infty} \frac{da}{a^2 H}`,
  method: "adaptive Gauss-Kronrod quadrature, infinity brought to a finite point",
  accuracy: 2e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => eventHorizon(evaluation, z!),
};
