import type { ModelEvaluation, ModelQuantity } from "../expansion";
import type { QuantityArgument } from "../quantity";
import { recombinationNotes, recombinationSources } from "../recombination";
import type { SourceKey } from "../sources";

/** What a quantity that hangs on the ionization history still has to say of itself. */
export interface HistoryQuantityFields {
  name: string;
  symbol: string;
  unit: string;
  arguments?: readonly QuantityArgument[];
  description: string;
  equation: string;
  method: string;
  accuracy: number;
  /** Beside those of recombination. */
  sources: readonly SourceKey[];
  compute: (evaluation: ModelEvaluation, values: readonly number[]) => number;
}

/**
 * A quantity whose number hangs on the ionization history: recombination's sources and notes are added to its own, and its
 * error is measured against the coarser evaluation.
 */
export function historyQuantity(fields: HistoryQuantityFields): ModelQuantity {
  return {
    ...fields,
    arguments: fields.arguments ?? [],
    usesHistory: true,
    sources: (model) => [...fields.sources, ...recombinationSources(model)],
    notes: ({ model }) => recombinationNotes(model),
    compute: (evaluation, values) => ({ value: fields.compute(evaluation, values), error: 0 }),
  };
}
