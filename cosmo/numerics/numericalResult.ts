/** A number found by a numerical method, with what is needed to judge it. */
export interface NumericalResult {
  /** The estimate. */
  value: number;
  /** Estimate of the absolute error of `value`, at least the round-off of the computation. */
  error: number;
  /** How often the user's function was called. */
  evaluations: number;
  /** Whether the tolerance asked for was met. */
  converged: boolean;
}
