import { DomainError, NotConvergedError } from "../errors";
import {
  addedNodeKronrodWeights,
  addedNodes,
  centerKronrodWeight,
  gaussNodeKronrodWeights,
  gaussNodes,
  gaussWeights,
} from "./gaussKronrod";
import type { NumericalResult } from "./numericalResult";

/** What `integrate` may be asked for. */
export interface IntegrateOptions {
  /** Tolerance relative to the integral; 1e-12 unless given. */
  relative?: number;
  /** Absolute tolerance; 0 unless given. The looser of the two counts. */
  absolute?: number;
  /** Most subintervals; 1000 unless given. */
  maximumIntervals?: number;
  /** Points inside the range where the integrand or a derivative jumps; no panel straddles one. */
  breakpoints?: readonly number[];
}

/** Round-off charged to a panel, in units of its integral of |f|: 50 machine epsilons, as QUADPACK does. */
const ROUND_OFF = 50 * Number.EPSILON;
/** Fruitless bisections after which noise in the integrand is taken for granted. */
const FRUITLESS_LIMIT = 12;
const NODES = 21;
/** Fields of one subinterval: lower, upper, integral, error, integral of |f|. */
const FIELDS = 5;

/** Scratch memory of one running call; integrands may themselves integrate, so there is one a nesting depth. */
interface Workspace {
  samples: Float64Array;
  intervals: Float64Array;
  integral: number;
  error: number;
  magnitude: number;
}

const workspaces: Workspace[] = [];
let depth = 0;

function enter(): Workspace {
  if (depth === workspaces.length) {
    workspaces.push({
      samples: new Float64Array(NODES),
      intervals: new Float64Array(FIELDS * 32),
      integral: 0,
      error: 0,
      magnitude: 0,
    });
  }
  return workspaces[depth++] as Workspace;
}

function sample(f: (x: number) => number, x: number): number {
  const y = f(x);
  if (!Number.isFinite(y)) {
    throw new NotConvergedError({ where: "integrate", reason: `the integrand is ${y} at x = ${x}`, value: x });
  }
  return y;
}

/** Applies the pair of rules to [lower, upper]; leaves integral, error and integral of |f| in the workspace. */
function panel(f: (x: number) => number, lower: number, upper: number, work: Workspace): void {
  const { samples } = work;
  const center = 0.5 * (lower + upper);
  const half = 0.5 * (upper - lower);
  const middle = sample(f, center);
  samples[20] = middle;
  let kronrod = centerKronrodWeight * middle;
  let gauss = 0;
  let magnitude = centerKronrodWeight * Math.abs(middle);
  for (let i = 0; i < 5; i++) {
    const offset = half * gaussNodes[i];
    const left = sample(f, center - offset);
    const right = sample(f, center + offset);
    samples[4 * i] = left;
    samples[4 * i + 1] = right;
    gauss += gaussWeights[i] * (left + right);
    kronrod += gaussNodeKronrodWeights[i] * (left + right);
    magnitude += gaussNodeKronrodWeights[i] * (Math.abs(left) + Math.abs(right));
  }
  for (let i = 0; i < 5; i++) {
    const offset = half * addedNodes[i];
    const left = sample(f, center - offset);
    const right = sample(f, center + offset);
    samples[4 * i + 2] = left;
    samples[4 * i + 3] = right;
    kronrod += addedNodeKronrodWeights[i] * (left + right);
    magnitude += addedNodeKronrodWeights[i] * (Math.abs(left) + Math.abs(right));
  }
  const mean = 0.5 * kronrod;
  let spread = centerKronrodWeight * Math.abs(middle - mean);
  for (let i = 0; i < 5; i++) {
    spread += gaussNodeKronrodWeights[i] * (Math.abs(samples[4 * i] - mean) + Math.abs(samples[4 * i + 1] - mean));
    spread += addedNodeKronrodWeights[i] * (Math.abs(samples[4 * i + 2] - mean) + Math.abs(samples[4 * i + 3] - mean));
  }
  // |K - G| is the error of the poorer rule; the power 3/2 carries it over to the better one (QUADPACK 1983).
  const width = Math.abs(half);
  const difference = Math.abs((kronrod - gauss) * half);
  spread *= width;
  magnitude *= width;
  let error = difference;
  if (spread > 0 && difference > 0) {
    const ratio = (200 * difference) / spread;
    error = spread * Math.min(1, ratio * Math.sqrt(ratio));
  }
  work.integral = kronrod * half;
  work.magnitude = magnitude;
  work.error = Math.max(error, ROUND_OFF * magnitude);
}

function store(work: Workspace, index: number, lower: number, upper: number): void {
  const needed = FIELDS * (index + 1);
  if (needed > work.intervals.length) {
    const larger = new Float64Array(2 * work.intervals.length);
    larger.set(work.intervals);
    work.intervals = larger;
  }
  const at = FIELDS * index;
  work.intervals[at] = lower;
  work.intervals[at + 1] = upper;
  work.intervals[at + 2] = work.integral;
  work.intervals[at + 3] = work.error;
  work.intervals[at + 4] = work.magnitude;
}

/**
 * Integral of a function over a finite interval, adaptively.
 *
 * I = int_lower^upper f(x) dx
 *
 * @param f - integrand; it is never called at the limits or at a breakpoint
 * @param lower - lower limit, finite
 * @param upper - upper limit, finite; below `lower` the integral changes its sign
 * @param options - tolerances (the looser one counts), most subintervals, breakpoints
 * @returns the integral; `converged` is false when the tolerance was not met with `maximumIntervals` or because of noise
 *   in the integrand. A tolerance below the round-off of the sum, 2.2e-14 int |f|, counts as met once that is reached;
 *   `error` never falls below half of it.
 *
 * A value of `f` that is not finite throws NotConvergedError with the x; a bad limit or option throws DomainError.
 *
 * Method: Gauss-Kronrod pair with 10 and 21 nodes; the subinterval with the largest error is bisected until the sum of
 * the errors is below the tolerance. A single panel is never believed by itself: its two halves must give the same.
 * Accuracy: relative 1e-12 by default; the error estimate holds in at least 99% of the families in the tests. It takes f
 * for smooth: noise in f below about 1e-7 of its variation may exceed it.
 * Source: Piessens, de Doncker-Kapenga, Ueberhuber & Kahaner 1983, QUADPACK (the error estimate and its round-off floor);
 * Kronrod 1965 (the rule).
 *
 * @example
 * integrate((x) => 1 / (1 + x * x), 0, 1).value; // 0.785398163397448...
 */
export function integrate(
  f: (x: number) => number,
  lower: number,
  upper: number,
  options: IntegrateOptions = {},
): NumericalResult {
  const { relative = 1e-12, absolute = 0, maximumIntervals = 1000, breakpoints } = options;
  const where = "integrate";
  if (!Number.isFinite(lower))
    throw new DomainError({ where, argument: "lower", rule: "must be finite", value: lower });
  if (!Number.isFinite(upper))
    throw new DomainError({ where, argument: "upper", rule: "must be finite", value: upper });
  if (!(relative >= 0)) throw new DomainError({ where, argument: "relative", rule: "must be >= 0", value: relative });
  if (!(absolute >= 0)) throw new DomainError({ where, argument: "absolute", rule: "must be >= 0", value: absolute });
  if (!(maximumIntervals >= 1)) {
    throw new DomainError({ where, argument: "maximumIntervals", rule: "must be at least 1", value: maximumIntervals });
  }
  if (lower === upper) return { value: 0, error: 0, evaluations: 0, converged: true };
  const work = enter();
  try {
    if (breakpoints === undefined || breakpoints.length === 0) {
      panel(f, lower, upper, work);
      const tolerance = Math.max(absolute, relative * Math.abs(work.integral), 2 * ROUND_OFF * work.magnitude);
      if (work.error <= tolerance && maximumIntervals > 1) return confirm(f, work, lower, upper, tolerance, options);
      store(work, 0, lower, upper);
      return refine(f, work, 1, relative, absolute, maximumIntervals);
    }
    let count = 0;
    let left = lower;
    for (const right of [...insideInOrder(breakpoints, lower, upper), upper]) {
      panel(f, left, right, work);
      store(work, count++, left, right);
      left = right;
    }
    return refine(f, work, count, relative, absolute, Math.max(maximumIntervals, count));
  } finally {
    depth--;
  }
}

/**
 * A second opinion on a single panel that claims to have converged: the two rules can agree by chance, and then nothing else
 * would be asked (seen: a claim of 6e-13 with a true error of 1.7e-8). The halves are integrated too; where their sum is not the whole's
 * within the tolerance, refinement goes on from them.
 */
function confirm(
  f: (x: number) => number,
  work: Workspace,
  lower: number,
  upper: number,
  tolerance: number,
  options: IntegrateOptions,
): NumericalResult {
  const whole = work.integral;
  const middle = 0.5 * (lower + upper);
  panel(f, lower, middle, work);
  store(work, 0, lower, middle);
  const left = work.integral;
  const leftError = work.error;
  panel(f, middle, upper, work);
  store(work, 1, middle, upper);
  const value = left + work.integral;
  const error = leftError + work.error;
  if (error <= tolerance && Math.abs(value - whole) <= tolerance) {
    return { value, error, evaluations: 3 * NODES, converged: true };
  }
  const { relative = 1e-12, absolute = 0, maximumIntervals = 1000 } = options;
  const result = refine(f, work, 2, relative, absolute, Math.max(2, maximumIntervals));
  return { ...result, evaluations: result.evaluations + NODES };
}

/** The breakpoints strictly between the limits, once each, in the order of integration. */
function insideInOrder(breakpoints: readonly number[], lower: number, upper: number): number[] {
  const low = Math.min(lower, upper);
  const high = Math.max(lower, upper);
  for (const point of breakpoints) {
    if (Number.isNaN(point)) {
      throw new DomainError({ where: "integrate", argument: "breakpoints", rule: "must be numbers", value: point });
    }
  }
  const inside = [...new Set(breakpoints)].filter((point) => point > low && point < high).sort((a, b) => a - b);
  return upper < lower ? inside.reverse() : inside;
}

function refine(
  f: (x: number) => number,
  work: Workspace,
  initialCount: number,
  relative: number,
  absolute: number,
  maximumIntervals: number,
): NumericalResult {
  let count = initialCount;
  let evaluations = NODES * count;
  let fruitless = 0;
  for (;;) {
    // Summing afresh each time keeps the round-off of the totals to that of one sum; the panels cost far more.
    const { intervals } = work;
    let value = 0;
    let error = 0;
    let magnitude = 0;
    let worst = -1;
    let worstError = 0;
    for (let i = 0, at = 0; i < count; i++, at += FIELDS) {
      value += intervals[at + 2];
      error += intervals[at + 3];
      magnitude += intervals[at + 4];
      // A panel at its round-off floor cannot gain by bisection.
      if (intervals[at + 3] > worstError && intervals[at + 3] > ROUND_OFF * intervals[at + 4]) {
        worst = i;
        worstError = intervals[at + 3];
      }
    }
    const converged = error <= Math.max(absolute, relative * Math.abs(value), 2 * ROUND_OFF * magnitude);
    if (converged || worst < 0 || count >= maximumIntervals || fruitless >= FRUITLESS_LIMIT) {
      return { value, error, evaluations, converged };
    }
    const at = FIELDS * worst;
    const lower = intervals[at];
    const upper = intervals[at + 1];
    const before = intervals[at + 2];
    const middle = 0.5 * (lower + upper);
    if (!(Math.abs(upper - lower) > 64 * Number.EPSILON * Math.abs(middle))) {
      return { value, error, evaluations, converged: false };
    }
    panel(f, lower, middle, work);
    store(work, worst, lower, middle);
    const after = work.integral;
    const errorAfter = work.error;
    panel(f, middle, upper, work);
    store(work, count++, middle, upper);
    evaluations += 2 * NODES;
    const still = Math.abs(after + work.integral - before) <= 1e-5 * Math.abs(before);
    if (still && errorAfter + work.error >= 0.99 * worstError) fruitless++;
  }
}
