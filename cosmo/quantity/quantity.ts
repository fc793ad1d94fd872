import { DomainError } from "../errors";
import type { SourceKey } from "../sources";
import type { Evaluation, Part } from "./evaluation";
import type { ValidityNote } from "./validityNote";

/** A value with the absolute numerical error of its computation. */
export interface Computed {
  readonly value: number;
  /** Absolute, in the value's unit; not the uncertainty of the inputs. */
  readonly error: number;
}

/** An argument of a quantity: z, t, d. */
export interface QuantityArgument {
  readonly name: string;
  readonly symbol: string;
  /** "" for a pure number. */
  readonly unit: string;
  /** The domain in words, as an error says it: "must be finite and above -1". */
  readonly rule: string;
  readonly accepts: (value: number) => boolean;
}

/** What a quantity is. Each room of `cosmo/` describes its own; the register collects them. */
export interface Quantity<M> {
  /** The name in the vocabulary: field, column, table row and record entry. */
  readonly name: string;
  /** The trade's symbol, with `_` before an index: "r_*". */
  readonly symbol: string;
  /** "" for a pure number. */
  readonly unit: string;
  readonly arguments: readonly QuantityArgument[];
  /** Whether (z1, z2) is accepted in place of (z). */
  readonly acceptsPair?: boolean;
  /** One sentence. */
  readonly description: string;
  /** The defining equation, in LaTeX. */
  readonly equation: string;
  /** How it is computed, in one sentence. */
  readonly method: string;
  /** The same for a model that asks for another way than {@link method}; undefined where it does not. */
  readonly methodFor?: (model: M) => string | undefined;
  /** Stated bound on the relative numerical error, enforced by tests. */
  readonly accuracy: number;
  readonly sources: readonly SourceKey[] | ((model: M) => readonly SourceKey[]);
  /**
   * True where the number hangs on an integrated ionization history: its error is then measured against the evaluation at
   * coarser settings.
   */
  readonly usesHistory?: boolean;
  /**
   * Least relative error that is stated: where two settings happen to cross, their difference says nothing. Needed with
   * `usesHistory`.
   */
  readonly errorFloor?: (model: M) => number;
  readonly notes?: (evaluation: Evaluation<M>, values: readonly number[]) => readonly ValidityNote[];
  readonly compute: (evaluation: Evaluation<M>, values: readonly number[]) => Computed;
}

/** The 68% uncertainty that a number has from uncertain givens. */
export interface Uncertainty {
  /** Above the value, in its unit. */
  readonly upper: number;
  /** Below the value, not signed. */
  readonly lower: number;
  readonly method: "linear" | "sampling";
}

/** A number that can say where it came from. */
export interface QuantityValue {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly arguments: readonly number[];
  readonly value: number;
  /** Absolute numerical error estimate. */
  readonly error: number;
  /** What the errors of the givens make of it, where they were stated. */
  readonly uncertainty?: Uncertainty;
  readonly method: string;
  readonly sources: readonly SourceKey[];
  readonly notes: readonly ValidityNote[];
}

/** The redshift argument that most quantities share. */
export const redshiftArgument: QuantityArgument = {
  name: "z",
  symbol: "z",
  unit: "",
  rule: "must be finite and above -1",
  accepts: (z) => z > -1 && Number.isFinite(z),
};

/** A redshift at which the past is asked for: 0 or more. */
export const pastRedshiftArgument: QuantityArgument = {
  name: "z",
  symbol: "z",
  unit: "",
  rule: "must be finite and not negative",
  accepts: (z) => z >= 0 && Number.isFinite(z),
};

/** Refuses arguments outside the quantity's domain, by name, place and rule. */
export function checkArguments<M>(definition: Quantity<M>, values: readonly number[], place?: string): void {
  const expected = definition.arguments.length;
  const pair = definition.acceptsPair === true && values.length === 2 && expected === 1;
  if (values.length !== expected && !pair) {
    const names = definition.arguments.map((argument) => argument.name).join(", ");
    throw new DomainError({
      where: definition.name,
      argument: "arguments",
      rule: expected === 0 ? "must be left out" : `must be (${names})${definition.acceptsPair ? " or (z1, z2)" : ""}`,
      value: values,
      place,
    });
  }
  values.forEach((value, index) => {
    const argument = definition.arguments[pair ? 0 : index]!;
    if (typeof value !== "number" || !argument.accepts(value)) {
      const rule = typeof value === "number" ? argument.rule : "must be a number";
      const name = argument.name === "z" ? (pair ? `redshift z${index + 1}` : "redshift") : argument.name;
      throw new DomainError({ where: definition.name, argument: name, rule, value, place });
    }
  });
}

/**
 * A quantity's bare value at arguments that {@link checkArguments} has accepted: the same number as
 * {@link evaluateQuantity} gives, without the second computation that measures the error. For rows of many models.
 *
 * Throws whatever error the computation meets; a result that is not a finite number is refused.
 */
export function computeQuantity<M>(
  definition: Quantity<M>,
  evaluation: Evaluation<M>,
  values: readonly number[] = [],
  place?: string,
): number {
  return finiteResult(definition, evaluation, values, place).value;
}

function finiteResult<M>(
  definition: Quantity<M>,
  evaluation: Evaluation<M>,
  values: readonly number[],
  place: string | undefined,
): Computed {
  const computed = definition.compute(evaluation, values);
  if (!Number.isFinite(computed.value)) {
    throw new DomainError({
      where: definition.name,
      argument: "result",
      rule: "must be a finite number; this model has none at these arguments",
      value: computed.value,
      place,
    });
  }
  return computed;
}

/**
 * Evaluates a quantity with its error, sources and notes.
 *
 * Throws {@link DomainError} for arguments outside the domain, and whatever error the computation meets; a result that is
 * not a finite number is refused here, so that NaN never passes.
 */
export function evaluateQuantity<M>(
  definition: Quantity<M>,
  evaluation: Evaluation<M>,
  values: readonly number[] = [],
  place?: string,
): QuantityValue {
  checkArguments(definition, values, place);
  const { value: computed, parts } = evaluation.watch(() => finiteResult(definition, evaluation, values, place));
  let error = Math.abs(computed.error);
  for (const part of parts) error += (part.relativeError?.(evaluation) ?? 0) * Math.abs(computed.value);
  const approximate = parts.some((part) => part.approximate?.(evaluation.model) === true);
  if ((definition.usesHistory === true || approximate) && evaluation.precision === "full") {
    error += Math.abs(computed.value - definition.compute(evaluation.coarse(), values).value);
  }
  error = Math.max(error, (definition.errorFloor?.(evaluation.model) ?? 0) * Math.abs(computed.value));
  const rounding = 4 * Number.EPSILON * Math.abs(computed.value);
  return {
    name: definition.name,
    symbol: definition.symbol,
    unit: definition.unit,
    arguments: [...values],
    value: computed.value,
    error: Math.max(error, rounding),
    method: definition.methodFor?.(evaluation.model) ?? definition.method,
    sources: typeof definition.sources === "function" ? definition.sources(evaluation.model) : definition.sources,
    notes: joinNotes(definition, evaluation, values, parts),
  };
}

/**
 * A quantity's value as {@link computeQuantity} gives it, with the notes that {@link evaluateQuantity} would: its own, and those of
 * the parts that its computation uses.
 */
export function computeWithNotes<M>(
  definition: Quantity<M>,
  evaluation: Evaluation<M>,
  values: readonly number[] = [],
  place?: string,
): { readonly value: number; readonly notes: readonly ValidityNote[] } {
  const { value: computed, parts } = evaluation.watch(() => finiteResult(definition, evaluation, values, place));
  return { value: computed.value, notes: joinNotes(definition, evaluation, values, parts) };
}

function joinNotes<M>(
  definition: Quantity<M>,
  evaluation: Evaluation<M>,
  values: readonly number[],
  parts: readonly Part<M, unknown>[],
): readonly ValidityNote[] {
  const all = [
    ...(definition.notes?.(evaluation, values) ?? []),
    ...parts.flatMap((part) => part.notes?.(evaluation) ?? []),
  ];
  return all.filter((note, i) => all.findIndex((other) => other.text === note.text) === i);
}
