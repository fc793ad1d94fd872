import { CosmologyError } from "./cosmologyError";
import { describeValue } from "./describeValue";

/** What a {@link DomainError} is made of. */
export interface DomainErrorFields {
  /** The function or quantity that was asked. */
  where: string;
  /** The argument or field at fault, by its name in the vocabulary. */
  argument: string;
  /** The rule, as the rest of a sentence: "must be finite and above -1". */
  rule: string;
  /** What came. */
  value: unknown;
  /** Where in the data it stood: `row 17 of column "z"`. */
  place?: string | undefined;
  /** What would mend it. */
  hint?: string | undefined;
}

/** An argument outside the domain of what was asked: names it, the rule, the value and its place. */
export class DomainError extends CosmologyError {
  override readonly name = "DomainError";
  readonly argument: string;
  readonly rule: string;
  readonly value: unknown;
  readonly place: string | undefined;

  constructor(fields: DomainErrorFields) {
    const place = fields.place === undefined ? "" : ` (${fields.place})`;
    super(
      fields.where,
      `${fields.where}: ${fields.argument} ${fields.rule}, got ${describeValue(fields.value)}${place}`,
      fields.hint,
    );
    this.argument = fields.argument;
    this.rule = fields.rule;
    this.value = fields.value;
    this.place = fields.place;
  }
}
