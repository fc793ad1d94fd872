import {
  endSlopeWeights,
  LARGEST_SLOPE_BUBBLE,
  LARGEST_STAGE_BUBBLE,
  nodes,
  realEigenvalue,
  STAGES,
  stageBubble,
  stageWeights,
  startSlopeWeights,
} from "./radauCoefficients";
import { RadauStages } from "./radauStages";
import type { StiffSystem } from "./stiff";
import type { StepRecord } from "./stiffSolution";

/**
 * The embedded formula has a local error e ~ h^6 where the method has ~ h^10. With the largest increment d ~ h over the
 * step the method's error is K e (e/d)^0.8. K = 2 for an exponential (error constants 1.05e-5 and 2.2e-9); derivatives
 * that grow like k!, as near a pole, give 52. In a stiff component the order is reduced and the error is e itself.
 */
const MESH_FACTOR = 20;

/**
 * One step of the five-stage Radau IIA method: its stages, the estimates of its error, its acceptance.
 * All memory is taken at construction; nothing is allocated in a step.
 *
 * Sources: Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.8 (embedded formula and its filter). The
 * estimates at and between mesh points that follow from it are of this program.
 */
export class RadauStep {
  /** The stages, and where the integration stands. */
  readonly stages: RadauStages;
  private readonly n: number;
  private readonly errors: Float64Array;
  private readonly meshErrors: Float64Array;
  private readonly interiorErrors: Float64Array;
  /** How stiff each component is, 0 to 1, and what its polynomial wants of Q and B (see radauCoefficients). */
  private readonly stiffness: Float64Array;
  private readonly slopeBubbles: Float64Array;
  private readonly stageBubbles: Float64Array;
  private readonly gap: Float64Array;
  private readonly point: Float64Array;
  private readonly slopes: Float64Array;
  private readonly weights = new Float64Array(STAGES);

  constructor(
    system: StiffSystem,
    start: number,
    initial: Float64Array,
    absolute: Float64Array,
    relative: number,
    private readonly interior: number,
  ) {
    const n = initial.length;
    this.n = n;
    this.stages = new RadauStages(system, start, initial, absolute, relative);
    this.errors = new Float64Array(n);
    this.meshErrors = new Float64Array(n);
    this.interiorErrors = new Float64Array(n);
    this.stiffness = new Float64Array(n);
    this.slopeBubbles = new Float64Array(n);
    this.stageBubbles = new Float64Array(n);
    this.gap = new Float64Array(n);
    this.point = new Float64Array(n);
    this.slopes = new Float64Array(n);
  }

  /**
   * The error of the step in units of the tolerance, as a measure that goes like h^10.
   *
   * @param twice - filter a large estimate a second time, as is apt in the first step and after a refusal
   */
  estimate(h: number, twice: boolean): number {
    const { n, errors, gap, point, slopes } = this;
    const { t, y, z, slope, matrices, system } = this.stages;
    for (let c = 0; c < n; c++) {
      let sum = 0;
      for (let i = 0; i < STAGES; i++) sum += startSlopeWeights[i] * z[i * n + c];
      gap[c] = sum / h;
      errors[c] = slope[c] - gap[c];
    }
    matrices.solveReal(errors);
    let measure = this.measure(h);
    if (measure > 1 && twice) {
      for (let c = 0; c < n; c++) point[c] = y[c] + errors[c];
      system.derivative(t, point, slopes);
      this.stages.evaluations++;
      for (let c = 0; c < n; c++) errors[c] = slopes[c] - gap[c];
      matrices.solveReal(errors);
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
    const { n, errors, meshErrors, interiorErrors } = this;
    const { z, tolerance } = this.stages;
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
    const { n, errors, slopeBubbles, stageBubbles, stiffness, weights } = this;
    const { z, zBefore, stepBefore } = this.stages;
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
    const { n, stages, meshErrors, interiorErrors, slopeBubbles, stageBubbles } = this;
    const { y, z } = stages;
    for (let c = 0; c < n; c++) {
      record.error[c] += meshErrors[c];
      record.interiorError[c] = Math.max(record.interiorError[c], interiorErrors[c]);
      y[c] += z[(STAGES - 1) * n + c];
    }
    stages.zBefore.set(z);
    stages.slopeBubblesBefore.set(slopeBubbles);
    stages.stageBubblesBefore.set(stageBubbles);
    stages.stepBefore = h;
    record.push(end, y, z, slopeBubbles, stageBubbles);
    stages.arrive(end);
  }
}
