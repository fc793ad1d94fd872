import { NoAnswerError } from "../errors";
import { findRoot, type NumericalResult } from "../numerics";
import { decelerationTerm } from "./decelerationAt";
import { expansionPart, type ModelEvaluation, type ModelQuantity, turningRedshiftPart } from "./expansion";
import { turnaroundRedshiftPart } from "./turnaround";

const where = "accelerationRedshift";
/** The search in ln a: from long before dark energy of any kind to long after today. */
const earliest = -16;
const latest = 30;
const points = 460;

/**
 * Redshift at which the expansion turned from slowing down to speeding up: q = 0.
 *
 * sum (rho + 3 P) = 0, neutrino pressure by the exact Fermi-Dirac integral. The latest such turn up to today; where there is
 * none, the first one still to come (below 0). A model that never turns: NoAnswerError.
 *
 * Method: scan in ln a from -16 to 30 in steps of 0.1, then Brent's method. Accuracy 1e-12 in 1+z.
 * Source: common practice, no source (second Friedmann equation).
 * @example accelerationRedshift(evaluation).value // 0.63 near Planck's parameters
 */
export function accelerationRedshift(evaluation: ModelEvaluation): NumericalResult {
  const expansion = evaluation.once(expansionPart);
  const turning = evaluation.once(turningRedshiftPart);
  const turnaround = evaluation.once(turnaroundRedshiftPart);
  const first = turning === undefined ? earliest : Math.max(earliest, -Math.log1p(turning));
  const last = turnaround === undefined ? latest : Math.min(latest, -Math.log1p(turnaround));
  // Divided by a, matter's growth, so that no end of the range underflows.
  const term = (s: number) => {
    const a = Math.exp(s);
    return decelerationTerm(expansion, a) / a;
  };
  let before = first;
  let beforeSlows = term(first) > 0;
  let found: [number, number] | undefined;
  for (let i = 1; i <= points; i++) {
    const s = first + ((last - first) * i) / points;
    const slows = term(s) > 0;
    if (beforeSlows && !slows) {
      if (before > 0 && found !== undefined) break;
      found = [before, s];
      if (before > 0) break;
    }
    before = s;
    beforeSlows = slows;
  }
  if (found === undefined) {
    throw new NoAnswerError({
      where,
      reason: beforeSlows
        ? "the expansion of this model never turns from slowing down to speeding up"
        : "the expansion of this model speeds up at all times, it never turned",
    });
  }
  const [low, high] = found;
  const finite = Number.isFinite(term(high)) ? high : low;
  const root = findRoot(term, low, finite);
  const value = Math.expm1(-root.value);
  return { ...root, value, error: (1 + value) * (root.error + 4 * Number.EPSILON) };
}

export const accelerationRedshiftQuantity: ModelQuantity = {
  name: where,
  symbol: "z_acc",
  unit: "",
  arguments: [],
  description: "Redshift at which the expansion turns from slowing down to speeding up",
  equation: String.raw`\sum_X (\rho_X + 3 P_X) = 0`,
  method: "Brent's method on the sum of energy and three times pressure, exact for neutrinos",
  accuracy: 1e-12,
  sources: ["hogg1999"],
  compute: (evaluation) => accelerationRedshift(evaluation),
};
