import { DomainError, NoAnswerError } from "../errors";
import { redshiftArgument } from "../quantity";
import { expansionPart, type ModelEvaluation, turningRedshiftPart } from "./expansion";
import { turnaroundRedshiftPart } from "./turnaround";

const closedHint = "curvature is too negative, or dark energy too large, for this matter density";

/**
 * Refuses a redshift that this model does not have: not a number above -1, at or beyond the turning point of a closed model that
 * bounced, or after the expansion of a model that falls back.
 */
export function requireRedshift(evaluation: ModelEvaluation, z: number, where: string): void {
  if (!redshiftArgument.accepts(z)) {
    throw new DomainError({ where, argument: "redshift", rule: redshiftArgument.rule, value: z });
  }
  const turning = evaluation.once(turningRedshiftPart);
  if (turning !== undefined && !(z < turning)) {
    throw new NoAnswerError({
      where,
      reason: `redshift ${z} lies beyond the turning point of this closed model: it was never smaller than at z = ${turning.toPrecision(8)}`,
      hint: closedHint,
    });
  }
  if (z < 0) {
    const turnaround = evaluation.once(turnaroundRedshiftPart);
    if (turnaround !== undefined && !(z > turnaround)) {
      throw new NoAnswerError({
        where,
        reason: `redshift ${z} is never reached: this model stops expanding at z = ${turnaround.toPrecision(8)} and falls back`,
      });
    }
  }
}

/** Refuses a model that never had a Big Bang, for whatever is counted from a = 0. */
export function requireBigBang(evaluation: ModelEvaluation, where: string): void {
  const turning = evaluation.once(turningRedshiftPart);
  if (turning !== undefined) {
    throw new NoAnswerError({
      where,
      reason: `this closed model never had a Big Bang: going back, H reaches zero at z = ${turning.toPrecision(8)}`,
      hint: closedHint,
    });
  }
}

/**
 * Refuses a model in which an integral from a = 0 diverges for want of matter and radiation.
 *
 * With a^4 H^2 going as a^n, the age is finite for n below 4 and conformal time for n below 2; matter and radiation have n = 1 and
 * 0, curvature 2, dark energy 1 - 3 (w0 + wa).
 */
export function requireFiniteStart(evaluation: ModelEvaluation, where: string, below: 2 | 4): void {
  requireBigBang(evaluation, where);
  const expansion = evaluation.once(expansionPart);
  if (expansion.radiation + expansion.neutrinoTerm(0) + expansion.baryonsAndCold > 0) return;
  const byCurvature = expansion.curvatureDensity > 0 ? 2 : Number.POSITIVE_INFINITY;
  const byDarkEnergy = expansion.darkEnergy > 0 ? 1 - 3 * expansion.earlyState() : Number.POSITIVE_INFINITY;
  if (!(Math.min(byCurvature, byDarkEnergy) < below)) {
    throw new NoAnswerError({
      where,
      reason: `without matter and radiation this model has no finite ${below === 4 ? "age" : "conformal time since a = 0"}: the integral from a = 0 diverges`,
    });
  }
}
