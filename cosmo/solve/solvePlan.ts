import { InconsistentParametersError, NotConvergedError, UnknownNameError } from "../errors";
import type { ClosedModel, FlatGivens, ModelGivens } from "../model";
import { solveSystem } from "../numerics";
import { agreementsOf } from "./agreement";
import type { Origin } from "./origin";
import type { Equation, Plan } from "./plan";
import { scatteredStarts } from "./scatteredStarts";
import type { Slot } from "./slots";
import { needsHistory, Trial } from "./trial";

/** One model that meets the givens, as its open parameters. */
interface Solution {
  readonly parameters: Float64Array;
  readonly evaluations: number;
}

/** Residuals are relative; below this the digits of the quantities themselves end. */
const tolerances = { full: 2e-12, closed: 1e-14, light: 1e-9 };

/** Two solutions closer than this (relative, or absolute for curvature and w) are one. */
const sameSolution = 1e-4;

/**
 * Solves a plan: finds the open parameters, looks for a second solution, and checks what was given beyond need.
 *
 * Method: every model is first searched with last scattering held at fixed redshifts, which costs a hundredth of the full
 * computation or less (measured 1/150 for theta_*), from many starting points; each distinct answer is then polished with the full
 * one, in 5 evaluations for hubble from theta_*.
 */
export function solvePlan(
  plan: Plan,
  givens: ModelGivens,
  near: { readonly [parameter: string]: number },
  origin: Origin,
): ClosedModel {
  const where = origin.where ?? "model";
  for (const name of Object.keys(near)) {
    const known = plan.unknowns.map((slot) => slot.parameter);
    if (!known.includes(name))
      throw new UnknownNameError({ where, kind: "open parameter in solveNear", given: name, known });
  }
  const [determining, extra] = splitEquations(plan);
  const trial = new Trial(plan.fields, plan.unknowns, determining, givens, origin);
  const solutions =
    plan.unknowns.length === 0 ? [{ parameters: new Float64Array(0), evaluations: 0 }] : allSolutions(trial, near);
  if (solutions.length === 0) throw unsolved(trial, where);
  const solution = choose(solutions, plan.unknowns, near, where);
  const model = trial.model(solution.parameters);
  const agreeing = agreementsOf(trial, solution.parameters, extra, where, origin.place);
  return {
    ...model,
    givens,
    solution: {
      solvedFor: plan.unknowns.map((slot) => slot.parameter),
      determinedBy: determining.map((equation) => equation.name),
      evaluations: solution.evaluations,
      agreeing,
    },
  };
}

/** As many equations as unknowns, closed forms first; the rest are checks. */
function splitEquations(plan: Plan): [Equation[], Equation[]] {
  const sorted = [...plan.equations].sort((a, b) => Number(needsHistory(a.name)) - Number(needsHistory(b.name)));
  // Closed forms that depend on no open parameter determine nothing: they are checks whatever their place.
  const useful = sorted.filter((equation) => dependsOnAny(equation.name, plan.fields, plan.unknowns));
  const determining = useful.slice(0, plan.unknowns.length);
  const fill = sorted.filter((equation) => !determining.includes(equation));
  while (determining.length < plan.unknowns.length) determining.push(fill.shift()!);
  return [determining, sorted.filter((equation) => !determining.includes(equation))];
}

/** Whether a closed form of densities can tell anything of the open parameters. */
function dependsOnAny(name: string, fields: FlatGivens, unknowns: readonly Slot[]): boolean {
  const open = new Set(unknowns.map((slot) => slot.parameter));
  if (name === "photonDensity") return open.has("photonTemperature");
  if (name === "hubble" || name === "reducedHubble") return open.has("hubble");
  if (name === "baryonDensity")
    return open.has("baryonDensity") || (fields.has("baryonFraction") && open.has("hubble"));
  return true;
}

function allSolutions(trial: Trial, near: { readonly [parameter: string]: number }): Solution[] {
  const found: Solution[] = [];
  const starts = scatteredStarts(trial.unknowns, near, trial.needsTrueHistory ? 3 : 24);
  const lightAnswers: Float64Array[] = [];
  if (trial.needsTrueHistory) {
    lightAnswers.push(...starts);
  } else {
    for (const start of starts) {
      const answer = search(trial, start, "light");
      if (answer !== undefined && !lightAnswers.some((known) => close(known, answer.parameters, trial.unknowns))) {
        lightAnswers.push(answer.parameters);
      }
    }
  }
  for (const start of lightAnswers) {
    const answer = search(trial, start, "full");
    if (answer === undefined) continue;
    if (!found.some((known) => close(known.parameters, answer.parameters, trial.unknowns))) found.push(answer);
  }
  return found;
}

function search(trial: Trial, start: Float64Array, kind: "light" | "full"): Solution | undefined {
  const history = trial.equations.some((equation) => needsHistory(equation.name));
  const tolerance = kind === "light" ? tolerances.light : history ? tolerances.full : tolerances.closed;
  try {
    const result = solveSystem((x, out) => trial.residuals(x, out, kind), start, {
      tolerance,
      probe: kind === "light" ? 1e-5 : 1e-4,
      longestStep: 0.3,
      maximumEvaluations: kind === "light" ? 120 : 60,
    });
    if (result.residual > 100 * tolerance) return undefined;
    return { parameters: result.values, evaluations: result.evaluations };
  } catch (failure) {
    if (failure instanceof NotConvergedError) return undefined;
    throw failure;
  }
}

function close(a: Float64Array, b: Float64Array, unknowns: readonly Slot[]): boolean {
  return a.every(
    (value, i) =>
      Math.abs(value - b[i]!) < sameSolution * (unknowns[i]!.logarithmic ? 1 : Math.max(1, Math.abs(value))),
  );
}

function choose(
  solutions: readonly Solution[],
  unknowns: readonly Slot[],
  near: { readonly [parameter: string]: number },
  where: string,
): Solution {
  if (solutions.length === 1) return solutions[0]!;
  if (Object.keys(near).length > 0) {
    const distance = (solution: Solution) =>
      unknowns.reduce((sum, slot, i) => {
        const wanted = near[slot.parameter];
        if (wanted === undefined) return sum;
        const target = slot.logarithmic ? Math.log(wanted) : wanted;
        return sum + (solution.parameters[i]! - target) ** 2;
      }, 0);
    return [...solutions].sort((a, b) => distance(a) - distance(b))[0]!;
  }
  const texts = solutions.map((solution) =>
    unknowns
      .map((slot, i) => `${slot.parameter} ${parameterValue(slot, solution.parameters[i]!).toPrecision(6)}`)
      .join(", "),
  );
  throw new InconsistentParametersError({
    where,
    parameters: unknowns.map((slot) => slot.parameter),
    problem: "ambiguous",
    reason: `${solutions.length} models meet these givens: ${texts.map((text) => `(${text})`).join(" and ")}`,
    hint: `choose one by solveNear, for example solveNear: { ${unknowns[0]!.parameter}: ${parameterValue(unknowns[0]!, solutions[0]!.parameters[0]!).toPrecision(4)} }`,
  });
}

/** A searched number back as the parameter itself. */
export function parameterValue(slot: Slot, searched: number): number {
  return slot.logarithmic ? Math.exp(searched) : searched;
}

function unsolved(trial: Trial, where: string): InconsistentParametersError {
  const names = trial.equations.map((equation) => `${equation.name} ${equation.value}`);
  const open = trial.unknowns.map((slot) => `${slot.parameter} from ${slot.range[0]} to ${slot.range[1]}`);
  return new InconsistentParametersError({
    where,
    parameters: trial.equations.map((equation) => equation.name),
    problem: "contradictory",
    reason: `no model was found with ${names.join(" and ")}: searched ${open.join(", ")}${trial.atStart()}`,
    hint: "check the units (100 theta_* in 0.01 rad, Gyr, Mpc) and whether the given numbers determine the open parameters",
  });
}
