import { CosmologyError } from "./cosmologyError";
import { describeValue } from "./describeValue";
import { nearestName } from "./nearestName";

/** What an {@link UnknownNameError} is made of. */
export interface UnknownNameFields {
  where: string;
  /** What the name should have been one of: "parameter", "quantity", "convention". */
  kind: string;
  /** The name that came. */
  given: string;
  /** The names that are known there. */
  known: readonly string[];
  place?: string | undefined;
}

/** A name that is not in the vocabulary; suggests the one that was probably meant. */
export class UnknownNameError extends CosmologyError {
  override readonly name = "UnknownNameError";
  readonly kind: string;
  readonly given: string;
  readonly known: readonly string[];
  readonly suggestion: string | undefined;

  constructor(fields: UnknownNameFields) {
    const suggestion = nearestName(fields.given, fields.known);
    const place = fields.place === undefined ? "" : ` (${fields.place})`;
    const shown = fields.known.length > 30 ? `${fields.known.slice(0, 30).join(", ")}, ...` : fields.known.join(", ");
    super(
      fields.where,
      `${fields.where}: ${describeValue(fields.given)} is not a known ${fields.kind}${place}`,
      suggestion === undefined ? `known: ${shown}` : `did you mean "${suggestion}"?`,
    );
    this.kind = fields.kind;
    this.given = fields.given;
    this.known = fields.known;
    this.suggestion = suggestion;
  }
}
