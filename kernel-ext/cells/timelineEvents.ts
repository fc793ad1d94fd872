import { NoAnswerError } from "../../cosmo/errors";
import { type ModelEvaluation, redshiftAtTemperature } from "../../cosmo/expansion";
import { findRoot } from "../../cosmo/numerics";
import type { QuantityValue } from "../../cosmo/quantity";
import { ionizationHistoryPart } from "../../cosmo/recombination";
import type { ModelNumbers } from "../../cosmo/solve";

/** An event of the history, and how its redshift is found. */
export interface TimelineEvent {
  readonly event: string;
  /** As it stands in the chart. */
  readonly label: string;
  /** What puts it where it is. */
  readonly definition: string;
  /** The redshift, and the quantities behind it for notes and sources; NoAnswerError where the model has no such event. */
  readonly find: (numbers: ModelNumbers) => { redshift: number; behind: readonly QuantityValue[] };
}

/** Temperature of nucleosynthesis, K: common practice, no source. */
const nucleosynthesisTemperature = 1e9;

/** Radiation temperature above which everything is ionized, K. */
const ionizedTemperature = 1e5;

/** An event whose redshift is a quantity of the register. */
function byQuantity(event: string, label: string, definition: string, name: string): TimelineEvent {
  return {
    event,
    label,
    definition,
    find: (numbers) => {
      const value = numbers.quantity(name);
      return { redshift: value.value, behind: [value] };
    },
  };
}

/** The latest redshift at which something that falls with time passes one half. */
function halfway(evaluation: ModelEvaluation, what: string, ionized: (t: number) => number): number {
  const hottest = Math.log(ionizedTemperature / evaluation.model.photonTemperature);
  if (!(ionized(0) < 0.5 && ionized(hottest) > 0.5)) {
    throw new NoAnswerError({ where: "timelineCell", reason: `${what} never passes one half in this model` });
  }
  return Math.expm1(findRoot((t) => ionized(t) - 0.5, 0, hottest).value);
}

function heliumHalfway(numbers: ModelNumbers, what: string, ionized: (state: HeliumState) => number) {
  const { evaluation } = numbers;
  const history = evaluation.once(ionizationHistoryPart);
  if (!(evaluation.model.helium > 0)) {
    throw new NoAnswerError({ where: "timelineCell", reason: "this model has no helium (helium is 0)" });
  }
  const redshift = halfway(evaluation, what, (t) => ionized(history.helium(t)));
  return { redshift, behind: [numbers.quantity("residualIonizedFraction", redshift)] };
}

interface HeliumState {
  readonly once: number;
  readonly twice: number;
}

/**
 * The redshift, up to today, at which dark energy overtook matter for the last time.
 *
 * Method: scan in ln(1+z) from today to 1 + z = 1e6 in steps of 0.02, then Brent's method. Today's matter still denser: NoAnswerError.
 */
function darkEnergyEquality(numbers: ModelNumbers): number {
  const excess = (t: number) => {
    const z = Math.expm1(t);
    return numbers.value("darkEnergyFractionAt", z) - numbers.value("matterFractionAt", z);
  };
  if (!(excess(0) > 0)) {
    throw new NoAnswerError({ where: "timelineCell", reason: "dark energy is not denser than matter today" });
  }
  const step = 0.02;
  const last = Math.log(1e6);
  for (let t = step; t < last; t += step) {
    if (excess(t) <= 0) return Math.expm1(findRoot(excess, t - step, t).value);
  }
  throw new NoAnswerError({
    where: "timelineCell",
    reason: "dark energy was denser than matter at all redshifts up to 1e6",
  });
}

/** Everything that may happen, from nucleosynthesis to today. */
export const timelineEvents: readonly TimelineEvent[] = [
  {
    event: "nucleosynthesis",
    label: "nucleosynthesis",
    definition: "T = 10⁹ K (common practice, no source)",
    find: ({ evaluation }) => ({ redshift: redshiftAtTemperature(evaluation, nucleosynthesisTemperature), behind: [] }),
  },
  {
    event: "helium once ionized",
    label: "He⁺⁺ to He⁺",
    definition: "half of the helium is He⁺⁺",
    find: (numbers) => heliumHalfway(numbers, "the share of He⁺⁺ in helium", ({ twice }) => twice),
  },
  byQuantity("matter-radiation equality", "equality", "equal densities of matter and radiation", "equalityRedshift"),
  {
    event: "helium neutral",
    label: "He⁺ to He",
    definition: "half of the helium is neutral",
    find: (numbers) => heliumHalfway(numbers, "the ionized share of helium", ({ once, twice }) => once + twice),
  },
  {
    event: "hydrogen recombination",
    label: "hydrogen recombination",
    definition: "x_e = 1/2",
    find: (numbers) => {
      const history = numbers.evaluation.once(ionizationHistoryPart);
      const redshift = halfway(numbers.evaluation, "x_e", (t) => history.ionized(t));
      return { redshift, behind: [numbers.quantity("residualIonizedFraction", redshift)] };
    },
  },
  byQuantity("last scattering", "last scattering", "optical depth one, z_*", "lastScatteringRedshift"),
  byQuantity("drag epoch", "drag epoch", "drag depth one, z_drag", "dragRedshift"),
  byQuantity("reionization", "reionization", "middle of hydrogen's reionization", "reionizationRedshift"),
  byQuantity("acceleration", "acceleration", "deceleration is zero", "accelerationRedshift"),
  {
    event: "dark energy equality",
    label: "dark energy equality",
    definition: "equal densities of dark energy and matter",
    find: (numbers) => ({ redshift: darkEnergyEquality(numbers), behind: [] }),
  },
  { event: "today", label: "today", definition: "z = 0", find: () => ({ redshift: 0, behind: [] }) },
];
