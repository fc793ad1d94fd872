import { NotConvergedError } from "../errors";
import { factorReal, solveReal } from "./luDecomposition";

/** Options of {@link solveSystem}. */
export interface SolveSystemOptions {
  /** Converged when every residual is below this; residuals should be scaled to be of order one. */
  tolerance?: number;
  /** A first guess at how far each unknown moves when it is probed for the slopes. */
  probe?: number | Float64Array;
  /** Longest step allowed in any unknown at once. */
  longestStep?: number | Float64Array;
  maximumEvaluations?: number;
}

/** What {@link solveSystem} found. */
export interface SystemSolution {
  readonly values: Float64Array;
  /** Largest residual left. */
  readonly residual: number;
  readonly evaluations: number;
}

/**
 * Solves f(x) = 0 for as many unknowns as equations.
 *
 * Newton's method with a difference Jacobian taken once and kept up by Broyden's rank-one updates (Broyden 1965); steps are
 * shortened where f refuses (returns undefined: outside its domain) or where the residuals grow fourfold.
 *
 * @param residuals writes f(x) to `out`; returns false where it has no value.
 * Throws NotConvergedError with where it stood. For one unknown this is the secant method.
 */
export function solveSystem(
  residuals: (x: Float64Array, out: Float64Array) => boolean,
  start: Float64Array,
  options: SolveSystemOptions = {},
): SystemSolution {
  const n = start.length;
  const tolerance = options.tolerance ?? 1e-12;
  const limit = options.maximumEvaluations ?? 200;
  const each = (value: number | Float64Array | undefined, fallback: number, i: number) =>
    typeof value === "number" ? value : (value?.[i] ?? fallback);
  let evaluations = 0;
  const evaluate = (x: Float64Array, out: Float64Array) => {
    evaluations++;
    return residuals(x, out);
  };
  const x = Float64Array.from(start);
  const f = new Float64Array(n);
  if (!evaluate(x, f)) throw refused("there is no value at the starting point", x, evaluations);
  const norm = (vector: Float64Array) => vector.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  const jacobian = new Float64Array(n * n);
  const trial = new Float64Array(n);
  const fTrial = new Float64Array(n);

  const takeJacobian = () => {
    for (let j = 0; j < n; j++) {
      let step = each(options.probe, 1e-4, j);
      trial.set(x);
      trial[j]! += step;
      if (!evaluate(trial, fTrial)) {
        step = -step;
        trial[j] = x[j]! + step;
        if (!evaluate(trial, fTrial)) throw refused("there is no value beside the point", x, evaluations);
      }
      for (let i = 0; i < n; i++) jacobian[i * n + j] = (fTrial[i]! - f[i]!) / step;
    }
  };

  let fresh = false;
  if (norm(f) > tolerance) {
    takeJacobian();
    fresh = true;
  }
  while (norm(f) > tolerance) {
    if (evaluations > limit) throw refused(`residual ${norm(f).toExponential(2)} left`, x, evaluations);
    const change = linearSolution(jacobian, f, n);
    if (change === undefined) {
      if (fresh) throw refused("the equations do not depend on the unknowns independently", x, evaluations);
      takeJacobian();
      fresh = true;
      continue;
    }
    let shorten = 1;
    for (let j = 0; j < n; j++) {
      const longest = each(options.longestStep, Number.POSITIVE_INFINITY, j);
      shorten = Math.min(shorten, longest / Math.max(Math.abs(change[j]!), 1e-300));
    }
    const before = norm(f);
    let accepted = false;
    for (let attempt = 0; attempt < 12 && !accepted; attempt++, shorten /= 3) {
      for (let j = 0; j < n; j++) trial[j] = x[j]! - shorten * change[j]!;
      accepted = evaluate(trial, fTrial) && norm(fTrial) < 4 * before;
    }
    if (!accepted) {
      if (fresh) throw refused(`no step makes the residual ${before.toExponential(2)} smaller`, x, evaluations);
      takeJacobian();
      fresh = true;
      continue;
    }
    const moved = trial.map((value, j) => value - x[j]!);
    const length = moved.reduce((sum, value) => sum + value * value, 0);
    // Steps at the limit of the digits: nothing smaller will be found.
    if (length === 0) break;
    for (let i = 0; i < n; i++) {
      let foretold = 0;
      for (let j = 0; j < n; j++) foretold += jacobian[i * n + j]! * moved[j]!;
      const surprise = (fTrial[i]! - f[i]! - foretold) / length;
      for (let j = 0; j < n; j++) jacobian[i * n + j]! += surprise * moved[j]!;
    }
    x.set(trial);
    f.set(fTrial);
    fresh = false;
    // Noise in f ends the search where updates only chase it.
    if (norm(f) > 0.5 * before && norm(f) < 100 * tolerance) break;
  }
  return { values: x, residual: norm(f), evaluations };
}

function refused(reason: string, x: Float64Array, evaluations: number): NotConvergedError {
  const at = Array.from(x, (value) => value.toPrecision(6)).join(", ");
  return new NotConvergedError({ where: "solveSystem", reason: `${reason}, at (${at})`, evaluations });
}

/** The solution of a small dense system; undefined where the matrix is singular to rounding. */
function linearSolution(matrix: Float64Array, right: Float64Array, n: number): Float64Array | undefined {
  const factored = Float64Array.from(matrix);
  const pivots = new Int32Array(n);
  if (!factorReal(factored, n, pivots)) return undefined;
  const scale = matrix.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  for (let i = 0; i < n; i++) if (!(Math.abs(factored[i * n + i]!) > 1e-13 * scale)) return undefined;
  const solution = Float64Array.from(right);
  solveReal(factored, n, pivots, solution);
  return solution;
}
