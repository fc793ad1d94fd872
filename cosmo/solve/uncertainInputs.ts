import { DomainError, UnknownNameError } from "../errors";
import type { ModelGivens, UncertaintyGivens } from "../model";
import { givenNumbers } from "./withGiven";

/** Errors of the givens, checked: independent ones and one correlated block. */
export interface UncertainInputs {
  readonly independent: readonly { readonly name: string; readonly upper: number; readonly lower: number }[];
  readonly correlated: readonly string[];
  /** Lower triangle of the Cholesky factor of the covariance, row by row. */
  readonly factor: readonly (readonly number[])[];
  readonly covariance: readonly (readonly number[])[];
  readonly method: "linear" | "sampling";
  readonly samples: number;
}

/**
 * Checks what a model says of its givens' errors; undefined where it says nothing.
 *
 * Errors name the given, the rule and the value; a covariance must be symmetric and positive semidefinite.
 */
export function uncertainInputs(givens: ModelGivens, where: string): UncertainInputs | undefined {
  const stated: UncertaintyGivens | undefined = givens.uncertainty;
  if (stated === undefined) return undefined;
  const known = [...givenNumbers(givens).keys()];
  const refuse = (argument: string, rule: string, value: unknown): never => {
    throw new DomainError({ where, argument, rule, value });
  };
  if (typeof stated !== "object" || stated === null) {
    return refuse("uncertainty", "must be an object with errors or covariance", stated);
  }
  const names = ["errors", "covariance", "method", "samples"];
  for (const name of Object.keys(stated)) {
    if (!names.includes(name))
      throw new UnknownNameError({ where, kind: "field of uncertainty", given: name, known: names });
  }
  const checkName = (name: string) => {
    if (!known.includes(name))
      throw new UnknownNameError({ where, kind: "given number with an error", given: name, known });
  };
  const independent = Object.entries(stated.errors ?? {}).map(([name, error]) => {
    checkName(name);
    const [upper, lower] = typeof error === "number" ? [error, error] : [error?.upper, error?.lower];
    for (const side of [upper, lower]) {
      if (typeof side !== "number" || !(side >= 0) || !Number.isFinite(side)) {
        return refuse(`uncertainty.errors.${name}`, "must be a finite error of 0 or more, or { upper, lower }", error);
      }
    }
    return { name, upper: upper as number, lower: lower as number };
  });
  const method = stated.method ?? "linear";
  if (method !== "linear" && method !== "sampling") {
    throw new UnknownNameError({
      where,
      kind: "method of uncertainty",
      given: String(method),
      known: ["linear", "sampling"],
    });
  }
  const samples = stated.samples ?? 256;
  if (!(Number.isInteger(samples) && samples >= 16))
    refuse("uncertainty.samples", "must be a whole number of 16 or more", samples);
  const correlated = stated.covariance?.parameters ?? [];
  const covariance = stated.covariance?.matrix ?? [];
  for (const name of correlated) {
    checkName(name);
    if (independent.some((each) => each.name === name)) {
      refuse("uncertainty", `must state ${name} in errors or in covariance, not in both`, name);
    }
  }
  return {
    independent,
    correlated,
    covariance,
    factor: choleskyFactor(covariance, correlated.length, refuse),
    method,
    samples,
  };
}

/** Cholesky's factor of a covariance; a zero pivot is a parameter without an error of its own. */
function choleskyFactor(
  matrix: readonly (readonly number[])[],
  size: number,
  refuse: (argument: string, rule: string, value: unknown) => never,
): number[][] {
  const what = "uncertainty.covariance";
  if (matrix.length !== size || matrix.some((row) => row.length !== size)) {
    refuse(what, `must be a matrix of ${size} rows and columns`, matrix);
  }
  const scale = Math.max(0, ...matrix.map((row, i) => row[i]!));
  const factor: number[][] = [];
  for (let i = 0; i < size; i++) {
    factor.push([]);
    for (let j = 0; j <= i; j++) {
      const [one, other] = [matrix[i]![j]!, matrix[j]![i]!];
      const size2 = Math.sqrt(matrix[i]![i]! * matrix[j]![j]!);
      if (!(Math.abs(one - other) <= 1e-9 * Math.max(size2, 1e-300))) {
        refuse(`${what}[${i + 1}][${j + 1}]`, `must be symmetric, and differs from its mirror ${other}`, one);
      }
      let rest = one;
      for (let k = 0; k < j; k++) rest -= factor[i]![k]! * factor[j]![k]!;
      if (i === j) {
        if (!(rest > -1e-12 * scale))
          refuse(`${what}[${i + 1}][${i + 1}]`, "must leave a matrix that is positive", rest);
        factor[i]!.push(Math.sqrt(Math.max(0, rest)));
      } else factor[i]!.push(factor[j]![j] === 0 ? 0 : rest / factor[j]![j]!);
    }
  }
  return factor;
}
