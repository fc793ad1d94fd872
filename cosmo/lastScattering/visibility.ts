import type { ModelEvaluation, ModelPart } from "../expansion";
import { findRoot } from "../numerics";
import { pastRedshiftArgument } from "../quantity";
import { historyQuantity } from "./historyQuantity";
import { unitDepthPart } from "./lastScatteringRedshift";
import { opticalDepthPart } from "./opticalDepthHistory";

/**
 * Visibility function: the probability density that a photon of the background last scattered at z, reionization excluded.
 *
 * g(z) = (dtau/dz) e^-tau, per unit z; its integral over z is one.
 *
 * @param z redshift, 0 or more. Accuracy 5e-9. Source: Peebles 1968; Jones & Wyse 1985.
 */
export function visibility(evaluation: ModelEvaluation, z: number): number {
  return visibilityAt(evaluation, Math.log1p(z));
}

function visibilityAt(evaluation: ModelEvaluation, t: number): number {
  const depths = evaluation.once(opticalDepthPart);
  return depths.rate(t) * Math.exp(-depths.depth("photon", t) - t);
}

/** ln(1+z) and height of the visibility's maximum. */
const visibilityPeakPart: ModelPart<{ t: number; height: number }> = {
  name: "visibility peak",
  compute: (evaluation) => {
    const depths = evaluation.once(opticalDepthPart);
    // Half the distance over which the difference quotient reaches; its error falls with the fourth power.
    const step = 2e-3;
    const logRate = (t: number) => Math.log(depths.rate(t));
    // d ln g/dt = d ln(dtau/dt)/dt - dtau/dt - 1: a root finds the maximum to full digits, a search for it only to half.
    const slope = (t: number) => {
      const near = logRate(t + step) - logRate(t - step);
      const far = logRate(t + 2 * step) - logRate(t - 2 * step);
      return (8 * near - far) / (12 * step) - depths.rate(t) - 1;
    };
    const around = evaluation.once(unitDepthPart);
    const t = findRoot(slope, around - 0.15, around + 0.15).value;
    return { t, height: visibilityAt(evaluation, t) };
  },
};

/**
 * Redshift at which the visibility function, per unit z, is largest.
 *
 * Method: root of d ln g/d ln(1+z), the rate's slope by central differences of fourth order. Accuracy 5e-9.
 * @example visibilityPeakRedshift(evaluation) // 1088 near Planck's parameters
 */
export function visibilityPeakRedshift(evaluation: ModelEvaluation): number {
  return Math.expm1(evaluation.once(visibilityPeakPart).t);
}

/**
 * Full width of the visibility function at half its maximum, z_hi - z_lo.
 *
 * Method: Brent's root on either side of the peak. Accuracy 5e-9.
 */
export function visibilityWidth(evaluation: ModelEvaluation): number {
  const { low, high } = visibilityHalfHeights(evaluation);
  return high - low;
}

/** The two redshifts at which the visibility function is half its maximum. */
export function visibilityHalfHeights(evaluation: ModelEvaluation): { low: number; high: number } {
  const { t: peak, height } = evaluation.once(visibilityPeakPart);
  const above = (t: number) => visibilityAt(evaluation, t) / height - 0.5;
  const low = findRoot(above, peak - 0.3, peak).value;
  const high = findRoot(above, peak, peak + 0.3).value;
  return { low: Math.expm1(low), high: Math.expm1(high) };
}

/**
 * Redshift with half of the last scatterings on either side: tau = ln 2.
 */
export function visibilityMedianRedshift(evaluation: ModelEvaluation): number {
  return Math.expm1(evaluation.once(opticalDepthPart).crossing("photon", Math.LN2));
}

export const visibilityQuantity = historyQuantity({
  name: "visibility",
  symbol: "g",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Visibility function: density of last scatterings per unit redshift",
  equation: String.raw`g(z) = \frac{d\tau}{dz}\,e^{-\tau}`,
  method: "from the optical depth and its rate",
  accuracy: 5e-9,
  sources: ["huSugiyama1996"],
  compute: (evaluation, [z]) => visibility(evaluation, z!),
});

export const visibilityPeakRedshiftQuantity = historyQuantity({
  name: "visibilityPeakRedshift",
  symbol: "z_peak",
  unit: "",
  description: "Redshift at which the visibility function is largest",
  equation: String.raw`g'(z_\mathrm{peak}) = 0`,
  method: "root of the logarithmic slope",
  accuracy: 5e-9,
  sources: ["huSugiyama1996"],
  compute: visibilityPeakRedshift,
});

export const visibilityWidthQuantity = historyQuantity({
  name: "visibilityWidth",
  symbol: "Δz",
  unit: "",
  description: "Full width of the visibility function at half its maximum",
  equation: String.raw`\Delta z = z_\mathrm{hi} - z_\mathrm{lo}, \quad g = \tfrac12 g_\mathrm{max}`,
  method: "roots on either side of the peak",
  accuracy: 2e-9,
  sources: ["huSugiyama1996"],
  compute: visibilityWidth,
});

export const visibilityMedianRedshiftQuantity = historyQuantity({
  name: "visibilityMedianRedshift",
  symbol: "z_med",
  unit: "",
  description: "Redshift with half of the last scatterings on either side",
  equation: String.raw`\tau(z_\mathrm{med}) = \ln 2`,
  method: "root of the optical depth",
  accuracy: 1e-10,
  sources: ["huSugiyama1996"],
  compute: visibilityMedianRedshift,
});
