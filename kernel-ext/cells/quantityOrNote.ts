import { NoAnswerError } from "../../cosmo/errors";
import type { QuantityValue } from "../../cosmo/quantity";
import type { ModelNumbers } from "../../cosmo/solve";

/**
 * A quantity, or undefined where this model has no such number: then the reason is added to `notes`. A cell that shows many
 * numbers should not fail because the model never accelerates.
 */
export function quantityOrNote(
  numbers: ModelNumbers,
  name: string,
  values: readonly number[],
  notes: string[],
): QuantityValue | undefined {
  try {
    return numbers.quantity(name, ...values);
  } catch (failure) {
    if (!(failure instanceof NoAnswerError)) throw failure;
    notes.push(failure.message);
    return undefined;
  }
}
