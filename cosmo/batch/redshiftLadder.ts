import { gaussLegendre } from "../numerics";
import type { BatchRow } from "./batchRow";
import { fillSquaredTerms } from "./rowExpansion";

/** Widest panel in ln(1+z) and the nodes in it: 1e-10 for smooth dark energy. */
const widest = 0.5;
const rule = gaussLegendre(6);

/**
 * Light paths and times from today to the redshifts that a plan asks for, in one climb: panels of Gauss-Legendre nodes in ln(1+z)
 * from each redshift to the next, fixed for all rows.
 */
export class RedshiftLadder {
  /** Ascending, from 0. */
  readonly redshifts: readonly number[];
  /** int dz/(H/100) and int dz/[(1+z) H/100] from today. */
  readonly light: Float64Array;
  readonly time: Float64Array;
  /** a^4 (H/100)^2. */
  readonly squaredTerm: Float64Array;
  private readonly scaleFactors: Float64Array;
  private readonly scaleLogs: Float64Array;
  private readonly nodes: Float64Array;
  private readonly nodeTerms: Float64Array;
  private readonly logs: Float64Array;
  private readonly weights: Float64Array;
  /** Index after the last node below each redshift. */
  private readonly ends: Int32Array;

  /** @param redshifts 0 or more, in any order, with repetitions. */
  constructor(redshifts: readonly number[]) {
    this.redshifts = [...new Set([0, ...redshifts])].sort((p, q) => p - q);
    const size = this.redshifts.length;
    this.light = new Float64Array(size);
    this.time = new Float64Array(size);
    this.squaredTerm = new Float64Array(size);
    this.scaleFactors = Float64Array.from(this.redshifts, (z) => 1 / (1 + z));
    this.scaleLogs = this.scaleFactors.map(Math.log);
    this.ends = new Int32Array(size);
    const logs: number[] = [];
    const weights: number[] = [];
    for (let k = 1; k < size; k++) {
      const low = Math.log1p(this.redshifts[k - 1]);
      const high = Math.log1p(this.redshifts[k]);
      const panels = Math.ceil((high - low) / widest);
      const half = (high - low) / panels / 2;
      for (let panel = 0; panel < panels; panel++) {
        rule.nodes.forEach((x, i) => {
          logs.push(-(low + half * (2 * panel + 1 + x)));
          weights.push(half * rule.weights[i]);
        });
      }
      this.ends[k] = logs.length;
    }
    this.logs = Float64Array.from(logs);
    this.nodes = this.logs.map((log) => Math.exp(log));
    this.nodeTerms = new Float64Array(logs.length);
    this.weights = Float64Array.from(weights);
  }

  /** Place of a redshift on the ladder. */
  placeOf(redshift: number): number {
    return this.redshifts.indexOf(redshift);
  }

  run(row: BatchRow): void {
    const { light, time, squaredTerm, nodes, logs, weights, nodeTerms, ends } = this;
    fillSquaredTerms(row, nodes, logs, nodeTerms, 0, nodes.length);
    fillSquaredTerms(row, this.scaleFactors, this.scaleLogs, squaredTerm, 0, squaredTerm.length);
    let lightSum = 0;
    let timeSum = 0;
    let node = 0;
    for (let k = 0; k < ends.length; k++) {
      for (; node < ends[k]; node++) {
        const a = nodes[node];
        // dt/(a H) with a^2 H the root of the squared term, t = ln(1+z).
        const part = (weights[node] * a) / Math.sqrt(nodeTerms[node]);
        lightSum += part;
        timeSum += part * a;
      }
      light[k] = lightSum;
      time[k] = timeSum;
    }
  }
}
