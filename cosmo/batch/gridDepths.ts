import type { BatchRow } from "./batchRow";
import { cellPolynomial, innerCell, tailWeights } from "./gridQuadrature";
import { firstPointBelow, gridSize, gridStep, gridTemperatures } from "./temperatureGrid";

/** Below this T_r no crossing is looked for: depths there are far below one. Above the search's end the row is left to the single path. */
const searchStart = firstPointBelow(2450);
const searchEnd = firstPointBelow(4300);

/** The last point: T_r, its logarithm, and ln of the ratio of neighboring temperatures there. */
const lastTemperature = gridTemperatures[gridSize - 1];
const logLastTemperature = Math.log(lastTemperature);
const lastStep = Math.log(gridTemperatures[gridSize - 2] / lastTemperature);

/** Where a depth reaches one. */
export interface Crossing {
  /** Index of the point just below the crossing, or -1 where there is none on the grid. */
  lower: number;
  /** How far the crossing lies above that point, in steps: 0 to 1. */
  part: number;
  /** T_r there, K. */
  temperature: number;
}

/**
 * tau and tau_d on the grid: the same integrals as lastScattering/opticalDepthHistory.ts, with six-point weights, and a power
 * law from the last point (z = 8) to today.
 */
export class GridDepths {
  /** dtau/du where crossings are looked for. */
  private readonly rate = new Float64Array(gridSize);
  readonly lastScattering: Crossing = { lower: -1, part: 0.5, temperature: 0.5 };
  readonly drag: Crossing = { lower: -1, part: 0.5, temperature: 0.5 };
  private readonly dragRate = new Float64Array(gridSize);
  private readonly weights = tailWeights(searchStart);
  private readonly scratch = new Float64Array(6);

  run(row: BatchRow, inverseRate: Float64Array, ionized: Float64Array): void {
    const { rate, dragRate, weights } = this;
    const temperatures = gridTemperatures;
    const scale = row.scattering / row.photonTemperature ** 3;
    const perLoading = 1 / (row.loading * row.photonTemperature);
    let photon = 0;
    let drag = 0;
    for (let i = searchEnd - 3; i < searchStart + 3; i++) {
      const temperature = temperatures[i];
      const here = scale * temperature * temperature * temperature * ionized[i] * inverseRate[i];
      rate[i] = here;
      dragRate[i] = here * temperature * perLoading;
    }
    for (let i = searchStart - 2; i < searchStart + 3; i++) {
      photon += weights[i] * rate[i];
      drag += weights[i] * dragRate[i];
    }
    let here = 1;
    let above = 1;
    for (let i = searchStart + 3; i < gridSize; i++) {
      const temperature = temperatures[i];
      above = here;
      here = scale * temperature * temperature * temperature * ionized[i] * inverseRate[i];
      const weighted = weights[i] * here;
      photon += weighted;
      drag += weighted * temperature * perLoading;
    }
    // dtau/du = A T^p below the grid, to T_cmb; p from the last two points by the series of the area hyperbolic tangent.
    const t = (above - here) / (above + here);
    const slope = (2 * t * (1 + (t * t) / 3)) / lastStep;
    const left = Math.exp(slope * (row.logPhotonTemperature - logLastTemperature));
    photon += (here / slope) * (1 - left);
    drag +=
      ((here * lastTemperature * perLoading) / (slope + 1)) * (1 - (left * row.photonTemperature) / lastTemperature);
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
    // e^(h part) by its series.
    const s = gridStep * part;
    out.temperature = gridTemperatures[lower] * (1 + s * (1 + (s / 2) * (1 + (s / 3) * (1 + (s / 4) * (1 + s / 5)))));
  }
}
