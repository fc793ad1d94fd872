/** Functions that a formula may use, with the least and the most arguments. `log` is natural; `log(x, base)` takes a base. */
export const formulaFunctions: ReadonlyMap<string, readonly [least: number, most: number]> = new Map([
  ["abs", [1, 1]],
  ["acos", [1, 1]],
  ["acosh", [1, 1]],
  ["asin", [1, 1]],
  ["asinh", [1, 1]],
  ["atan", [1, 1]],
  ["atan2", [2, 2]],
  ["atanh", [1, 1]],
  ["cbrt", [1, 1]],
  ["cos", [1, 1]],
  ["cosh", [1, 1]],
  ["exp", [1, 1]],
  ["expm1", [1, 1]],
  ["log", [1, 2]],
  ["log10", [1, 1]],
  ["log1p", [1, 1]],
  ["log2", [1, 1]],
  ["max", [1, 20]],
  ["min", [1, 20]],
  ["pow", [2, 2]],
  ["sign", [1, 1]],
  ["sin", [1, 1]],
  ["sinh", [1, 1]],
  ["sqrt", [1, 1]],
  ["tan", [1, 1]],
  ["tanh", [1, 1]],
]);

/** Constants that a formula may use. */
export const formulaConstants: readonly string[] = ["pi", "e"];

/** Operators by mathjs's names of their functions: what they take and what they give. */
export const formulaOperators: ReadonlyMap<string, readonly [takes: FormulaKind, gives: FormulaKind]> = new Map([
  ["add", ["number", "number"]],
  ["subtract", ["number", "number"]],
  ["multiply", ["number", "number"]],
  ["divide", ["number", "number"]],
  ["pow", ["number", "number"]],
  ["unaryMinus", ["number", "number"]],
  ["unaryPlus", ["number", "number"]],
  ["smaller", ["number", "condition"]],
  ["smallerEq", ["number", "condition"]],
  ["larger", ["number", "condition"]],
  ["largerEq", ["number", "condition"]],
  ["and", ["condition", "condition"]],
  ["or", ["condition", "condition"]],
  ["not", ["condition", "condition"]],
]);

/** What a piece of a formula is: a number, or something true or false. */
export type FormulaKind = "number" | "condition";

/** Longest formula, in characters: more is a mistake, and its work stays bounded. */
export const longestFormula = 500;
