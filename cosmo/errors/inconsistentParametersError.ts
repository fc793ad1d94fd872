import { CosmologyError } from "./cosmologyError";

/** What an {@link InconsistentParametersError} is made of. */
export interface InconsistentParametersFields {
  where: string;
  /** The givens involved, by name. */
  parameters: readonly string[];
  /** "missing", "redundant", "contradictory" or "ambiguous". */
  problem: "missing" | "redundant" | "contradictory" | "ambiguous";
  /** The sentence that says what is wrong. */
  reason: string;
  hint?: string | undefined;
}

/** Givens that do not make one model: too few, too many, or in contradiction. */
export class InconsistentParametersError extends CosmologyError {
  override readonly name = "InconsistentParametersError";
  readonly parameters: readonly string[];
  readonly problem: "missing" | "redundant" | "contradictory" | "ambiguous";

  constructor(fields: InconsistentParametersFields) {
    super(fields.where, `${fields.where}: ${fields.reason}`, fields.hint);
    this.parameters = fields.parameters;
    this.problem = fields.problem;
  }
}
