import type { ModelEvaluation } from "../expansion";
import type { ClosedModel, ModelGivens } from "../model";
import { findQuantity } from "../quantities";
import { checkArguments, Evaluation, evaluateQuantity, type QuantityValue } from "../quantity";
import { computeQuantity } from "../quantity/quantity";
import { closeModel } from "./closeModel";
import type { Origin } from "./origin";

/** One closed model and every number that can be asked of it; each history, depth and horizon is computed once. */
export class ModelNumbers {
  readonly model: ClosedModel;
  readonly evaluation: ModelEvaluation;
  private readonly origin: Origin;

  constructor(model: ClosedModel, origin: Origin = {}) {
    this.model = model;
    this.evaluation = new Evaluation(model);
    this.origin = origin;
  }

  /**
   * A quantity of the register with error, sources and notes.
   *
   * An unknown name throws UnknownNameError with the one that was meant; arguments outside the domain DomainError.
   *
   * @example evaluateModel(base).quantity("luminosityDistance", 1.1).error
   */
  quantity(name: string, ...values: number[]): QuantityValue {
    const definition = findQuantity(name, this.origin.where ?? "quantity");
    return evaluateQuantity(definition, this.evaluation, values, this.origin.place);
  }

  /**
   * A quantity's bare value: the same number, without the effort of measuring its error.
   *
   * @example evaluateModel(base).value("age") // 13.8
   */
  value(name: string, ...values: number[]): number {
    const definition = findQuantity(name, this.origin.where ?? "quantity");
    checkArguments(definition, values, this.origin.place);
    return computeQuantity(definition, this.evaluation, values, this.origin.place);
  }
}

/**
 * Closes a model and makes its numbers ready to be asked for by name.
 *
 * @param givens the model as a notebook states it; @param origin who asked and where the model stood, for the texts of errors.
 * @example evaluateModel({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).value("luminosityDistance", 1.1)
 */
export function evaluateModel(givens: ModelGivens, origin: Origin = {}): ModelNumbers {
  return new ModelNumbers(closeModel(givens, origin), origin);
}
