import { NotConvergedError } from "../errors";
import { factorComplex, factorReal, solveComplex, solveReal } from "./luDecomposition";
import {
  complexEigenvalues,
  endSlopeWeights,
  inverseTransformation,
  LARGEST_SLOPE_BUBBLE,
  LARGEST_STAGE_BUBBLE,
  nodes,
  realEigenvalue,
  STAGES,
  stageBubble,
  stageWeights,
  startSlopeWeights,
  transformation,
} from "./radauCoefficients";
import type { StiffSystem } from "./stiff";
import type { StepRecord } from "./stiffSolution";

/** Beyond this ratio of two steps the polynomial of the step before is no guide. */
const LONGEST_EXTRAPOLATION = 5;
const MAXIMUM_ITERATIONS = 12;
/** Below this rate of convergence the Jacobian is kept for the next step. */
const KEEP_JACOBIAN = 1e-4;
/** Newton's iteration stops at this part of the tolerance. */
const NEWTON_PART = 0.02;
/**
 * The embedded formula has a local error e ~ h^6 where the method has ~ h^10. With the largest increment d ~ h over the
 * step the method's error is K e (e/d)^0.8. K = 2 for an exponential (error constants 1.05e-5 and 2.2e-9); derivatives
 * that grow like k!, as near a pole, give 52.
 */
const MESH_FACTOR = 20;
/**
 * One step of the five-stage Radau IIA method: stages by simplified Newton iteration, error estimate, acceptance.
 * All memory is taken at construction; nothing is allocated in a step.
 */
export class RadauStep {
  /** Where the integration stands. */
  t: number;
  readonly y: Float64Array;
  evaluations = 0;
  /** Newton iterations of the last attempt. */
  iterations = 0;
  /** By how much to shorten the step after a failed attempt. */
  reduction = 0.5;

  private readonly n: number;
  private readonly slope: Float64Array;
  private readonly jacobian: Float64Array;
  private factoredStep = 0;
  private contraction = 1;
  private rate = 1;
  private readonly real: Float64Array;
  private readonly complexRe: Float64Array[];
  private readonly complexIm: Float64Array[];
  private readonly pivots: Int32Array[];
  /** Stage increments, stage by stage, and the same times T^-1. */
  private readonly z: Float64Array;
  private readonly w: Float64Array;
  /** f at the stages; the right-hand sides and then the changes of w. */
  private readonly stageSlopes: Float64Array[];
  private readonly change: Float64Array[];
  private readonly point: Float64Array;
  private readonly tolerance: Float64Array;
  private readonly errors: Float64Array;
  private readonly meshErrors: Float64Array;
  private readonly interiorErrors: Float64Array;
  /** How stiff each component is, 0 to 1, and what its polynomial wants of Q and B (see radauCoefficients). */
  private readonly stiffness: Float64Array;
  private readonly slopeBubbles: Float64Array;
  private readonly stageBubbles: Float64Array;
  /** Stage increments of the step before, for the start values. */
  private readonly zBefore: Float64Array;
  private stepBefore = 0;
  private readonly weights = new Float64Array(STAGES);

  constructor(
    private readonly system: StiffSystem,
    start: number,
    initial: Float64Array,
    private readonly absolute: Float64Array,
    private readonly relative: number,
    private readonly interior: number,
  ) {
    const n = initial.length;
    const vectors = () => Array.from({ length: STAGES }, () => new Float64Array(n));
    this.n = n;
    this.t = start;
    this.y = Float64Array.from(initial);
    this.slope = new Float64Array(n);
    this.jacobian = new Float64Array(n * n);
    this.real = new Float64Array(n * n);
    this.complexRe = [new Float64Array(n * n), new Float64Array(n * n)];
    this.complexIm = [new Float64Array(n * n), new Float64Array(n * n)];
    this.pivots = [new Int32Array(n), new Int32Array(n), new Int32Array(n)];
    this.z = new Float64Array(STAGES * n);
    this.w = new Float64Array(STAGES * n);
    this.zBefore = new Float64Array(STAGES * n);
    this.stageSlopes = vectors();
    this.change = vectors();
    this.point = new Float64Array(n);
    this.tolerance = new Float64Array(n);
    this.errors = new Float64Array(n);
    this.meshErrors = new Float64Array(n);
    this.interiorErrors = new Float64Array(n);
    this.stiffness = new Float64Array(n);
    this.slopeBubbles = new Float64Array(n);
    this.stageBubbles = new Float64Array(n);
    if (!this.refreshSlope()) {
      throw new NotConvergedError({
        where: "solveStiff",
        reason: `the derivative is not finite at the start, t = ${start}: [${Array.from(this.slope).join(", ")}]`,
        value: start,
      });
    }
  }

  /** f and the tolerances at (t, y); false if f is not finite. */
  private refreshSlope(): boolean {
    const { n, y, slope, tolerance } = this;
    this.system.derivative(this.t, y, slope);
    this.evaluations++;
    let finite = true;
    for (let c = 0; c < n; c++) {
      tolerance[c] = this.absolute[c] + this.relative * Math.abs(y[c]);
      finite = finite && Number.isFinite(slope[c]);
    }
    return finite;
  }

  /**
   * The Jacobian by forward differences, in the middle of the step as the polynomial of the step before foresees it: there
   * it differs less from the stages than at the start. Without a step before it is taken at the start.
   */
  private linearize(h: number): void {
    const { n, y, zBefore, weights, point, jacobian, absolute, stepBefore } = this;
    const base = this.change[0];
    const shifted = this.change[1];
    point.set(y);
    let middle = this.t;
    let finite = false;
    if (stepBefore !== 0 && h / stepBefore <= LONGEST_EXTRAPOLATION) {
      middle += 0.5 * h;
      stageWeights(1 + (0.5 * h) / stepBefore, weights);
      for (let c = 0; c < n; c++) {
        for (let i = 0; i < STAGES; i++) point[c] += weights[i] * zBefore[i * n + c];
        point[c] -= zBefore[(STAGES - 1) * n + c];
      }
      this.system.derivative(middle, point, base);
      this.evaluations++;
      finite = true;
      for (let c = 0; c < n; c++) finite = finite && Number.isFinite(base[c]);
    }
    if (!finite) {
      middle = this.t;
      point.set(y);
      base.set(this.slope);
    }
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

  /** Factors gamma/h I - J and (alpha - i beta)/h I - J. */
  private factor(h: number): boolean {
    const { n, real, jacobian } = this;
    for (let k = 0; k < n * n; k++) real[k] = -jacobian[k];
    for (let k = 0; k < n; k++) real[k * n + k] += realEigenvalue / h;
    if (!factorReal(real, n, this.pivots[0])) return false;
    for (let p = 0; p < 2; p++) {
      const re = this.complexRe[p];
      const im = this.complexIm[p];
      const { alpha, beta } = complexEigenvalues[p];
      for (let k = 0; k < n * n; k++) {
        re[k] = -jacobian[k];
        im[k] = 0;
      }
      for (let k = 0; k < n; k++) {
        re[k * n + k] += alpha / h;
        im[k * n + k] = -beta / h;
      }
      if (!factorComplex(re, im, n, this.pivots[1 + p])) return false;
    }
    this.factoredStep = h;
    return true;
  }

  /** Start values of the stages: the polynomial of the step before goes on. */
  private predict(h: number): void {
    const { n, z, w, zBefore, weights, stepBefore } = this;
    const ratio = h / stepBefore;
    if (stepBefore === 0 || ratio > LONGEST_EXTRAPOLATION) {
      z.fill(0);
      w.fill(0);
      return;
    }
    for (let i = 0; i < STAGES; i++) {
      stageWeights(1 + nodes[i] * ratio, weights);
      for (let c = 0; c < n; c++) {
        let sum = -zBefore[(STAGES - 1) * n + c];
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
  }

  /** Finds the stages of a step of size h; false if Newton's iteration does not converge (see `reduction`). */
  attempt(h: number): boolean {
    this.reduction = 0.5;
    if (this.rate <= KEEP_JACOBIAN && (this.factoredStep === h || this.factor(h)) && this.iterate(h)) return true;
    this.linearize(h);
    if (this.factor(h) && this.iterate(h)) return true;
    // The next attempt takes the Jacobian anew, in the middle of a shorter step.
    this.rate = 1;
    return false;
  }

  private iterate(h: number): boolean {
    const { n, t, y, z, w, stageSlopes, point, tolerance } = this;
    const [change0, change1, change2, change3, change4] = this.change;
    const T = transformation;
    this.predict(h);
    let eta = Math.max(this.contraction, Number.EPSILON) ** 0.8;
    let normBefore = 0;
    let ratioBefore = 0;
    for (let iteration = 1; iteration <= MAXIMUM_ITERATIONS; iteration++) {
      this.iterations = iteration;
      for (let i = 0; i < STAGES; i++) {
        const slopes = stageSlopes[i];
        for (let c = 0; c < n; c++) point[c] = y[c] + z[i * n + c];
        this.system.derivative(t + nodes[i] * h, point, slopes);
        this.evaluations++;
        for (let c = 0; c < n; c++) if (!Number.isFinite(slopes[c])) return false;
      }
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
          if (norm <= 1) return true;
          return false;
        }
        eta = rate / (1 - rate);
        const predicted = (eta * norm * rate ** (MAXIMUM_ITERATIONS - iteration)) as number;
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
    }
    return false;
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
    solveReal(this.real, n, this.pivots[0], change[0]);
    solveComplex(this.complexRe[0], this.complexIm[0], n, this.pivots[1], change[1], change[2]);
    solveComplex(this.complexRe[1], this.complexIm[1], n, this.pivots[2], change[3], change[4]);
  }

  /**
   * The error of the step in units of the tolerance, as a measure that goes like h^10.
   *
   * @param twice - filter a large estimate a second time, as is apt in the first step and after a refusal
   */
  estimate(h: number, twice: boolean): number {
    const { n, z, y, errors, point, stageSlopes } = this;
    const gap = stageSlopes[0];
    for (let c = 0; c < n; c++) {
      let sum = 0;
      for (let i = 0; i < STAGES; i++) sum += startSlopeWeights[i] * z[i * n + c];
      gap[c] = sum / h;
      errors[c] = this.slope[c] - gap[c];
    }
    solveReal(this.real, n, this.pivots[0], errors);
    let measure = this.measure(h);
    if (measure > 1 && twice) {
      const slopes = stageSlopes[1];
      for (let c = 0; c < n; c++) point[c] = y[c] + errors[c];
      this.system.derivative(this.t, point, slopes);
      this.evaluations++;
      for (let c = 0; c < n; c++) errors[c] = slopes[c] - gap[c];
      solveReal(this.real, n, this.pivots[0], errors);
      measure = this.measure(h);
    }
    return measure;
  }

  /** Takes the step as exact, for a fast transient that is not to be followed; the measure is then that of an equal step. */
  disregardError(): number {
    this.meshErrors.fill(0);
    this.interiorErrors.fill(0);
    return 0.3;
  }

  private measure(h: number): number {
    const { n, z, errors, meshErrors, interiorErrors, tolerance } = this;
    this.findBubbles(h);
    let worst = 0;
    let worstBetween = 0;
    for (let c = 0; c < n; c++) {
      const embedded = Math.abs(errors[c]);
      let largest = 0;
      for (let i = 0; i < STAGES; i++) largest = Math.max(largest, Math.abs(z[i * n + c]));
      let atMesh = 0;
      if (embedded > 0) {
        atMesh = embedded * Math.min(1, MESH_FACTOR * (embedded / largest) ** 0.8 + this.stiffness[c] ** 4);
      }
      meshErrors[c] = atMesh;
      interiorErrors[c] =
        LARGEST_SLOPE_BUBBLE * realEigenvalue * embedded + LARGEST_STAGE_BUBBLE * Math.abs(this.stageBubbles[c]);
      const between = interiorErrors[c] / (this.interior * tolerance[c]);
      if (!(atMesh / tolerance[c] <= worst)) worst = atMesh / tolerance[c];
      if (!(between <= worstBetween)) worstBetween = between;
    }
    // The polynomial's error goes like h^6.
    return Math.max(worst, worstBetween ** (10 / 6));
  }

  /**
   * What the step before tells about the error between mesh points: how far the polynomial's slope at the start is from
   * the end slope before, and how far its continuation backward misses the last inner stage before.
   *
   * The filter damps the embedded error by 1 / (1 + gamma_0 |h lambda|), so its ratio to the jump of the slope shows how
   * stiff a component is.
   */
  private findBubbles(h: number): void {
    const { n, z, zBefore, errors, stepBefore, slopeBubbles, stageBubbles, stiffness, weights } = this;
    if (stepBefore === 0) {
      slopeBubbles.fill(0);
      stageBubbles.fill(0);
      stiffness.fill(0);
      return;
    }
    const ratio = h / stepBefore;
    const tau = (nodes[3] - 1) / ratio;
    const inverse = 1 / stageBubble(tau);
    stageWeights(tau, weights);
    for (let c = 0; c < n; c++) {
      let jump = 0;
      let miss = zBefore[3 * n + c] - zBefore[4 * n + c];
      for (let i = 0; i < STAGES; i++) {
        jump += ratio * endSlopeWeights[i] * zBefore[i * n + c] - startSlopeWeights[i] * z[i * n + c];
        miss -= weights[i] * z[i * n + c];
      }
      const stiff = jump === 0 ? 1 : Math.min(1, Math.abs(1 - (errors[c] * realEigenvalue) / jump));
      stiffness[c] = stiff;
      slopeBubbles[c] = (1 - stiff) * jump;
      stageBubbles[c] = stiff * miss * inverse;
    }
  }

  /** Takes the step over: moves to its end and records it. */
  accept(h: number, end: number, record: StepRecord): void {
    const { n, y, z, meshErrors, interiorErrors } = this;
    for (let c = 0; c < n; c++) {
      record.error[c] += meshErrors[c];
      record.interiorError[c] = Math.max(record.interiorError[c], interiorErrors[c]);
      y[c] += z[(STAGES - 1) * n + c];
    }
    this.zBefore.set(z);
    this.stepBefore = h;
    this.t = end;
    record.push(end, y, z, this.slopeBubbles, this.stageBubbles);
    if (!this.refreshSlope()) {
      throw new NotConvergedError({
        where: "solveStiff",
        reason: `the derivative is not finite at t = ${end}: [${Array.from(this.slope).join(", ")}]`,
        value: end,
        evaluations: this.evaluations,
      });
    }
  }
}
