import { unitHubbleDistance, unitHubbleTime } from "../expansion";
import { curvedSine, gaussLegendre, type QuadratureRule } from "../numerics";
import type { BatchRow } from "./batchRow";
import { fillSquaredTerms } from "./rowExpansion";

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
const early = rootNodes(12, 0, 1, 0.25);

/** A scale factor above every z_* and z_drag of the validated range, from which the nodes to today are the same for all rows. */
const fixedStart = 1 / 850;
const late = rootNodes(24, fixedStart, 1, 0);

const toDrag = gaussLegendre(2);
const toFixed = gaussLegendre(4);

/** Where each set of nodes begins in the arrays of a row. */
const dragBegin = early.nodes.length;
const fixedBegin = dragBegin + toDrag.nodes.length;
const lateBegin = fixedBegin + toFixed.nodes.length;
const count = lateBegin + late.nodes.length;

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
  private readonly nodes = new Float64Array(count);
  private readonly logs = new Float64Array(count);
  private readonly weights = new Float64Array(count);
  private readonly terms = new Float64Array(count);

  constructor() {
    this.nodes.set(late.nodes, lateBegin);
    this.logs.set(late.logs, lateBegin);
    this.weights.set(late.weights, lateBegin);
  }

  /** Everything that hangs on z_* and z_drag, and the age. @param star, @param drag scale factors there. */
  run(row: BatchRow, star: number, drag: number): void {
    const logStar = Math.log(star);
    this.setEarly(star, logStar);
    this.setShort(dragBegin, toDrag, star, drag, logStar);
    this.setShort(fixedBegin, toFixed, star, fixedStart, logStar);
    fillSquaredTerms(row, this.nodes, this.logs, this.terms, 0, count);
    this.clear();
    this.add(row, 0, dragBegin);
    const timeAtStar = this.time;
    this.lastScatteringSound = unitHubbleDistance * this.sound;
    this.add(row, dragBegin, fixedBegin);
    this.dragSound = unitHubbleDistance * this.sound;
    this.clear();
    this.add(row, fixedBegin, count);
    this.lastScatteringDistance = transverseFrom(row, unitHubbleDistance * this.light);
    this.age = unitHubbleTime * (timeAtStar + this.time);
  }

  /** The age alone. */
  runAge(row: BatchRow): void {
    this.runEarly(row, fixedStart);
    fillSquaredTerms(row, this.nodes, this.logs, this.terms, lateBegin, count);
    this.add(row, lateBegin, count);
    this.age = unitHubbleTime * this.time;
  }

  /** r_s at a scale factor before recombination, Mpc. */
  soundHorizonAt(row: BatchRow, a: number): number {
    this.runEarly(row, a);
    return unitHubbleDistance * this.sound;
  }

  /** c eta at a scale factor before recombination, Mpc. */
  conformalTimeAt(row: BatchRow, a: number): number {
    this.runEarly(row, a);
    return unitHubbleDistance * this.light;
  }

  private runEarly(row: BatchRow, end: number): void {
    this.setEarly(end, Math.log(end));
    fillSquaredTerms(row, this.nodes, this.logs, this.terms, 0, dragBegin);
    this.clear();
    this.add(row, 0, dragBegin);
  }

  /** Nodes from a = 0 to an end. */
  private setEarly(end: number, logEnd: number): void {
    for (let i = 0; i < dragBegin; i++) {
      this.nodes[i] = end * early.nodes[i];
      this.logs[i] = logEnd + early.logs[i];
      this.weights[i] = end * early.weights[i];
    }
  }

  /** Nodes over a stretch of a that begins at z_* and is at most half as long again. */
  private setShort(begin: number, rule: QuadratureRule, star: number, to: number, logStar: number): void {
    const half = (to - star) / 2;
    for (let i = 0; i < rule.nodes.length; i++) {
      const way = half * (1 + rule.nodes[i]);
      const a = star + way;
      // ln(a/a_*) by the series of the area hyperbolic tangent: 1e-7 at a ratio of 1.5.
      const t = way / (star + a);
      const s = t * t;
      this.nodes[begin + i] = a;
      this.logs[begin + i] = logStar + 2 * t * (1 + s * (1 / 3 + s * (1 / 5 + s * (1 / 7))));
      this.weights[begin + i] = half * rule.weights[i];
    }
  }

  private clear(): void {
    this.sound = 0;
    this.light = 0;
    this.time = 0;
  }

  /** Adds the nodes from `from` to before `to` to all three. */
  private add(row: BatchRow, from: number, to: number): void {
    const { nodes, weights, terms } = this;
    const loading = row.loading;
    let { sound, light, time } = this;
    for (let i = from; i < to; i++) {
      const a = nodes[i];
      const part = weights[i] / Math.sqrt(terms[i]);
      light += part;
      time += part * a;
      sound += part / Math.sqrt(3 * (1 + loading * a));
    }
    this.sound = sound;
    this.light = light;
    this.time = time;
  }
}

/** Transverse from line-of-sight comoving distance, as distances/transverseDistance.ts. */
export function transverseFrom(row: BatchRow, along: number): number {
  const radius = row.reducedHubble / unitHubbleDistance;
  return Math.abs(curvedSine(along, -row.curvature * radius * radius));
}
