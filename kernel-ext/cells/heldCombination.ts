import type { QuantityRequest } from "../../cosmo/quantities";
import type { ModelNumbers } from "../../cosmo/solve";
import { statedForm } from "./sensitivityParameters";

/** The power law of densities and expansion rate that a quantity follows near a model. */
export interface HeldCombination {
  /** Exponents a, b, c of quantity ~ omega_m^a h^b omega_b^c. */
  readonly exponents: {
    readonly matterDensity: number;
    readonly reducedHubble: number;
    readonly baryonDensity: number;
  };
  /** The same, of length one. */
  readonly unitVector: {
    readonly matterDensity: number;
    readonly reducedHubble: number;
    readonly baryonDensity: number;
  };
  /** d ln Omega_m/d ln h along a constant quantity at fixed omega_b; undefined where omega_m does not move the quantity. */
  readonly matterFractionSlope: number | undefined;
}

const directions = ["matterDensity", "reducedHubble", "baryonDensity"] as const;

/**
 * Which combination of omega_m, h and omega_b a quantity fixes.
 *
 * quantity ~ omega_m^a h^b omega_b^c near the model, everything else held. Along a constant quantity at fixed omega_b,
 * a d ln omega_m + b d ln h = 0, so that d ln Omega_m/d ln h = -(b/a) - 2.
 *
 * Method: gradients of ln quantity and of the three logarithms by the model's own givens, and Cramer's rule.
 * Undefined where the quantity is not positive, or the model does not state all three in one of their forms.
 */
export function heldCombination(numbers: ModelNumbers, request: QuantityRequest): HeldCombination | undefined {
  const { givens, solution } = numbers.model;
  const forms = (["hubble", "coldMatterDensity", "baryonDensity"] as const).map((name) => statedForm(givens, name));
  const quantity = numbers.value(request.name, ...request.arguments);
  const solved = (solution?.solvedFor.length ?? 0) > 0;
  if (solved || !(quantity > 0) || forms.includes(undefined)) return undefined;
  if (directions.some((name) => !(numbers.value(name) > 0))) return undefined;
  const parameters = forms as string[];
  const slopes = (name: string, values: readonly number[]) => {
    const value = numbers.value(name, ...values);
    return parameters.map((each) => numbers.derivative(name, values, each).value / value);
  };
  const columns = directions.map((name) => slopes(name, []));
  const target = slopes(request.name, request.arguments);
  const whole = determinant(columns);
  if (!(Math.abs(whole) > 0)) return undefined;
  const solution3 = directions.map(
    (_, k) => determinant(columns.map((column, i) => (i === k ? target : column))) / whole,
  );
  const [a, b, c] = solution3 as [number, number, number];
  const length = Math.hypot(a, b, c);
  const named = (scale: number) => ({ matterDensity: a * scale, reducedHubble: b * scale, baryonDensity: c * scale });
  if (!(length > 0)) return undefined;
  return {
    exponents: named(1),
    unitVector: named(1 / length),
    matterFractionSlope: Math.abs(a) > 1e-6 * length ? -b / a - 2 : undefined,
  };
}

/** Of a matrix by its three columns. */
function determinant(columns: readonly (readonly number[])[]): number {
  const [x, y, z] = columns as [number[], number[], number[]];
  return (
    x[0]! * (y[1]! * z[2]! - y[2]! * z[1]!) -
    y[0]! * (x[1]! * z[2]! - x[2]! * z[1]!) +
    z[0]! * (x[1]! * y[2]! - x[2]! * y[1]!)
  );
}
