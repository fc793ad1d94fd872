import type { ConstantsSet } from "../constants";
import { unitHubbleDistance } from "../expansion";
import { gaussLegendre } from "../numerics";
import { sahaLogarithms } from "../recombination/sahaFactors";
import type { BatchRow } from "./batchRow";
import type { Crossing } from "./gridDepths";
import { edgeWeights, partialCell } from "./gridQuadrature";
import { squaredTermAt } from "./rowExpansion";
import { gridSize, gridStep, gridTemperatures, heliumAtMainTop, heliumBlock, mainFirst } from "./temperatureGrid";

/** The point up to which the coarse block serves; the two above it are the last rule's. */
const topPoint = 2;

/** The joint between the coarse block and the fine one: a point of each, two of the rule beyond on either side. */
const coarseJoint = heliumAtMainTop + 1;
const fineJoint = mainFirst + heliumBlock.stride;

/** T_r, K, between which He++ takes its second electron; the pieces of the integral above the grid end there. */
const pieceEnds = [gridTemperatures[topPoint], 5000 * 2.7255, 6500 * 2.7255];
const pieceNodes = [6, 7, 5];

/** A node above the grid with what Saha equilibrium needs there. */
interface HotNode {
  readonly temperature: number;
  readonly logTemperature: number;
  /** Of the integral over u. */
  readonly weight: number;
  /** n_e n(He+)/n(He) and n_e n(He++)/n(He+), 1/m3. */
  readonly helium: number;
  readonly heliumIon: number;
}

function hotNodes(constants: ConstantsSet): HotNode[] {
  const nodes: HotNode[] = [];
  const add = (temperature: number, weight: number) => {
    const saha = sahaLogarithms(temperature, constants);
    nodes.push({
      temperature,
      logTemperature: Math.log(temperature),
      weight,
      helium: Math.exp(saha.helium),
      heliumIon: Math.exp(saha.heliumIon),
    });
  };
  pieceEnds.forEach((start, piece) => {
    const rule = gaussLegendre(pieceNodes[piece]);
    if (piece + 1 < pieceEnds.length) {
      const low = Math.log(start);
      const half = (Math.log(pieceEnds[piece + 1]) - low) / 2;
      rule.nodes.forEach((x, i) => {
        add(Math.exp(low + half * (1 + x)), half * rule.weights[i]);
      });
    } else {
      // To infinity in a, in which the integrand is a^2 times something smooth: a = a_start v, du = dv/v.
      rule.nodes.forEach((x, i) => {
        const v = (1 + x) / 2;
        add(start / v, rule.weights[i] / 2 / v);
      });
    }
  });
  return nodes;
}

/**
 * k_D: the integral of acoustics/dampingWavenumber.ts, on the grid from z_* up and on Gauss nodes fixed in temperature above it, where
 * hydrogen is ionized and helium in Saha equilibrium.
 */
export class GridDamping {
  private readonly integrand = new Float64Array(gridSize);
  private readonly cell = new Float64Array(6);
  private readonly nodes: readonly HotNode[];

  constructor(constants: ConstantsSet) {
    this.nodes = hotNodes(constants);
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
    const scale = 1 / row.photonTemperature;
    const loading = row.loading;
    for (let i = first; i < end; i++) {
      const x = gridTemperatures[i] * scale;
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

  private above(row: BatchRow): number {
    const scale = 1 / row.photonTemperature;
    const logScale = row.logPhotonTemperature;
    const { loading, heliumRatio: ratio } = row;
    let sum = 0;
    for (let k = 0; k < this.nodes.length; k++) {
      const node = this.nodes[k];
      const x = node.temperature * scale;
      const density = row.hydrogenDensity * x * x * x;
      const once = node.helium / density;
      const twice = node.heliumIon / density;
      let electrons = 1 + ratio;
      for (let pass = 0; pass < 2; pass++) {
        const first = once / electrons;
        const second = (first * twice) / electrons;
        electrons = 1 + (ratio * (first + 2 * second)) / (1 + first + second);
      }
      const a = 1 / x;
      const inverseRate = (a * a) / Math.sqrt(squaredTermAt(row, a, logScale - node.logTemperature));
      const mixed = x + loading;
      sum +=
        (node.weight * (loading * loading + (16 / 15) * x * mixed) * inverseRate) / (mixed * mixed * x * electrons);
    }
    return sum;
  }
}
