import { DomainError } from "../errors";
import { type ClosedModel, type ModelGivens, validateGivens } from "../model";
import { quantityRegister } from "../quantities";
import { closeDirect } from "./closeDirect";
import type { Origin } from "./origin";
import { planSolution } from "./plan";
import { solvePlan } from "./solvePlan";

/** Derived quantities that may stand in for a parameter: those of a model, not of a redshift. */
const derivedNames: ReadonlySet<string> = new Set(
  [...quantityRegister.values()].filter((each) => each.arguments.length === 0).map((each) => each.name),
);

/**
 * Closes a model: from a sufficient set of givens to a model with nothing left open.
 *
 * hubble, the baryons and the cold matter are needed, in any of their forms (hubble or reducedHubble; baryonDensity or
 * baryonFraction; coldMatterDensity, coldMatterFraction, matterDensity or matterFraction); the rest has defaults. A derived number
 * (age, acousticAngle, dragSoundHorizon, equalityRedshift and every other of the register without argument) may stand in place of
 * any parameter it determines; `solveFor` frees a parameter that would keep its default. More givens than needed are accepted where
 * they follow from the others within rounding, and the model says so.
 *
 * Throws UnknownNameError for a name not in the vocabulary, DomainError for a value outside its rule, InconsistentParametersError
 * for too few givens (what would settle it), contradictory ones (the smallest set that clashes, and by how much), or two models
 * that both meet them (`solveNear` chooses).
 *
 * Accuracy of solved parameters: 1e-9. Method: closed form where there is one; else Newton's method with Broyden's updates.
 * @example closeModel({ acousticAngle: 1.0411, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).hubble // 67.3
 */
export function closeModel(givens: ModelGivens, origin: Origin = {}): ClosedModel {
  const where = origin.where ?? "model";
  const { solveFor, solveNear, fields } = splitSearch(givens, where);
  const flat = validateGivens(fields, where, origin.place, derivedNames);
  const plan = planSolution(flat, solveFor, where, origin.place);
  if (plan.equations.length === 0) return closeDirect(flat, givens, origin);
  return solvePlan(plan, givens, solveNear, origin);
}

function splitSearch(givens: unknown, where: string) {
  if (typeof givens !== "object" || givens === null || Array.isArray(givens)) {
    return { solveFor: [] as string[], solveNear: {}, fields: givens };
  }
  const { solveFor = [], solveNear = {}, uncertainty: _, ...fields } = givens as ModelGivens;
  if (!Array.isArray(solveFor) || !solveFor.every((name) => typeof name === "string")) {
    throw new DomainError({ where, argument: "solveFor", rule: "must be a list of parameter names", value: solveFor });
  }
  const near = Object.entries(solveNear);
  if (typeof solveNear !== "object" || near.some(([, value]) => typeof value !== "number" || !Number.isFinite(value))) {
    throw new DomainError({
      where,
      argument: "solveNear",
      rule: "must be an object of parameters and finite numbers",
      value: solveNear,
    });
  }
  return { solveFor: solveFor as readonly string[], solveNear: solveNear as Record<string, number>, fields };
}
