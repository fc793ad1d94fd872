import { unitHubbleDistance, unitHubbleTime } from "../expansion";
import { curvedSine, gaussLegendre } from "../numerics";
import type { BatchRow } from "./batchRow";
import { squaredTermAt } from "./rowExpansion";

/** Nodes with their logarithms, so that a row takes none. */
interface FixedNodes {
  readonly nodes: Float64Array;
  readonly logs: Float64Array;
  readonly weights: Float64Array;
}

/** Gauss-Legendre nodes from `from` to `to` in sqrt(a + offset). */
function rootNodes(count: number, from: number, to: number, offset: number): FixedNodes {
  const rule = gaussLegendre(count);
  const low = Math.sqrt(from + offset);
  const half = (Math.sqrt(to + offset) - low) / 2;
  const roots = rule.nodes.map((x) => low + half * (1 + x));
  const nodes = roots.map((root) => root * root - offset);
  return { nodes, logs: nodes.map(Math.log), weights: roots.map((root, i) => 2 * root * half * rule.weights[i]) };
}

/** From a = 0 to an end, in units of the end; the offset is near the equality of matter and radiation where the end is near z_*. */
const early = rootNodes(9, 0, 1, 0.25);

/** A scale factor above every z_* and z_drag of the validated range, from which the nodes to today are the same for all rows. */
const fixedStart = 1 / 850;
const late = rootNodes(20, fixedStart, 1, 0);

const toDrag = gaussLegendre(2);
const toFixed = gaussLegendre(4);

/**
 * r_s, D_C and times of a row by Gauss-Legendre nodes that they share: the integrals of acoustics/soundHorizon.ts,
 * distances/comovingDistance.ts and times/ageAt.ts, in sqrt(a + a constant), which makes E smooth.
 */
export class Horizons {
  /** r_s(z_*), r_s(z_drag), Mpc. */
  lastScatteringSound = 0.5;
  dragSound = 0.5;
  /** D_M(z_*), Mpc. */
  lastScatteringDistance = 0.5;
  /** Gyr. */
  age = 0.5;
  private sound = 0.5;
  private light = 0.5;
  private time = 0.5;

  /** Everything that hangs on z_* and z_drag, and the age. @param star, @param drag scale factors there. */
  run(row: BatchRow, star: number, drag: number): void {
    const logStar = Math.log(star);
    this.fromStart(row, star, logStar);
    const timeAtStar = this.time;
    this.lastScatteringSound = unitHubbleDistance * this.sound;
    this.shortWay(row, star, drag, logStar, toDrag.nodes, toDrag.weights);
    this.dragSound = unitHubbleDistance * this.sound;
    this.light = 0;
    this.time = timeAtStar;
    this.shortWay(row, star, fixedStart, logStar, toFixed.nodes, toFixed.weights);
    this.toToday(row);
    this.lastScatteringDistance = transverseFrom(row, unitHubbleDistance * this.light);
    this.age = unitHubbleTime * this.time;
  }

  /** The age alone. */
  runAge(row: BatchRow): void {
    this.fromStart(row, fixedStart, Math.log(fixedStart));
    this.toToday(row);
    this.age = unitHubbleTime * this.time;
  }

  /** r_s at a scale factor before recombination, Mpc. */
  soundHorizonAt(row: BatchRow, a: number): number {
    this.fromStart(row, a, Math.log(a));
    return unitHubbleDistance * this.sound;
  }

  /** c eta at a scale factor before recombination, Mpc. */
  conformalTimeAt(row: BatchRow, a: number): number {
    this.fromStart(row, a, Math.log(a));
    return unitHubbleDistance * this.light;
  }

  /** All three from a = 0 to an end. */
  private fromStart(row: BatchRow, end: number, logEnd: number): void {
    const { nodes, logs, weights } = early;
    let sound = 0;
    let light = 0;
    let time = 0;
    for (let i = 0; i < nodes.length; i++) {
      const a = end * nodes[i];
      const part = (end * weights[i]) / Math.sqrt(squaredTermAt(row, a, logEnd + logs[i]));
      light += part;
      time += part * a;
      sound += part / Math.sqrt(3 * (1 + row.loading * a));
    }
    this.sound = sound;
    this.light = light;
    this.time = time;
  }

  /** Adds all three over a stretch of a that begins at z_* and is at most half as long again. */
  private shortWay(
    row: BatchRow,
    star: number,
    to: number,
    logStar: number,
    nodes: Float64Array,
    weights: Float64Array,
  ): void {
    const half = (to - star) / 2;
    let { sound, light, time } = this;
    for (let i = 0; i < nodes.length; i++) {
      const way = half * (1 + nodes[i]);
      const a = star + way;
      // ln(a/a_*) by the series of the area hyperbolic tangent: 1e-7 at a ratio of 1.5.
      const t = way / (star + a);
      const s = t * t;
      const log = 2 * t * (1 + s * (1 / 3 + s * (1 / 5 + s * (1 / 7))));
      const part = (half * weights[i]) / Math.sqrt(squaredTermAt(row, a, logStar + log));
      light += part;
      time += part * a;
      sound += part / Math.sqrt(3 * (1 + row.loading * a));
    }
    this.sound = sound;
    this.light = light;
    this.time = time;
  }

  /** Adds light and time from the fixed scale factor to today. */
  private toToday(row: BatchRow): void {
    const { nodes, logs, weights } = late;
    let { light, time } = this;
    for (let i = 0; i < nodes.length; i++) {
      const a = nodes[i];
      const part = weights[i] / Math.sqrt(squaredTermAt(row, a, logs[i]));
      light += part;
      time += part * a;
    }
    this.light = light;
    this.time = time;
  }
}

/** Transverse from line-of-sight comoving distance, as distances/transverseDistance.ts. */
export function transverseFrom(row: BatchRow, along: number): number {
  const radius = row.reducedHubble / unitHubbleDistance;
  return Math.abs(curvedSine(along, -row.curvature * radius * radius));
}
