import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { fitNotes } from "../fits";
import type { ClosedModel } from "../model";
import type { QuantityArgument } from "../quantity";
import { historyErrorFloor, recombinationNotes, recombinationSources } from "../recombination";
import type { SourceKey } from "../sources";
import { fitsInForce, methodWithFits, type ReplaceableStep } from "./fitsInForce";

/** What a quantity that hangs on the ionization history still has to say of itself. */
export interface HistoryQuantityFields {
  name: string;
  symbol: string;
  unit: string;
  arguments?: readonly QuantityArgument[];
  description: string;
  equation: string;
  method: string;
  /** What is left of the method where a convention puts fits in place of steps; {@link method} unless given. */
  methodBesideFits?: string;
  accuracy: number;
  /** Beside those of recombination. */
  sources: readonly SourceKey[];
  /** The steps behind the number that conventions may replace. */
  steps?: readonly ReplaceableStep[];
  /** Whether the ionization history is still needed under the model's conventions; always unless given. */
  needsHistory?: (model: ClosedModel) => boolean;
  compute: (evaluation: ModelEvaluation, values: readonly number[]) => number;
}

/** Numbers without a history behind them are quadratures over the expansion, at a tolerance of 1e-12 and measured below 1e-14. */
const quadratureError = 1e-13;

/**
 * A quantity whose number hangs on the ionization history: recombination's sources and notes are added to its own, and its
 * error is measured against the coarser evaluation. Fits that the model's conventions put in place of steps are named in method,
 * notes and sources.
 */
export function historyQuantity(fields: HistoryQuantityFields): ModelQuantity {
  const { name, symbol, unit, description, equation, method, accuracy, compute } = fields;
  const needsHistory = fields.needsHistory ?? (() => true);
  const redshiftAmong = (values: readonly number[]) =>
    fields.arguments?.[0]?.name === "z" ? values[values.length - 1] : undefined;
  const inForce = (model: ClosedModel) => fitsInForce(model, fields.steps ?? []);
  return {
    name,
    symbol,
    unit,
    description,
    equation,
    method,
    accuracy,
    arguments: fields.arguments ?? [],
    usesHistory: true,
    errorFloor: (model) => (needsHistory(model) ? historyErrorFloor(accuracy)(model) : 0),
    methodFor: (model) => methodWithFits(fields.methodBesideFits ?? method, inForce(model)),
    sources: (model) => [
      ...new Set([
        ...inForce(model).map(({ fit }) => fit.source),
        ...fields.sources,
        ...(needsHistory(model) ? recombinationSources(model) : []),
      ]),
    ],
    notes: (evaluation, values) => [
      ...inForce(evaluation.model).flatMap(({ fit }) => fitNotes(fit, evaluation.model)),
      ...(needsHistory(evaluation.model) ? recombinationNotes(evaluation, redshiftAmong(values)) : []),
    ],
    compute: (evaluation, values) => {
      const value = compute(evaluation, values);
      return { value, error: needsHistory(evaluation.model) ? 0 : quadratureError * Math.abs(value) };
    },
  };
}

/** For numbers that need the history only to find z_*. */
export const throughLastScattering = (model: ClosedModel): boolean => model.conventions.lastScattering === "full";
