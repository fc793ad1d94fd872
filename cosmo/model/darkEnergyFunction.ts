import { DomainError } from "../errors";

/** An equation of state as a formula: its text, what its letter means, and the compiled function. */
export interface DarkEnergyEquation {
  /** As it was written: "-1 + 0.1 z/(1 + z)". */
  readonly text: string;
  /** Whether the formula is in the redshift or in the scale factor. */
  readonly variable: "z" | "a";
  /** w at a redshift or scale factor. */
  readonly evaluate: (x: number) => number;
}

/** An equation of state as a table: w at redshifts, interpolated in a, held at its end values beyond them. */
export interface DarkEnergyTable {
  /** Ascending, above -1; two or more. */
  readonly redshifts: readonly number[];
  /** w at each. */
  readonly values: readonly number[];
}

/** Refuses what is no compiled equation. */
export function checkEquation(value: unknown, where: string, place: string | undefined): DarkEnergyEquation {
  const refuse = (rule: string, hint?: string): never => {
    throw new DomainError({ where, argument: "darkEnergy.equation", rule, value, place, hint });
  };
  if (typeof value === "string") {
    return refuse(
      "must be compiled before a model is closed",
      "cells and derive take the text; elsewhere give { text, variable, evaluate }",
    );
  }
  if (typeof value !== "object" || value === null) return refuse("must be an object { text, variable, evaluate }");
  const { text, variable, evaluate } = value as Partial<DarkEnergyEquation>;
  if (typeof text !== "string" || (variable !== "z" && variable !== "a") || typeof evaluate !== "function") {
    return refuse('must have text, variable "z" or "a", and a function evaluate');
  }
  return value as DarkEnergyEquation;
}

/** Refuses what is no table of w over redshift. */
export function checkTable(value: unknown, where: string, place: string | undefined): DarkEnergyTable {
  const refuse = (rule: string, got: unknown = value, at = place): never => {
    throw new DomainError({ where, argument: "darkEnergy.table", rule, value: got, place: at });
  };
  if (typeof value !== "object" || value === null) return refuse("must be an object { redshifts, values }");
  const { redshifts, values } = value as Partial<DarkEnergyTable>;
  if (!Array.isArray(redshifts) || !Array.isArray(values)) return refuse("must have lists redshifts and values");
  if (redshifts.length !== values.length || redshifts.length < 2) {
    return refuse(
      "must have as many values as redshifts, and two or more",
      `${redshifts.length} redshifts and ${values.length} values`,
    );
  }
  redshifts.forEach((z, i) => {
    const row = `entry ${i + 1} of darkEnergy.table`;
    if (!(typeof z === "number" && z > -1 && Number.isFinite(z))) {
      refuse("must have finite redshifts above -1", z, row);
    }
    if (i > 0 && !(z > redshifts[i - 1]!)) refuse("must have ascending redshifts", z, row);
    const w: unknown = values[i];
    if (!(typeof w === "number" && Number.isFinite(w))) refuse("must have finite values", w, row);
  });
  return value as DarkEnergyTable;
}
