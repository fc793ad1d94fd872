import { InconsistentParametersError } from "../errors";
import { solveSystem } from "../numerics";
import { quantityRegister } from "../quantities";
import type { Equation } from "./plan";
import type { Trial } from "./trial";

/** A short number such as 70 is taken to be known to at least this relative half width. */
const coarsestRounding = 2e-3;

/** Agreement better than this is never questioned: the digits of the quantities themselves end there. */
const finest = 1e-9;

/** A given on which a number depends less than this (relative over relative) plays no part in a clash. */
const noInfluence = 1e-6;

/**
 * Half a unit of the last digit that a number was given with, from its shortest decimal form.
 *
 * @example roundingOf(0.315) // 0.0005
 */
export function roundingOf(value: number): number {
  const [mantissa, exponent = "0"] = value.toExponential().split("e");
  const places = (mantissa!.split(".")[1] ?? "").length;
  const half = 0.5 * 10 ** (Number(exponent) - places);
  return Math.min(half, coarsestRounding * Math.abs(value)) + finest * Math.abs(value);
}

/**
 * Checks givens beyond need: each must follow from the others within the rounding of all.
 *
 * Throws InconsistentParametersError naming the smallest set of givens that clash and the size of the clash.
 * @returns the names that agree.
 */
export function agreementsOf(
  trial: Trial,
  parameters: Float64Array,
  extra: readonly Equation[],
  where: string,
  place: string | undefined,
): string[] {
  if (extra.length === 0) return [];
  const evaluation = trial.evaluation(parameters, "full");
  for (const equation of extra) {
    const definition = quantityRegister.get(equation.name)!;
    const follows = definition.compute(evaluation, []).value;
    const difference = Math.abs(follows - equation.value);
    let allowed = roundingOf(equation.value) + definition.accuracy * Math.abs(follows);
    if (difference <= allowed) continue;
    const influences = influencesOn(trial, parameters, equation.name, follows);
    for (const { name, value, slope } of influences) {
      const reach = Math.abs(slope) * roundingOf(value);
      if (name !== equation.name) allowed += reach;
    }
    if (difference <= allowed) continue;
    const clash = influences.filter(({ value, slope }) => Math.abs(slope * value) > noInfluence * Math.abs(follows));
    const names = [...clash.map((each) => each.name), equation.name];
    throw new InconsistentParametersError({
      where,
      parameters: names,
      problem: "contradictory",
      reason: `${names.join(", ")} contradict each other: from ${clash.map(({ name, value }) => `${name} ${value}`).join(", ") || "the defaults"} follows ${equation.name} ${follows.toPrecision(8)}, given ${equation.value}; they differ by ${((100 * difference) / Math.abs(follows)).toPrecision(2)}%, ${(difference / allowed).toPrecision(2)} times what rounding allows${place === undefined ? "" : ` (${place})`}`,
      hint: `leave one of them out, or name in solveFor a parameter that ${equation.name} should determine`,
    });
  }
  return extra.map((equation) => equation.name);
}

/** d(quantity)/d(given) for every number given, the open parameters following. */
function influencesOn(trial: Trial, parameters: Float64Array, name: string, center: number) {
  return trial.numberGivens().map(({ name: given, value }) => {
    const step = 1e-4 * (value === 0 ? 1 : Math.abs(value));
    const moved = trial.moved(given, value + step);
    const at = resolved(moved, parameters);
    const changed =
      at === undefined ? center : quantityRegister.get(name)!.compute(moved.evaluation(at, "light"), []).value;
    const base = quantityRegister.get(name)!.compute(trial.evaluation(parameters, "light"), []).value;
    return { name: given, value, slope: at === undefined ? 0 : (changed - base) / step };
  });
}

function resolved(trial: Trial, start: Float64Array): Float64Array | undefined {
  if (start.length === 0) return start;
  const kind = trial.needsTrueHistory ? "full" : "light";
  try {
    return solveSystem((x, out) => trial.residuals(x, out, kind), start, { tolerance: 1e-8, probe: 1e-5 }).values;
  } catch {
    return undefined;
  }
}
