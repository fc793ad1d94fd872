import type { BatchRow } from "./batchRow";
import { cellPolynomial, innerCell, tailWeights } from "./gridQuadrature";
import { firstPointBelow, gridSize, gridStep, gridTemperatures } from "./temperatureGrid";

/** Below this T_r no crossing is looked for: depths there are far below one. Above the search's end the row is left to the single path. */
const searchStart = firstPointBelow(2450);
const searchEnd = firstPointBelow(4300);

/** One over the ratio of neighboring temperatures in the last block, for the logarithmic slope there. */
const lastSlopeStep = Math.log(gridTemperatures[gridSize - 2] / gridTemperatures[gridSize - 1]);

/** Where a depth reaches one. */
export interface Crossing {
  /** Index of the point just below the crossing, or -1 where there is none on the grid. */
  lower: number;
  /** How far the crossing lies above that point, in steps: 0 to 1. */
  part: number;
  /** ln T_r there. */
  u: number;
}

/**
 * tau and tau_d on the grid: the same integrals as lastScattering/opticalDepthHistory.ts, with six-point weights, and a power
 * law from the last point (z = 20) to today.
 */
export class GridDepths {
  /** dtau/du at every point. */
  readonly rate = new Float64Array(gridSize);
  readonly lastScattering: Crossing = { lower: -1, part: 0.5, u: 0.5 };
  readonly drag: Crossing = { lower: -1, part: 0.5, u: 0.5 };
  private readonly dragRate = new Float64Array(gridSize);
  private readonly weights = tailWeights(searchStart);
  private readonly dragWeights = this.weights.map((weight, i) => weight * gridTemperatures[i]);
  private readonly scratch = new Float64Array(6);

  run(row: BatchRow, inverseRate: Float64Array, ionized: Float64Array): void {
    const { rate, dragRate, weights, dragWeights } = this;
    const scale = row.scattering / row.photonTemperature ** 3;
    const perLoading = 1 / (row.loading * row.photonTemperature);
    for (let i = searchEnd - 3; i < gridSize; i++) {
      const temperature = gridTemperatures[i];
      rate[i] = scale * temperature * temperature * temperature * ionized[i] * inverseRate[i];
    }
    for (let i = searchEnd - 3; i < searchStart + 3; i++) dragRate[i] = rate[i] * gridTemperatures[i] * perLoading;
    let photon = 0;
    let drag = 0;
    for (let i = searchStart - 2; i < gridSize; i++) {
      photon += weights[i] * rate[i];
      drag += dragWeights[i] * rate[i];
    }
    drag *= perLoading;
    // dtau/du = A T^p below the grid, to T_cmb.
    const last = gridSize - 1;
    const slope = Math.log(rate[last - 1] / rate[last]) / lastSlopeStep;
    const reach = Math.log(gridTemperatures[last] / row.photonTemperature);
    photon += (rate[last] / slope) * (1 - Math.exp(-slope * reach));
    drag += ((rate[last] * gridTemperatures[last] * perLoading) / (slope + 1)) * (1 - Math.exp(-(slope + 1) * reach));
    this.cross(rate, photon, this.lastScattering);
    this.cross(dragRate, drag, this.drag);
  }

  /** Goes up cell by cell until the depth has passed one, then solves within the cell's polynomial. */
  private cross(rate: Float64Array, below: number, out: Crossing): void {
    out.lower = -1;
    if (!(below < 1)) return;
    let depth = below;
    for (let lower = searchStart; lower > searchEnd; lower--) {
      const cell =
        gridStep *
        (innerCell[0] * (rate[lower - 3] + rate[lower + 2]) +
          innerCell[1] * (rate[lower - 2] + rate[lower + 1]) +
          innerCell[2] * (rate[lower - 1] + rate[lower]));
      if (depth + cell >= 1) {
        this.solve(rate, lower, (1 - depth) / gridStep, cell / gridStep, out);
        return;
      }
      depth += cell;
    }
  }

  /** The place in a cell, from its lower point up, at which the integral of its polynomial has the value `missing`. */
  private solve(rate: Float64Array, lower: number, missing: number, whole: number, out: Crossing): void {
    const { scratch } = this;
    for (let p = 0; p < 6; p++) {
      let coefficient = 0;
      // Places count upward here: place 0 is the lower point.
      for (let j = 0; j < 6; j++) coefficient += cellPolynomial[6 * p + j] * rate[lower + 2 - j];
      scratch[p] = coefficient;
    }
    let part = missing / whole;
    for (let k = 0; k < 4; k++) {
      let integral = 0;
      let slope = 0;
      for (let p = 5; p >= 0; p--) {
        integral = integral * part + scratch[p] / (p + 1);
        slope = slope * part + scratch[p];
      }
      part -= (integral * part - missing) / slope;
    }
    out.lower = lower;
    out.part = part;
    out.u = Math.log(gridTemperatures[lower]) + gridStep * part;
  }
}
