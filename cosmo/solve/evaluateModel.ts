import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { ClosedModel, ModelGivens } from "../model";
import { findQuantity } from "../quantities";
import {
  checkArguments,
  computeQuantity,
  Evaluation,
  evaluateQuantity,
  type QuantityValue,
  type Uncertainty,
} from "../quantity";
import { closeModel } from "./closeModel";
import { type Derivative, DisplacedModels } from "./displacedModels";
import type { Origin } from "./origin";
import { SampledModels } from "./sampledModels";
import { type UncertainInputs, uncertainInputs } from "./uncertainInputs";

/** One closed model and every number that can be asked of it; each history, depth and horizon is computed once. */
export class ModelNumbers {
  readonly model: ClosedModel;
  readonly evaluation: ModelEvaluation;
  private readonly origin: Origin;
  private readonly inputs: UncertainInputs | undefined;
  private readonly displaced: DisplacedModels;
  private readonly sampled: SampledModels | undefined;

  constructor(model: ClosedModel, origin: Origin = {}) {
    this.model = model;
    this.evaluation = new Evaluation(model);
    this.origin = origin;
    this.inputs = uncertainInputs(model.givens, origin.where ?? "model");
    this.displaced = new DisplacedModels(model.givens, this.evaluation, origin);
    if (this.inputs?.method === "sampling") this.sampled = new SampledModels(model.givens, this.inputs, origin);
  }

  /**
   * A quantity of the register with numerical error, sources, notes, and, where the model states errors of its givens, its
   * uncertainty.
   *
   * An unknown name throws UnknownNameError with the one that was meant; arguments outside the domain DomainError.
   *
   * @example evaluateModel(base).quantity("luminosityDistance", 1.1).error
   */
  quantity(name: string, ...values: number[]): QuantityValue {
    const definition = findQuantity(name, this.origin.where ?? "quantity");
    const result = evaluateQuantity(definition, this.evaluation, values, this.origin.place);
    return this.inputs === undefined
      ? result
      : { ...result, uncertainty: this.uncertainty(definition, values, result.value) };
  }

  /**
   * d(quantity)/d(given), the other givens held, with an estimate of its error.
   *
   * @param parameter flat name of a number given, or of a parameter at its default ("curvature", "darkEnergy.w0").
   * Accuracy 1e-6. Method: see DisplacedModels.
   * @example evaluateModel(base).derivative("acousticAngle", [], "hubble").value
   */
  derivative(name: string, values: readonly number[], parameter: string): Derivative {
    const definition = findQuantity(name, this.origin.where ?? "derivative");
    checkArguments(definition, values, this.origin.place);
    return this.displaced.derivative(definition, values, parameter);
  }

  /** Linear: sqrt(J C J^T), upper and lower apart where errors are asymmetric. Sampling: the 16% and 84% points. */
  private uncertainty(definition: ModelQuantity, values: readonly number[], value: number): Uncertainty {
    const inputs = this.inputs!;
    if (this.sampled !== undefined) {
      const { lower, upper } = this.sampled.interval(definition, values);
      return { upper: Math.max(0, upper - value), lower: Math.max(0, value - lower), method: "sampling" };
    }
    const slope = (name: string) => this.displaced.derivative(definition, values, name).value;
    let upper = 0;
    let lower = 0;
    for (const each of inputs.independent) {
      const by = slope(each.name);
      upper += (by * (by > 0 ? each.upper : each.lower)) ** 2;
      lower += (by * (by > 0 ? each.lower : each.upper)) ** 2;
    }
    const slopes = inputs.correlated.map(slope);
    const shared = inputs.covariance.reduce(
      (sum, row, i) => sum + row.reduce((inner, entry, j) => inner + entry * slopes[i]! * slopes[j]!, 0),
      0,
    );
    return { upper: Math.sqrt(upper + shared), lower: Math.sqrt(lower + shared), method: "linear" };
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
