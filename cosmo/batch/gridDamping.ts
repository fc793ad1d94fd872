import type { ConstantsSet } from "../constants";
import { unitHubbleDistance } from "../expansion";
import { gaussLegendre } from "../numerics";
import { sahaLogarithms } from "../recombination/sahaFactors";
import type { BatchRow } from "./batchRow";
import type { Crossing } from "./gridDepths";
import { edgeWeights, partialCell } from "./gridQuadrature";
import { fillSquaredTerms } from "./rowExpansion";
import { gridSize, gridStep, gridTemperatures, heliumAtMainTop, heliumBlock, mainFirst } from "./temperatureGrid";

/** The point up to which the coarse block serves; the two above it are the last rule's. */
const topPoint = 2;

/** The joint between the coarse block and the fine one: a point of each, two of the rule beyond on either side. */
const coarseJoint = heliumAtMainTop + 1;
const fineJoint = mainFirst + heliumBlock.stride;

/** T_r, K, between which He++ takes its second electron; the pieces of the integral above the grid end there. */
const pieceEnds = [gridTemperatures[topPoint], 5000 * 2.7255, 6500 * 2.7255];
const pieceNodes = [6, 7, 5];

/** Nodes above the grid, with what Saha equilibrium needs there and room for a row's numbers. */
class HotNodes {
  readonly temperatures: Float64Array;
  readonly logTemperatures: Float64Array;
  /** Of the integral over u. */
  readonly weights: Float64Array;
  /** n_e n(He+)/n(He) and n_e n(He++)/n(He+), 1/m3. */
  readonly once: Float64Array;
  readonly twice: Float64Array;
  readonly scaleFactors: Float64Array;
  readonly logs: Float64Array;
  readonly terms: Float64Array;

  constructor(constants: ConstantsSet) {
    const temperatures: number[] = [];
    const weights: number[] = [];
    pieceEnds.forEach((start, piece) => {
      const rule = gaussLegendre(pieceNodes[piece]);
      if (piece + 1 < pieceEnds.length) {
        const low = Math.log(start);
        const half = (Math.log(pieceEnds[piece + 1]) - low) / 2;
        rule.nodes.forEach((x, i) => {
          temperatures.push(Math.exp(low + half * (1 + x)));
          weights.push(half * rule.weights[i]);
        });
      } else {
        // To infinity in a, in which the integrand is a^2 times something smooth: a = a_start v, du = dv/v.
        rule.nodes.forEach((x, i) => {
          const v = (1 + x) / 2;
          temperatures.push(start / v);
          weights.push(rule.weights[i] / 2 / v);
        });
      }
    });
    const count = temperatures.length;
    this.temperatures = Float64Array.from(temperatures);
    this.logTemperatures = this.temperatures.map(Math.log);
    this.weights = Float64Array.from(weights);
    this.once = this.temperatures.map((temperature) => Math.exp(sahaLogarithms(temperature, constants).helium));
    this.twice = this.temperatures.map((temperature) => Math.exp(sahaLogarithms(temperature, constants).heliumIon));
    this.scaleFactors = new Float64Array(count);
    this.logs = new Float64Array(count);
    this.terms = new Float64Array(count);
  }
}

/**
 * k_D: the integral of acoustics/dampingWavenumber.ts, on the grid from z_* up and on Gauss nodes fixed in temperature above it, where
 * hydrogen is ionized and helium in Saha equilibrium.
 */
export class GridDamping {
  private readonly integrand = new Float64Array(gridSize);
  private readonly cell = new Float64Array(6);
  private readonly nodes: HotNodes;

  constructor(constants: ConstantsSet) {
    this.nodes = new HotNodes(constants);
  }

  /** 1/Mpc. @param inverseRate 100 km/s/Mpc over H on the grid; @param from z_*. */
  run(row: BatchRow, inverseRate: Float64Array, ionized: Float64Array, from: Crossing): number {
    const { integrand, cell } = this;
    const start = from.lower - 1;
    this.fill(row, inverseRate, ionized, 0, coarseJoint + 3);
    this.fill(row, inverseRate, ionized, mainFirst, start + 4);
    for (let j = 0; j < 6; j++) cell[j] = integrand[start + 3 - j];
    const onGrid =
      gridStep *
      (partialCell(cell, 0, from.part) +
        this.sum(fineJoint, start) +
        heliumBlock.stride * this.sum(topPoint, coarseJoint));
    const total = (onGrid + this.above(row)) / row.scattering;
    return 1 / (unitHubbleDistance * Math.sqrt(total / 6));
  }

  private fill(row: BatchRow, inverseRate: Float64Array, ionized: Float64Array, first: number, end: number): void {
    const { integrand } = this;
    const temperatures = gridTemperatures;
    const scale = 1 / row.photonTemperature;
    const loading = row.loading;
    for (let i = first; i < end; i++) {
      const x = temperatures[i] * scale;
      const sum = x + loading;
      integrand[i] = ((loading * loading + (16 / 15) * x * sum) * inverseRate[i]) / (sum * sum * x * ionized[i]);
    }
  }

  /** The integral between two points of one block over its step, both ends with their two points beyond. */
  private sum(upper: number, lower: number): number {
    const { integrand } = this;
    let sum = 0;
    for (let i = upper; i <= lower; i++) sum += integrand[i];
    for (let j = 0; j < 6; j++) {
      const correction = edgeWeights[j] / 1440 - (j < 2 ? 0 : 1);
      sum += correction * (integrand[lower + 2 - j] + integrand[upper - 2 + j]);
    }
    return sum;
  }

  /** The integral above the grid. */
  private above(row: BatchRow): number {
    const { temperatures, logTemperatures, weights, once, twice, scaleFactors, logs, terms } = this.nodes;
    const count = temperatures.length;
    const { photonTemperature, logPhotonTemperature, loading, heliumRatio: ratio, hydrogenDensity } = row;
    for (let k = 0; k < count; k++) {
      scaleFactors[k] = photonTemperature / temperatures[k];
      logs[k] = logPhotonTemperature - logTemperatures[k];
    }
    fillSquaredTerms(row, scaleFactors, logs, terms, 0, count);
    let sum = 0;
    for (let k = 0; k < count; k++) {
      const a = scaleFactors[k];
      const x = 1 / a;
      const perDensity = (a * a * a) / hydrogenDensity;
      const toOnce = once[k] * perDensity;
      const toTwice = twice[k] * perDensity;
      // Two passes from He+: helium is a tenth of the electrons, and changes by a step at a time.
      let electrons = 1 + ratio;
      for (let pass = 0; pass < 2; pass++) {
        // Shares of He, He+ and He++ as n_e^2, n_e toOnce and toOnce toTwice.
        const first = electrons * toOnce;
        const second = toOnce * toTwice;
        electrons = 1 + (ratio * (first + 2 * second)) / (electrons * electrons + first + second);
      }
      const mixed = x + loading;
      sum +=
        (weights[k] * a * a * (loading * loading + (16 / 15) * x * mixed)) /
        (Math.sqrt(terms[k]) * mixed * mixed * x * electrons);
    }
    return sum;
  }
}
