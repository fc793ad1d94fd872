import { NoAnswerError } from "../errors";
import {
  askedValue,
  expansionPart,
  type ModelEvaluation,
  type ModelQuantity,
  requireAsked,
  turnaroundRedshiftPart,
  unitHubbleTime,
} from "../expansion";
import { findRoot } from "../numerics";
import type { Computed } from "../quantity";
import { ageAt } from "./ageAt";

const where = "redshiftAtAge";
const asked = askedValue("age", "t", "Gyr");
/** ln(1+z) of the hottest past and of the coldest future that are searched: closer to -1 a redshift has no digits left. */
const hottest = 60;
const coldest = -20;

/**
 * Redshift at which the universe had an age: below 0 for an age still to come.
 *
 * @param age Gyr, above 0. One that is not reached before the expansion stops, or a model without a Big Bang: NoAnswerError.
 * Method: Brent's method in ln(1+z) on {@link ageAt}, the bracket doubled from today. Accuracy 1e-12 of 1+z.
 * Source: Hogg 1999, eq. 30, inverted.
 * @example redshiftAtAge(evaluation, 1).value // 5.7 near Planck's parameters
 */
export function redshiftAtAge(evaluation: ModelEvaluation, age: number): Computed {
  requireAsked(asked, age, where);
  if (age === 0) {
    throw new NoAnswerError({
      where,
      reason: "the age 0 belongs to no redshift: it is the limit of infinite redshift",
    });
  }
  const miss = (s: number) => ageAt(evaluation, Math.expm1(s), where).value - age;
  const today = miss(0);
  const turnaround = evaluation.once(turnaroundRedshiftPart);
  const limit = today > 0 ? hottest : turnaround === undefined ? coldest : Math.log1p(turnaround) * (1 - 1e-8);
  let near = 0;
  let far = 0;
  for (let step = Math.sign(limit) * 0.5; ; step *= 2) {
    far = Math.abs(near + step) < Math.abs(limit) ? near + step : limit;
    if (miss(far) > 0 !== today > 0) break;
    if (far === limit) {
      throw new NoAnswerError({
        where,
        reason:
          limit > 0
            ? `at the age ${age} Gyr the redshift lies beyond 1e26`
            : turnaround === undefined
              ? `at the age ${age} Gyr the redshift lies so close to -1 that it has no digits left`
              : `the age ${age} Gyr is not reached before this model stops expanding, at z = ${turnaround.toPrecision(8)}`,
      });
    }
    near = far;
  }
  const root = findRoot(miss, near, far);
  const z = Math.expm1(root.value);
  // d ln(1+z)/dt = -H: the age's own error, as a change of ln(1+z).
  const rate = evaluation.once(expansionPart).rate(1 / (1 + z)) / unitHubbleTime;
  const error = root.error + rate * ageAt(evaluation, z, where).error;
  return { value: z, error: (1 + z) * error };
}

export const redshiftAtAgeQuantity: ModelQuantity = {
  name: where,
  symbol: "z",
  unit: "",
  arguments: [asked],
  description: "Redshift at which the universe had an age",
  equation: "t(z) = t",
  method: "Brent's method in ln(1+z) on the age",
  accuracy: 1e-10,
  sources: ["hogg1999", "brent1973"],
  compute: (evaluation, [age]) => redshiftAtAge(evaluation, age!),
};
