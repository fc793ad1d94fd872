import { CosmologyError } from "../../cosmo/errors";
import type { ModelGivens } from "../../cosmo/model";
import type { QuantityRequest } from "../../cosmo/quantities";
import { type Derivative, evaluateModel, type ModelNumbers } from "../../cosmo/solve";
import { withGiven } from "../../cosmo/solve/withGiven";
import type { SensitivityParameter } from "./sensitivityParameters";

/** How one parameter alone would explain a shift. */
export interface ShiftExplanation {
  readonly parameter: SensitivityParameter;
  /** By how much it would have to move, linearly, and where to; undefined where it does not move the quantity. */
  readonly change: number | undefined;
  readonly to: number | undefined;
  /** The change over the parameter's stated error on that side; undefined where none is stated. */
  readonly inErrors: number | undefined;
  /** What share of the shift the model at `to` really shows; undefined where there is no such model. */
  readonly reached: number | undefined;
}

/**
 * Which change of a parameter, the others held, shifts a quantity by a given amount: change = shift/(d quantity/d parameter).
 *
 * Linear; the model at the changed parameter is evaluated too, and tells how much of the shift it really shows.
 */
export function explainShift(
  numbers: ModelNumbers,
  request: QuantityRequest,
  shift: number,
  parameter: SensitivityParameter,
  slope: Derivative,
): ShiftExplanation {
  const without = { parameter, change: undefined, to: undefined, inErrors: undefined, reached: undefined };
  // A slope within its own numerical error is none.
  if (!(Math.abs(slope.value) > 3 * slope.error)) return without;
  const change = shift / slope.value;
  const to = parameter.value + change;
  const error = statedError(numbers.model.givens, parameter.name, change);
  const inErrors = error === undefined || !(error > 0) ? undefined : Math.abs(change) / error;
  return { parameter, change, to, inErrors, reached: shareReached(numbers, request, shift, parameter.name, to) };
}

function shareReached(
  numbers: ModelNumbers,
  { name, arguments: values }: QuantityRequest,
  shift: number,
  parameter: string,
  to: number,
): number | undefined {
  try {
    const { uncertainty: _, ...givens } = withGiven(numbers.model.givens, parameter, to);
    return (evaluateModel(givens).value(name, ...values) - numbers.value(name, ...values)) / shift;
  } catch (failure) {
    if (!(failure instanceof CosmologyError)) throw failure;
    return undefined;
  }
}

/** The 68% error that the model states for a given, on the side of the change. */
function statedError({ uncertainty }: ModelGivens, name: string, change: number): number | undefined {
  const single = uncertainty?.errors?.[name];
  if (single !== undefined) {
    return typeof single === "number" ? single : change > 0 ? single.upper : single.lower;
  }
  const index = uncertainty?.covariance?.parameters.indexOf(name) ?? -1;
  return index < 0 ? undefined : Math.sqrt(uncertainty!.covariance!.matrix[index]![index]!);
}
