import { NoAnswerError } from "../errors";
import { type ModelEvaluation, turningRedshiftPart } from "./expansion";

const closedHint = "curvature is too negative, or dark energy too large, for this matter density";

/** Refuses a redshift at or beyond the turning point of a closed model that bounced. */
export function requireRedshift(evaluation: ModelEvaluation, z: number, where: string): void {
  const turning = evaluation.once(turningRedshiftPart);
  if (turning !== undefined && !(z < turning)) {
    throw new NoAnswerError({
      where,
      reason: `redshift ${z} lies beyond the turning point of this closed model: it was never smaller than at z = ${turning.toPrecision(8)}`,
      hint: closedHint,
    });
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
