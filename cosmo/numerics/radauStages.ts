import { NotConvergedError } from "../errors";
import {
  complexEigenvalues,
  inverseTransformation,
  nodes,
  realEigenvalue,
  STAGES,
  slopeBubble,
  stageBubble,
  stageWeights,
  transformation,
} from "./radauCoefficients";
import { RadauMatrices } from "./radauMatrices";
import type { StiffSystem } from "./stiff";

/** Beyond this ratio of two steps the polynomial of the step before is no guide. */
const LONGEST_EXTRAPOLATION = 5;
const MAXIMUM_ITERATIONS = 12;
/** Below this rate of convergence the Jacobian is kept for the next step. */
const KEEP_JACOBIAN = 1e-4;
/** Newton's iteration stops at this part of the tolerance. */
const NEWTON_PART = 0.02;
/** Changes that no longer shrink are put down to round-off below this many such parts. */
const ROUND_OFF_LEVEL = 5;

/**
 * The stages of a five-stage Radau IIA step, found by simplified Newton iteration from what the step before foresees.
 * All memory is taken at construction; nothing is allocated in a step.
 *
 * Source: Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.8.
 */
export class RadauStages {
  /** Where the integration stands. */
  t: number;
  readonly y: Float64Array;
  /** f(t, y), and the tolerance of each component there. */
  readonly slope: Float64Array;
  readonly tolerance: Float64Array;
  /** Stage increments Y_i - y, stage by stage. */
  readonly z: Float64Array;
  readonly matrices: RadauMatrices;
  evaluations = 0;
  /** Newton iterations of the last attempt. */
  iterations = 0;
  /** By how much to shorten the step after a failed attempt. */
  reduction = 0.5;

  /** The step before, 0 if there was none: its size, stage increments, and amounts of Q and B (see radauCoefficients). */
  stepBefore = 0;
  readonly zBefore: Float64Array;
  readonly slopeBubblesBefore: Float64Array;
  readonly stageBubblesBefore: Float64Array;

  private readonly n: number;
  private factoredStep = 0;
  private contraction = 1;
  private rate = 1;
  /** z times T^-1. */
  private readonly w: Float64Array;
  private readonly stageSlopes: Float64Array[];
  /** Right-hand sides of the linear systems, then the changes of w. */
  private readonly change: Float64Array[];
  private readonly point: Float64Array;
  private readonly weights = new Float64Array(STAGES);

  constructor(
    readonly system: StiffSystem,
    start: number,
    initial: Float64Array,
    private readonly absolute: Float64Array,
    private readonly relative: number,
  ) {
    const n = initial.length;
    const vectors = () => Array.from({ length: STAGES }, () => new Float64Array(n));
    this.n = n;
    this.t = start;
    this.y = Float64Array.from(initial);
    this.slope = new Float64Array(n);
    this.tolerance = new Float64Array(n);
    this.z = new Float64Array(STAGES * n);
    this.w = new Float64Array(STAGES * n);
    this.matrices = new RadauMatrices(n);
    this.zBefore = new Float64Array(STAGES * n);
    this.slopeBubblesBefore = new Float64Array(n);
    this.stageBubblesBefore = new Float64Array(n);
    this.stageSlopes = vectors();
    this.change = vectors();
    this.point = new Float64Array(n);
    this.arrive(start);
  }

  /** f and the tolerances at (t, y), y being set; throws if f is not finite. */
  arrive(t: number): void {
    const { n, y, slope, tolerance } = this;
    this.t = t;
    this.system.derivative(t, y, slope);
    this.evaluations++;
    for (let c = 0; c < n; c++) {
      tolerance[c] = this.absolute[c] + this.relative * Math.abs(y[c]);
      if (!Number.isFinite(slope[c])) {
        throw new NotConvergedError({
          where: "solveStiff",
          reason: `the derivative is not finite at t = ${t}: [${Array.from(slope).join(", ")}]`,
          value: t,
          evaluations: this.evaluations,
        });
      }
    }
  }

  /** Finds the stages of a step of size h; false if Newton's iteration does not converge (see `reduction`). */
  attempt(h: number): boolean {
    this.reduction = 0.5;
    const rateBefore = this.rate;
    const keep = rateBefore <= KEEP_JACOBIAN;
    // The next attempt takes the Jacobian anew, unless this one succeeds.
    this.rate = 1;
    if (!this.predict(h)) return false;
    if (keep) {
      if ((this.factoredStep === h || this.factor(h)) && this.iterate(h)) {
        // A single iteration shows no rate: the Jacobian is as good as it was.
        if (this.iterations === 1) this.rate = rateBefore;
        return true;
      }
      if (!this.predict(h)) return false;
    }
    this.linearize(h);
    if (this.factor(h) && this.iterate(h)) return true;
    this.rate = 1;
    return false;
  }

  private factor(h: number): boolean {
    this.factoredStep = h;
    return this.matrices.factor(h);
  }

  /** Start values of the stages: the polynomial of the step before goes on. False if f is not finite there. */
  private predict(h: number): boolean {
    const { n, z, w, zBefore, slopeBubblesBefore, stageBubblesBefore, weights, stepBefore } = this;
    const ratio = h / stepBefore;
    if (stepBefore === 0 || ratio > LONGEST_EXTRAPOLATION) {
      z.fill(0);
      w.fill(0);
      return this.evaluateStages(h);
    }
    for (let i = 0; i < STAGES; i++) {
      const tau = 1 + nodes[i] * ratio;
      stageWeights(tau, weights);
      const slope = slopeBubble(tau);
      const stage = stageBubble(tau);
      for (let c = 0; c < n; c++) {
        let sum = slope * slopeBubblesBefore[c] + stage * stageBubblesBefore[c] - zBefore[(STAGES - 1) * n + c];
        for (let j = 0; j < STAGES; j++) sum += weights[j] * zBefore[j * n + c];
        z[i * n + c] = sum;
      }
    }
    for (let c = 0; c < n; c++) {
      for (let i = 0; i < STAGES; i++) {
        let sum = 0;
        for (let j = 0; j < STAGES; j++) sum += inverseTransformation[i * STAGES + j] * z[j * n + c];
        w[i * n + c] = sum;
      }
    }
    return this.evaluateStages(h);
  }

  /** f at the stages; false if it is not finite. */
  private evaluateStages(h: number): boolean {
    const { n, t, y, z, stageSlopes, point } = this;
    for (let i = 0; i < STAGES; i++) {
      const slopes = stageSlopes[i];
      for (let c = 0; c < n; c++) point[c] = y[c] + z[i * n + c];
      this.system.derivative(t + nodes[i] * h, point, slopes);
      this.evaluations++;
      for (let c = 0; c < n; c++) if (!Number.isFinite(slopes[c])) return false;
    }
    return true;
  }

  /**
   * The Jacobian by forward differences, at the foreseen third stage: near the middle of the step it differs less from
   * that of the other stages than at the start, and f is known there.
   */
  private linearize(h: number): void {
    const { n, y, z, point, absolute } = this;
    const { jacobian } = this.matrices;
    const middle = this.t + nodes[2] * h;
    const base = this.stageSlopes[2];
    const shifted = this.change[0];
    for (let c = 0; c < n; c++) point[c] = y[c] + z[2 * n + c];
    for (let j = 0; j < n; j++) {
      const held = point[j];
      // The absolute tolerance is what the caller holds for small in this component.
      point[j] = held + Math.max(Math.sqrt(Number.EPSILON) * Math.abs(held), absolute[j]);
      const increment = point[j] - held;
      this.system.derivative(middle, point, shifted);
      for (let i = 0; i < n; i++) jacobian[i * n + j] = (shifted[i] - base[i]) / increment;
      point[j] = held;
    }
    this.evaluations += n;
    this.factoredStep = 0;
  }

  /** Newton's iteration from z, w and f at the stages. */
  private iterate(h: number): boolean {
    const { n, y, z, w, tolerance } = this;
    const [change0, change1, change2, change3, change4] = this.change;
    const T = transformation;
    let eta = Math.max(this.contraction, Number.EPSILON) ** 0.8;
    let normBefore = 0;
    let ratioBefore = 0;
    for (let iteration = 1; ; iteration++) {
      this.iterations = iteration;
      this.solveForChange(h);
      let norm = 0;
      for (let c = 0; c < n; c++) {
        const d0 = change0[c];
        const d1 = change1[c];
        const d2 = change2[c];
        const d3 = change3[c];
        const d4 = change4[c];
        w[c] += d0;
        w[n + c] += d1;
        w[2 * n + c] += d2;
        w[3 * n + c] += d3;
        w[4 * n + c] += d4;
        let largest = 0;
        for (let i = 0, at = 0; i < STAGES; i++, at += STAGES) {
          const sum = T[at] * d0 + T[at + 1] * d1 + T[at + 2] * d2 + T[at + 3] * d3 + T[at + 4] * d4;
          z[i * n + c] += sum;
          // Written so that NaN is kept.
          if (!(Math.abs(sum) <= largest)) largest = Math.abs(sum);
        }
        largest /= Math.max(NEWTON_PART * tolerance[c], 8 * Number.EPSILON * Math.abs(y[c]));
        if (!(largest <= norm)) norm = largest;
      }
      if (!(norm < Number.POSITIVE_INFINITY)) return false;
      if (iteration > 1) {
        const ratio = norm / normBefore;
        const rate = iteration === 2 ? ratio : Math.sqrt(ratio * ratioBefore);
        ratioBefore = ratio;
        this.rate = rate;
        if (!(rate < 0.99)) {
          // At the level of round-off the changes no longer shrink.
          return norm <= ROUND_OFF_LEVEL;
        }
        eta = rate / (1 - rate);
        const predicted = eta * norm * rate ** (MAXIMUM_ITERATIONS - iteration);
        if (predicted > 1) {
          this.reduction = 0.8 * Math.max(1e-4, Math.min(20, predicted)) ** (-1 / (4 + MAXIMUM_ITERATIONS - iteration));
          return false;
        }
      }
      normBefore = norm;
      if (eta * norm <= 1) {
        this.contraction = eta;
        return true;
      }
      if (iteration >= MAXIMUM_ITERATIONS || !this.evaluateStages(h)) return false;
    }
  }

  /** One linear solve of the simplified Newton iteration, in the transformed variables; the result is in `change`. */
  private solveForChange(h: number): void {
    const { n, w, change } = this;
    const [slopes0, slopes1, slopes2, slopes3, slopes4] = this.stageSlopes;
    const [change0, change1, change2, change3, change4] = change;
    const T = inverseTransformation;
    const inverse = 1 / h;
    const gamma = realEigenvalue * inverse;
    const alpha1 = complexEigenvalues[0].alpha * inverse;
    const beta1 = complexEigenvalues[0].beta * inverse;
    const alpha2 = complexEigenvalues[1].alpha * inverse;
    const beta2 = complexEigenvalues[1].beta * inverse;
    for (let c = 0; c < n; c++) {
      const s0 = slopes0[c];
      const s1 = slopes1[c];
      const s2 = slopes2[c];
      const s3 = slopes3[c];
      const s4 = slopes4[c];
      const w1 = w[n + c];
      const w2 = w[2 * n + c];
      const w3 = w[3 * n + c];
      const w4 = w[4 * n + c];
      change0[c] = T[0] * s0 + T[1] * s1 + T[2] * s2 + T[3] * s3 + T[4] * s4 - gamma * w[c];
      change1[c] = T[5] * s0 + T[6] * s1 + T[7] * s2 + T[8] * s3 + T[9] * s4 - (alpha1 * w1 + beta1 * w2);
      change2[c] = T[10] * s0 + T[11] * s1 + T[12] * s2 + T[13] * s3 + T[14] * s4 - (alpha1 * w2 - beta1 * w1);
      change3[c] = T[15] * s0 + T[16] * s1 + T[17] * s2 + T[18] * s3 + T[19] * s4 - (alpha2 * w3 + beta2 * w4);
      change4[c] = T[20] * s0 + T[21] * s1 + T[22] * s2 + T[23] * s3 + T[24] * s4 - (alpha2 * w4 - beta2 * w3);
    }
    this.matrices.solve(change);
  }
}
