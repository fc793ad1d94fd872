import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";
import { atomSettings } from "../recombination";
import { lymanAlphaVolume } from "../recombination/hydrogenRates";
import { type AtomTables, coldTop, heliumStride, hydrogenStride } from "./atomTables";
import type { BatchRow } from "./batchRow";
import { lineEscapes } from "./heliumEscape";
import {
  equilibriumPoints,
  gridBlocks,
  gridSize,
  gridStep,
  gridTemperatures,
  gridTop,
  heliumEnd,
} from "./temperatureGrid";

/** Fifth-order backward differentiation: y_n = (300 y_1 - 300 y_2 + 200 y_3 - 75 y_4 + 12 y_5 + 60 h y'_n)/137. */
const c1 = 300 / 137;
const c2 = -300 / 137;
const c3 = 200 / 137;
const c4 = -75 / 137;
const c5 = 12 / 137;
const slopeWeight = 60 / 137;

/** T^4 and T^3 of the grid. */
const cubes = gridTemperatures.map((temperature) => temperature ** 3);
const fourths = gridTemperatures.map((temperature) => temperature ** 4);

/** 1 - T_m/T_r up to which the Taylor series of the case-B coefficient serves: its third term is below 1e-8 of it. */
const seriesLimit = 3e-3;

/**
 * The three-level atom down the grid by backward differentiation of fifth order: five-point prediction, one Newton step with
 * the analytic slope an equation.
 *
 * The equations are those of recombination/threeLevelAtom.ts in other variables: 1 - x_p, 1 - y and d = 1 - T_m/T_r, which keep their
 * digits at the stiff end; late, x_p is 2e-4 and 1 - (1 - x_p) still has twelve. Hydrogen's is multiplied through by Peebles'
 * denominator, the temperature's is linear in d. A test holds the march against the single model's derivative.
 */
export class AtomMarch {
  /** 1 - x_p, 1 - T_m/T_r and x_e at every point. */
  readonly neutral = new Float64Array(gridSize);
  readonly cooling = new Float64Array(gridSize);
  readonly ionized = new Float64Array(gridSize);
  /** 1 - y where helium is followed. */
  readonly neutralHelium = new Float64Array(gridSize);
  /** T^3/(8 pi L_a^3) times the correction of the tier, for the T_cmb in {@link escapeTemperature}. */
  private readonly escape = new Float64Array(gridSize);
  private escapeTemperature = -1;
  private readonly correction: (onePlusRedshift: number) => number;

  /** @param newtonSteps one; more only in the test that compares the converged step with the single model's equations. */
  constructor(
    private readonly tables: AtomTables,
    private readonly comptonPerFourthPower: number,
    private readonly newtonSteps = 1,
  ) {
    this.correction = atomSettings(tables.tier).escapeCorrection;
  }

  /** @param inverseRate 100 km/s/Mpc over H on the grid. */
  run(row: BatchRow, inverseRate: Float64Array): void {
    if (this.escapeTemperature !== row.photonTemperature) this.fillEscape(row.photonTemperature);
    this.start(row, inverseRate);
    this.upper(row, inverseRate);
    for (let b = 0; b < gridBlocks.length; b++) this.lower(b, row, inverseRate);
  }

  private fillEscape(temperature: number): void {
    for (let i = 0; i < gridSize; i++) {
      this.escape[i] = cubes[i] * lymanAlphaVolume * this.correction(gridTemperatures[i] / temperature);
    }
    this.escapeTemperature = temperature;
  }

  /** Equilibrium at the first points. */
  private start(row: BatchRow, inverseRate: Float64Array): void {
    const { tables, neutral, cooling, ionized, neutralHelium } = this;
    const density = row.hydrogenDensity / row.photonTemperature ** 3;
    const ratio = row.heliumRatio;
    for (let i = 0; i < equilibriumPoints; i++) {
      const n = density * cubes[i];
      const s = tables.helium[i * heliumStride + 2] / n;
      const hydrogen = tables.hydrogenSaha[i] / n;
      let electrons = 1 + ratio;
      let neutralShare = 0;
      let once = 1;
      for (let k = 0; k < 4; k++) {
        neutralShare = electrons / (hydrogen + electrons);
        const b = 1 - neutralShare + s;
        once = (2 * s) / (b + Math.sqrt(b * b + 4 * ratio * s));
        electrons = 1 - neutralShare + ratio * once;
      }
      neutral[i] = neutralShare;
      // y (x_e + s) = s.
      neutralHelium[i] = electrons / (electrons + s);
      ionized[i] = electrons;
      const heating = (this.comptonPerFourthPower * fourths[i] * electrons) / (1 + ratio + electrons);
      cooling[i] = 1 / (1 + (heating * inverseRate[i]) / hundredKmPerSecondPerMpc);
    }
  }

  /** The finest block as far as helium counts. Works on locals: no allocation. */
  private upper(row: BatchRow, inverseRate: Float64Array): void {
    const { tables, neutral, cooling, ionized, neutralHelium, escape, newtonSteps } = this;
    const { hydrogen: rates, helium, kineticHelium } = tables;
    const density = row.hydrogenDensity / row.photonTemperature ** 3;
    const ratio = row.heliumRatio;
    const kinetic = kineticHelium && ratio > 0;
    const compton = this.comptonPerFourthPower;
    const weight = (gridStep * slopeWeight) / hundredKmPerSecondPerMpc;
    const step = gridStep * slopeWeight;
    const twoPhoton = atoms.hydrogenTwoPhotonRate;
    let x1 = neutral[4],
      x2 = neutral[3],
      x3 = neutral[2],
      x4 = neutral[1],
      x5 = neutral[0];
    let d1 = cooling[4],
      d2 = cooling[3],
      d3 = cooling[2],
      d4 = cooling[1],
      d5 = cooling[0];
    let y1 = neutralHelium[4],
      y2 = neutralHelium[3],
      y3 = neutralHelium[2],
      y4 = neutralHelium[1],
      y5 = neutralHelium[0];
    for (let i = equilibriumPoints; i < heliumEnd; i++) {
      const span = weight * inverseRate[i];
      const n = density * cubes[i];
      const at = i * hydrogenStride;
      const heliumAt = i * heliumStride;

      const pastX = c1 * x1 + c2 * x2 + c3 * x3 + c4 * x4 + c5 * x5;
      let x = 5 * (x1 - x4) - 10 * (x2 - x3) + x5;
      let y = kinetic ? 5 * (y1 - y4) - 10 * (y2 - y3) + y5 : 1;
      const pastD = c1 * d1 + c2 * d2 + c3 * d3 + c4 * d4 + c5 * d5;
      let d = 5 * (d1 - d4) - 10 * (d2 - d3) + d5;

      // He+ of the prediction; in equilibrium it moves with hydrogen.
      let once = 1 - y;
      let onceSlope = 0;
      let electrons = 1 - x + ratio * once;
      const ionizations = helium[heliumAt + 2] * (1 + helium[heliumAt + 3] * d);
      if (!kinetic && ratio > 0) {
        const s = ionizations / n;
        const b = 1 - x + s;
        const root = Math.sqrt(b * b + 4 * ratio * s);
        once = (2 * s) / (b + root);
        onceSlope = once / root;
        electrons = 1 - x + ratio * once;
      }

      const particles = 1 + ratio + electrons;
      d = ((pastD + step) * particles) / (particles * (1 + step) + span * compton * fourths[i] * electrons);

      if (kinetic) {
        const pastY = c1 * y1 + c2 * y2 + c3 * y3 + c4 * y4 + c5 * y5;
        const through = span * lineEscapes(helium, heliumAt, ratio * y, n * inverseRate[i], x);
        for (let k = 0; k < newtonSteps; k++) {
          const held = n * (1 - x + ratio * (1 - y));
          const missing = y - pastY - through * (held * (1 - y) - ionizations * y);
          y -= missing / (1 + through * (held + n * ratio * (1 - y) + ionizations));
        }
        once = 1 - y;
        y5 = y4;
        y4 = y3;
        y3 = y2;
        y2 = y1;
        y1 = y;
        neutralHelium[i] = y;
      }

      const recombination = n * rates[at] * (1 + d * (rates[at + 1] + d * rates[at + 2]));
      const ionization = rates[at + 3] * (1 + d * (rates[at + 4] + d * rates[at + 5]));
      const ground = rates[at + 6] * (1 + d * (rates[at + 7] + d * rates[at + 8]));
      const stuck = (density * escape[i] * inverseRate[i]) / hundredKmPerSecondPerMpc;
      const decay = stuck * twoPhoton;
      const blocked = stuck * (twoPhoton + ionization);
      for (let k = 0; k < newtonSteps; k++) {
        electrons = 1 - x + ratio * once;
        const free = 1 - x;
        const net = recombination * electrons * free - ground * x;
        const netSlope = recombination * ((ratio * onceSlope - 1) * free - electrons) - ground;
        const gap = x - pastX;
        const upper = 1 + decay * x;
        const lower = 1 + blocked * x;
        const change =
          (gap * lower - span * net * upper) / (lower + gap * blocked - span * (netSlope * upper + net * decay));
        x -= change;
        once -= onceSlope * change;
      }
      x5 = x4;
      x4 = x3;
      x3 = x2;
      x2 = x1;
      x1 = x;
      d5 = d4;
      d4 = d3;
      d3 = d2;
      d2 = d1;
      d1 = d;
      neutral[i] = x;
      cooling[i] = d;
      ionized[i] = 1 - x + ratio * once;
    }
  }

  /** One block below helium's end. Works on locals: no allocation. */
  private lower(b: number, row: BatchRow, inverseRate: Float64Array): void {
    const { tables, neutral, cooling, ionized, escape, newtonSteps } = this;
    const { hydrogen: rates, coldRecombination } = tables;
    const { first, end, stride } = gridBlocks[b];
    const density = row.hydrogenDensity / row.photonTemperature ** 3;
    const others = 1 + row.heliumRatio;
    const compton = this.comptonPerFourthPower;
    const weight = (stride * gridStep * slopeWeight) / hundredKmPerSecondPerMpc;
    const step = stride * gridStep * slopeWeight;
    const twoPhoton = atoms.hydrogenTwoPhotonRate;
    const start = b === 0 ? heliumEnd : first;
    // At a block's beginning the points of the finer block stand in, every second of them.
    const back = b === 0 ? 1 : 2;
    const last = start - 1;
    let x1 = neutral[last],
      x2 = neutral[last - back],
      x3 = neutral[last - 2 * back];
    let x4 = neutral[last - 3 * back],
      x5 = neutral[last - 4 * back];
    let d1 = cooling[last],
      d2 = cooling[last - back],
      d3 = cooling[last - 2 * back];
    let d4 = cooling[last - 3 * back],
      d5 = cooling[last - 4 * back];
    for (let i = start; i < end; i++) {
      const span = weight * inverseRate[i];
      const at = i * hydrogenStride;
      const pastX = c1 * x1 + c2 * x2 + c3 * x3 + c4 * x4 + c5 * x5;
      let x = 5 * (x1 - x4) - 10 * (x2 - x3) + x5;
      const pastD = c1 * d1 + c2 * d2 + c3 * d3 + c4 * d4 + c5 * d5;
      const particles = others + 1 - x;
      const d = ((pastD + step) * particles) / (particles * (1 + step) + span * compton * fourths[i] * (1 - x));

      let alpha = rates[at] * (1 + d * (rates[at + 1] + d * rates[at + 2]));
      if (d > seriesLimit) {
        const place = (coldTop - gridTop) / gridStep + (gridTop - Math.log(gridTemperatures[i] * (1 - d))) / gridStep;
        const k = Math.floor(place);
        alpha = coldRecombination[k] + (place - k) * (coldRecombination[k + 1] - coldRecombination[k]);
      }
      const recombination = density * cubes[i] * alpha;
      const ionization = rates[at + 3] * (1 + d * (rates[at + 4] + d * rates[at + 5]));
      const ground = rates[at + 6] * (1 + d * (rates[at + 7] + d * rates[at + 8]));
      const stuck = (density * escape[i] * inverseRate[i]) / hundredKmPerSecondPerMpc;
      const decay = stuck * twoPhoton;
      const blocked = stuck * (twoPhoton + ionization);
      for (let k = 0; k < newtonSteps; k++) {
        const free = 1 - x;
        const net = recombination * free * free - ground * x;
        const netSlope = -2 * recombination * free - ground;
        const gap = x - pastX;
        const upper = 1 + decay * x;
        const lower = 1 + blocked * x;
        x -= (gap * lower - span * net * upper) / (lower + gap * blocked - span * (netSlope * upper + net * decay));
      }
      x5 = x4;
      x4 = x3;
      x3 = x2;
      x2 = x1;
      x1 = x;
      d5 = d4;
      d4 = d3;
      d3 = d2;
      d2 = d1;
      d1 = d;
      neutral[i] = x;
      cooling[i] = d;
      ionized[i] = 1 - x;
    }
  }
}
