import { DomainError } from "../../cosmo/errors";
import type { DarkEnergyEquation, ModelGivens } from "../../cosmo/model";
import { compileFormula, type Formula } from "../data/formula";
import { FormulaError } from "../data/formulaError";

const field = "darkEnergy.equation";

/**
 * A model whose `darkEnergy.equation` may be text, with the text compiled; any other model as it is.
 *
 * The formula is in z or in a, not in both; one without either is a constant. Workers and replays get the text
 * ({@link portableModel}) and compile it again; what lost its function on the way, as in JSON, is compiled from its text too.
 *
 * @param where who asked, for the texts of errors; @param place where the model stood.
 * A formula that cannot be taken: DomainError that names the place in it and the reason.
 * @example compileModel({ ...base, darkEnergy: { equation: "-1 + 0.1 z/(1 + z)" } }, "distanceCell")
 */
export function compileModel(model: ModelGivens, where: string, place?: string): ModelGivens {
  // Whatever is no model is refused when it is closed.
  const equation = (model as ModelGivens | null | undefined)?.darkEnergy?.equation;
  const text = typeof equation === "string" ? equation : textWithoutFunction(equation);
  if (text === undefined) return model;
  return { ...model, darkEnergy: { ...model.darkEnergy, equation: compileEquation(text, where, place) } };
}

function textWithoutFunction(equation: unknown): string | undefined {
  if (typeof equation !== "object" || equation === null) return undefined;
  const { text, evaluate } = equation as Partial<DarkEnergyEquation>;
  return typeof text === "string" && evaluate === undefined ? text : undefined;
}

/**
 * A model as it can be written down or sent to a worker: a compiled equation of state as its text again; any other model as it is.
 *
 * @example portableModel(compileModel(model, "record")) // what compileModel took
 */
export function portableModel(model: ModelGivens): ModelGivens {
  const equation = model.darkEnergy?.equation;
  if (typeof equation !== "object") return model;
  return { ...model, darkEnergy: { ...model.darkEnergy, equation: equation.text } };
}

/**
 * An equation of state from its text: see {@link compileModel}.
 *
 * @example compileEquation("-0.9 + 0.3 (1 - a)", "derive").evaluate(0.5) // -0.75
 */
export function compileEquation(text: string, where: string, place?: string): DarkEnergyEquation {
  const formula = compiled(text, where, place);
  if (formula.variables.length > 1) {
    throw new DomainError({ where, argument: field, rule: "must be in z or in a, not in both", value: text, place });
  }
  const variable = formula.variables[0] === "a" ? "a" : "z";
  return { text, variable, evaluate: (x) => formula.evaluate({ [variable]: x }) };
}

function compiled(text: string, where: string, place: string | undefined): Formula {
  try {
    return compileFormula(text, ["z", "a"]);
  } catch (failure) {
    if (!(failure instanceof FormulaError)) throw failure;
    throw new DomainError({
      where,
      argument: field,
      rule: `must be a formula in z or in a; this one ${failure.reason}`,
      value: text,
      place,
      hint: failure.hint,
    });
  }
}
