import type { Computed } from "../quantity";
import { expansionPart, type ModelEvaluation, type ModelQuantity } from "./expansion";
import { redshiftNodesPart } from "./redshiftNodes";
import { askedValue, type Branch, requireAsked, solveRedshift } from "./solveRedshift";

const asked = askedValue("rate", "H", "km/s/Mpc");

/**
 * Redshift, 0 or more, at which the expansion rate was H.
 *
 * @param rate km/s/Mpc; one that this model never had: NoAnswerError, with the rates that it had.
 * @param branch where w < -1 the rate has a minimum in the past: `near` is on this side of it, `far` beyond. Without a branch, two
 * answers are refused with both.
 * Method and accuracy as {@link solveRedshift}; 1e-13 of 1+z away from the minimum. Source: Hogg 1999, eq. 14, inverted.
 * @example redshiftAtHubbleRate(evaluation, 100).value
 */
export function redshiftAtHubbleRate(
  evaluation: ModelEvaluation,
  rate: number,
  branch?: Branch,
  where = "redshiftAtHubbleRate",
): Computed {
  requireAsked(asked, rate, where);
  const expansion = evaluation.once(expansionPart);
  const nodes = evaluation.once(redshiftNodesPart);
  const at = (s: number) => 100 * expansion.rate(Math.exp(-s));
  return solveRedshift(
    { where, subject: "expansion rate", unit: "km/s/Mpc", nodes, values: nodes.map(at), at },
    rate,
    branch,
  );
}

function describe(branch?: Branch): ModelQuantity {
  const name = `redshiftAtHubbleRate${branch === undefined ? "" : `.${branch}`}`;
  return {
    name,
    symbol: "z",
    unit: "",
    arguments: [asked],
    description: `Redshift at which the expansion rate was H${branch === undefined ? "" : `, the ${branch} one of two`}`,
    equation: "H(z) = H",
    method: "Brent's method on the expansion rate",
    accuracy: 1e-10,
    sources: ["hogg1999", "brent1973"],
    compute: (evaluation, [rate]) => redshiftAtHubbleRate(evaluation, rate!, branch, name),
  };
}

export const redshiftAtHubbleRateQuantities: readonly ModelQuantity[] = [describe(), describe("near"), describe("far")];
