import { unitHubbleDistance, unitHubbleTime } from "../expansion";
import { curvedSine, gaussLegendre, type QuadratureRule } from "../numerics";
import type { BatchRow } from "./batchRow";
import { squaredTermAt } from "./rowExpansion";

const early = gaussLegendre(10);
const middle = gaussLegendre(3);
const late = gaussLegendre(22);

/** Added to a under the root before z_*, where H changes its power from radiation to matter. */
const earlyOffset = 2.5e-4;

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
    this.clear();
    this.panel(row, 0, star, earlyOffset, early);
    const soundAtStar = this.sound;
    const timeAtStar = this.time;
    this.lastScatteringSound = unitHubbleDistance * soundAtStar;
    this.panel(row, star, drag, earlyOffset, middle);
    this.dragSound = unitHubbleDistance * this.sound;
    this.clear();
    this.panel(row, star, 1, 0, late);
    this.lastScatteringDistance = transverseFrom(row, unitHubbleDistance * this.light);
    this.age = unitHubbleTime * (timeAtStar + this.time);
  }

  /** The age alone. */
  runAge(row: BatchRow): void {
    this.clear();
    this.panel(row, 0, 1 / 1000, earlyOffset, early);
    this.panel(row, 1 / 1000, 1, 0, late);
    this.age = unitHubbleTime * this.time;
  }

  /** r_s and c eta at a scale factor before recombination, Mpc. */
  soundHorizonAt(row: BatchRow, a: number): number {
    this.clear();
    this.panel(row, 0, a, earlyOffset, early);
    return unitHubbleDistance * this.sound;
  }

  conformalTimeAt(row: BatchRow, a: number): number {
    this.clear();
    this.panel(row, 0, a, earlyOffset, early);
    return unitHubbleDistance * this.light;
  }

  private clear(): void {
    this.sound = 0;
    this.light = 0;
    this.time = 0;
  }

  private panel(row: BatchRow, from: number, to: number, offset: number, rule: QuadratureRule): void {
    const low = Math.sqrt(from + offset);
    const half = 0.5 * (Math.sqrt(to + offset) - low);
    const { nodes, weights } = rule;
    let { sound, light, time } = this;
    for (let i = 0; i < nodes.length; i++) {
      const root = low + half * (1 + nodes[i]);
      const a = root * root - offset;
      const part = (2 * root * half * weights[i]) / Math.sqrt(squaredTermAt(row, a, Math.log(a)));
      light += part;
      time += part * a;
      sound += part / Math.sqrt(3 * (1 + row.loading * a));
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
