import { lightSpeed } from "../constants";
import { DomainError, NoAnswerError } from "../errors";
import { expansionPart, type ModelEvaluation, type ModelPart, type ModelQuantity } from "../expansion";
import { hundredKmPerSecondPerMpc } from "../model";
import { findRoot, integrate } from "../numerics";
import { pastRedshiftArgument } from "../quantity";
import {
  gasPart,
  historyErrorFloor,
  recombinationNotes,
  recombinationSources,
  reionizationProfile,
  residualIonizedFraction,
} from "../recombination";

/** Where the integral for the depth ends; the profile is over long before. */
const depthLimit = 50;

/** tau of a profile centered at z_re, the tanh terms alone. */
function depthOf(evaluation: ModelEvaluation, middle: number): number {
  const gas = evaluation.once(gasPart);
  const expansion = evaluation.once(expansionPart);
  const scattering = (lightSpeed * gas.constants.thomsonCrossSection * gas.hydrogenDensity) / hundredKmPerSecondPerMpc;
  const integrand = (z: number) => {
    const density = (1 + z) ** 2 * reionizationProfile(z, middle, gas.heliumRatio);
    return (scattering * density) / expansion.rate(1 / (1 + z));
  };
  const breakpoints = [3.5, middle - 2, middle, middle + 2].filter((z) => z > 0 && z < depthLimit);
  return integrate(integrand, 0, depthLimit, { breakpoints, relative: 1e-11 }).value;
}

/** z_re of the model: given, or from the depth that was given; undefined where the model has no reionization. */
export const reionizationRedshiftPart: ModelPart<number | undefined> = {
  name: "reionization",
  compute: (evaluation) => {
    const { reionizationRedshift, reionizationDepth } = evaluation.model;
    if (reionizationDepth === undefined) {
      if (reionizationRedshift !== undefined && !(reionizationRedshift < depthLimit - 5)) {
        throw new DomainError({
          where: "reionization",
          argument: "reionizationRedshift",
          rule: `must be below ${depthLimit - 5}`,
          value: reionizationRedshift,
        });
      }
      return reionizationRedshift;
    }
    const least = 0.01;
    const missing = (z: number) => depthOf(evaluation, z) - reionizationDepth;
    if (missing(least) > 0 || missing(depthLimit - 5) < 0) {
      throw new DomainError({
        where: "reionization",
        argument: "reionizationDepth",
        rule: `must lie between ${depthOf(evaluation, least).toPrecision(4)} and ${depthOf(evaluation, depthLimit - 5).toPrecision(4)} in this model`,
        value: reionizationDepth,
      });
    }
    return findRoot(missing, least, depthLimit - 5, { relative: 1e-12 }).value;
  },
};

function required(evaluation: ModelEvaluation, where: string): number {
  const middle = evaluation.once(reionizationRedshiftPart);
  if (middle === undefined) {
    throw new NoAnswerError({
      where,
      reason: "this model states no reionization",
      hint: "give reionizationDepth or reionizationRedshift",
    });
  }
  return middle;
}

/**
 * x_e(z) with everything: recombination and, where the model states it, reionization.
 *
 * x_e = residual of recombination + reionization profile (reionizationProfile.ts).
 *
 * @param z redshift, 0 or more.
 * @example ionizedFraction(evaluation, 0) // 1.16 with a reionizationDepth, 2e-4 without
 */
export function ionizedFraction(evaluation: ModelEvaluation, z: number): number {
  const middle = evaluation.once(reionizationRedshiftPart);
  const residual = residualIonizedFraction(evaluation, z);
  return middle === undefined
    ? residual
    : residual + reionizationProfile(z, middle, evaluation.once(gasPart).heliumRatio);
}

export const ionizedFractionQuantity: ModelQuantity = {
  name: "ionizedFraction",
  symbol: "x_e",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Free electrons a hydrogen nucleus, recombination and reionization",
  equation: String.raw`x_e(z) = x_e^\mathrm{rec}(z) + x_e^\mathrm{re}(z)`,
  method: "the recombination tier plus the tanh profile of reionization",
  accuracy: 5e-9,
  sources: (model) => ["lewis2008", ...recombinationSources(model)],
  usesHistory: true,
  errorFloor: historyErrorFloor(5e-9),
  notes: (evaluation, [z]) => [
    ...recombinationNotes(evaluation, z),
    ...(evaluation.once(reionizationRedshiftPart) === undefined
      ? [{ level: "note" as const, text: "no reionization stated: recombination alone" }]
      : []),
  ],
  compute: (evaluation, [z]) => ({ value: ionizedFraction(evaluation, z!), error: 0 }),
};

export const reionizationRedshiftQuantity: ModelQuantity = {
  name: "reionizationRedshift",
  symbol: "z_re",
  unit: "",
  arguments: [],
  description: "Middle of the reionization of hydrogen",
  equation: String.raw`\tau(z_\mathrm{re}) = \tau`,
  method: "given, or root of the depth of the tanh profile",
  accuracy: 1e-9,
  sources: ["lewis2008"],
  compute: (evaluation) => {
    const value = required(evaluation, "reionizationRedshift");
    return { value, error: evaluation.model.reionizationDepth === undefined ? 0 : 1e-11 * value };
  },
};

export const reionizationDepthQuantity: ModelQuantity = {
  name: "reionizationDepth",
  symbol: "τ_re",
  unit: "",
  arguments: [],
  description: "Optical depth of reionization, the tanh terms alone, from redshift 0 to 50",
  equation: String.raw`\tau_\mathrm{re} = \int_0^{50} \frac{c\,\sigma_T n_\mathrm{H} x_\mathrm{re}\,dz}{H\,(1+z)}`,
  method: "given, or adaptive Gauss-Kronrod quadrature of the tanh profile",
  accuracy: 1e-9,
  sources: ["lewis2008"],
  compute: (evaluation) => {
    const given = evaluation.model.reionizationDepth;
    if (given !== undefined) return { value: given, error: 0 };
    const value = depthOf(evaluation, required(evaluation, "reionizationDepth"));
    return { value, error: 1e-11 * value };
  },
};
