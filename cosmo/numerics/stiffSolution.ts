import { DomainError } from "../errors";
import { STAGES, slopeBubble, stageBubble, stageWeights } from "./radauCoefficients";

/** The solution of a system of differential equations, as a function of t. */
export interface StiffSolution {
  /** Number of equations n. */
  readonly dimension: number;
  /** t at the start and at the end of each step, in the order of integration. */
  readonly mesh: Float64Array;
  /** The solution at the mesh points, n values each. */
  readonly values: Float64Array;
  /** Accepted steps. */
  readonly steps: number;
  /** Steps that were refused, because of their error or because Newton's iteration did not converge. */
  readonly rejected: number;
  /** Calls of the derivative. */
  readonly evaluations: number;
  /** True: whatever does not reach its end throws. */
  readonly converged: boolean;
  /** Sum over the steps of the local error estimates at the mesh points, a component. */
  readonly error: Float64Array;
  /** Largest local error estimate between mesh points, a component. */
  readonly interiorError: Float64Array;
  /** Index of the step that holds t; at a mesh point the step that ends there. Outside the range it throws. */
  locate(t: number): number;
  /** Writes the solution at t to `out`. Outside the range it throws. */
  evaluate(t: number, out: Float64Array): void;
  /** The same when the step is known; t is not checked and extrapolates. */
  evaluateInStep(step: number, t: number, out: Float64Array): void;
}

const INITIAL_STEPS = 192;

/** Collects the steps of an integration, then answers for every t. */
export class StepRecord implements StiffSolution {
  readonly dimension: number;
  mesh: Float64Array;
  values: Float64Array;
  steps = 0;
  rejected = 0;
  evaluations = 0;
  converged = false;
  readonly error: Float64Array;
  readonly interiorError: Float64Array;
  /** Stage increments of each step, 5n values. */
  private increments: Float64Array;
  /** The amounts of Q and of B of each step, n values each. */
  private bubbles: Float64Array;
  private readonly weights = new Float64Array(STAGES);

  constructor(start: number, initial: Float64Array) {
    const n = initial.length;
    this.dimension = n;
    this.mesh = new Float64Array(INITIAL_STEPS + 1);
    this.values = new Float64Array((INITIAL_STEPS + 1) * n);
    this.increments = new Float64Array(INITIAL_STEPS * STAGES * n);
    this.bubbles = new Float64Array(INITIAL_STEPS * 2 * n);
    this.error = new Float64Array(n);
    this.interiorError = new Float64Array(n);
    this.mesh[0] = start;
    this.values.set(initial);
  }

  /**
   * Adds a step that ends at (t, y), with the stage increments z and the amounts of Q and B that improve the polynomial.
   */
  push(t: number, y: Float64Array, z: Float64Array, slopeBubbles: Float64Array, stageBubbles: Float64Array): void {
    const n = this.dimension;
    const k = this.steps;
    if (k + 1 === this.mesh.length) this.resize(2 * k);
    this.mesh[k + 1] = t;
    this.values.set(y, (k + 1) * n);
    this.increments.set(z, k * STAGES * n);
    this.bubbles.set(slopeBubbles, 2 * k * n);
    this.bubbles.set(stageBubbles, (2 * k + 1) * n);
    this.steps = k + 1;
  }

  /** Gives back the memory that was not needed. */
  finish(): void {
    this.resize(this.steps);
    this.converged = true;
  }

  private resize(steps: number): void {
    const n = this.dimension;
    this.mesh = resized(this.mesh, steps + 1);
    this.values = resized(this.values, (steps + 1) * n);
    this.increments = resized(this.increments, steps * STAGES * n);
    this.bubbles = resized(this.bubbles, steps * 2 * n);
  }

  locate(t: number): number {
    const { mesh, steps } = this;
    const sign = mesh[steps] >= mesh[0] ? 1 : -1;
    const place = sign * t;
    if (!(place >= sign * mesh[0] && place <= sign * mesh[steps])) {
      throw new DomainError({
        where: "StiffSolution",
        argument: "t",
        rule: `must lie between ${mesh[0]} and ${mesh[steps]}`,
        value: t,
      });
    }
    let low = 0;
    let high = steps;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (sign * mesh[middle] < place) low = middle;
      else high = middle;
    }
    return low;
  }

  evaluate(t: number, out: Float64Array): void {
    this.evaluateInStep(this.locate(t), t, out);
  }

  evaluateInStep(step: number, t: number, out: Float64Array): void {
    const { dimension: n, weights, increments, bubbles, mesh } = this;
    const tau = (t - mesh[step]) / (mesh[step + 1] - mesh[step]);
    stageWeights(tau, weights);
    const slope = slopeBubble(tau);
    const stage = stageBubble(tau);
    for (let c = 0; c < n; c++) {
      let sum = slope * bubbles[2 * step * n + c] + stage * bubbles[(2 * step + 1) * n + c];
      for (let i = 0, at = step * STAGES * n + c; i < STAGES; i++, at += n) sum += weights[i] * increments[at];
      out[c] = this.values[step * n + c] + sum;
    }
  }
}

function resized(from: Float64Array, length: number): Float64Array {
  const to = new Float64Array(length);
  to.set(length < from.length ? from.subarray(0, length) : from);
  return to;
}
