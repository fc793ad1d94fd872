import type { ModelGivens } from "../../cosmo/model";
import { evaluateModel as evaluateClosed, type ModelNumbers, type Origin } from "../../cosmo/solve";
import { compileModel } from "./compileModel";

/**
 * A model's numbers by name: `.value(name, ...arguments)`, `.quantity(...)` with error, uncertainty, sources and notes, and
 * `.derivative(name, arguments, parameter)`. As cosmo's own, with `darkEnergy.equation` also as text.
 *
 * @example evaluateModel({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).value("luminosityDistance", 1.1)
 */
export function evaluateModel(model: ModelGivens, origin: Origin = {}): ModelNumbers {
  return evaluateClosed(compileModel(model, origin.where ?? "model", origin.place), origin);
}
