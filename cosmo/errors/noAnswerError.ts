import { CosmologyError } from "./cosmologyError";

/** What a {@link NoAnswerError} is made of. */
export interface NoAnswerFields {
  where: string;
  /** Why this model has no such number, as a sentence. */
  reason: string;
  hint?: string | undefined;
}

/** A question that has no answer in this model: no Big Bang, a redshift beyond the turning point, no baryons to recombine. */
export class NoAnswerError extends CosmologyError {
  override readonly name = "NoAnswerError";
  readonly reason: string;

  constructor(fields: NoAnswerFields) {
    super(fields.where, `${fields.where}: ${fields.reason}`, fields.hint);
    this.reason = fields.reason;
  }
}
