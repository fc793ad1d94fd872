import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";
import type { MarchState } from "./atomMarch";
import { heliumStride, hydrogenStride } from "./atomTables";
import { pastWeights, predictionWeights, slopeWeight } from "./backwardDifferences";
import type { BatchRow } from "./batchRow";
import { lineEscapes } from "./heliumEscape";
import { equilibriumPoints, gridStep, heliumEnd } from "./temperatureGrid";

/**
 * The march down the finest block as far as helium counts.
 *
 * Works on locals, newest value first, and allocates nothing. What the newest value does not enter stands in sums of its own, and the
 * rates take d as predicted (1e-4 of a d of 1e-5): both keep the chain from one point to the next short.
 */
export function marchWithHelium(state: MarchState, row: BatchRow, inverseRate: Float64Array): void {
  const { tables, neutral, cooling, ionized, neutralHelium, escapes, compton, newtonSteps } = state;
  const { hydrogen: rates, helium, kineticHelium } = tables;
  const c1 = pastWeights[0];
  const c2 = pastWeights[1];
  const c3 = pastWeights[2];
  const c4 = pastWeights[3];
  const c5 = pastWeights[4];
  const c6 = pastWeights[5];
  const p1 = predictionWeights[0];
  const p2 = predictionWeights[1];
  const p3 = predictionWeights[2];
  const p4 = predictionWeights[3];
  const p5 = predictionWeights[4];
  const p6 = predictionWeights[5];
  const density = row.hydrogenDensity / row.photonTemperature ** 3;
  const ratio = row.heliumRatio;
  const kinetic = kineticHelium && ratio > 0;
  const step = gridStep * slopeWeight;
  const weight = step / hundredKmPerSecondPerMpc;
  const twoPhoton = atoms.hydrogenTwoPhotonRate;
  const last = equilibriumPoints - 1;
  let x1 = neutral[last];
  let x2 = neutral[last - 1];
  let x3 = neutral[last - 2];
  let x4 = neutral[last - 3];
  let x5 = neutral[last - 4];
  let x6 = neutral[last - 5];
  let d1 = cooling[last];
  let d2 = cooling[last - 1];
  let d3 = cooling[last - 2];
  let d4 = cooling[last - 3];
  let d5 = cooling[last - 4];
  let d6 = cooling[last - 5];
  let y1 = neutralHelium[last];
  let y2 = neutralHelium[last - 1];
  let y3 = neutralHelium[last - 2];
  let y4 = neutralHelium[last - 3];
  let y5 = neutralHelium[last - 4];
  let y6 = neutralHelium[last - 5];
  for (let i = equilibriumPoints; i < heliumEnd; i++) {
    const inverse = inverseRate[i];
    const span = weight * inverse;
    const at = i * hydrogenStride;
    const heliumAt = i * heliumStride;
    const n = density * rates[at + 9];

    const pastX = c1 * x1 + (c2 * x2 + c3 * x3 + (c4 * x4 + c5 * x5 + c6 * x6));
    let x = p1 * x1 + (p2 * x2 + p3 * x3 + (p4 * x4 + p5 * x5 + p6 * x6));
    const pastD = c1 * d1 + (c2 * d2 + c3 * d3 + (c4 * d4 + c5 * d5 + c6 * d6));
    const predictedD = p1 * d1 + (p2 * d2 + p3 * d3 + (p4 * d4 + p5 * d5 + p6 * d6));

    const ionizations = helium[heliumAt + 2] * (1 + helium[heliumAt + 3] * predictedD);
    let once = 0;
    let onceSlope = 0;
    if (kinetic) {
      const pastY = c1 * y1 + (c2 * y2 + c3 * y3 + (c4 * y4 + c5 * y5 + c6 * y6));
      let y = p1 * y1 + (p2 * y2 + p3 * y3 + (p4 * y4 + p5 * y5 + p6 * y6));
      const through = span * lineEscapes(helium, heliumAt, ratio * y, n * inverse, x);
      for (let k = 0; k < newtonSteps; k++) {
        const held = n * (1 - x + ratio * (1 - y));
        const missing = y - pastY - through * (held * (1 - y) - ionizations * y);
        y -= missing / (1 + through * (held + n * ratio * (1 - y) + ionizations));
      }
      once = 1 - y;
      y6 = y5;
      y5 = y4;
      y4 = y3;
      y3 = y2;
      y2 = y1;
      y1 = y;
      neutralHelium[i] = y;
    } else if (ratio > 0) {
      // In equilibrium He+ moves with hydrogen.
      const s = ionizations / n;
      const b = 1 - x + s;
      const root = Math.sqrt(b * b + 4 * ratio * s);
      once = (2 * s) / (b + root);
      onceSlope = once / root;
    }

    const recombination = density * rates[at] * (1 + predictedD * (rates[at + 1] + predictedD * rates[at + 2]));
    const ionization = rates[at + 3] * (1 + predictedD * (rates[at + 4] + predictedD * rates[at + 5]));
    const ground = rates[at + 6] * (1 + predictedD * (rates[at + 7] + predictedD * rates[at + 8]));
    const stuck = density * escapes[i] * inverse;
    const decay = stuck * twoPhoton;
    const blocked = decay + stuck * ionization;
    for (let k = 0; k < newtonSteps; k++) {
      const free = 1 - x;
      const electrons = free + ratio * once;
      const net = recombination * electrons * free - ground * x;
      const netSlope = recombination * ((ratio * onceSlope - 1) * free - electrons) - ground;
      const gap = x - pastX;
      const upper = span * (1 + decay * x);
      const lower = 1 + blocked * x;
      const change = (gap * lower - net * upper) / (lower + gap * blocked - (netSlope * upper + span * net * decay));
      x -= change;
      once -= onceSlope * change;
    }
    const electrons = 1 - x + ratio * once;
    const particles = 1 + ratio + electrons;
    // The step's length in ln T_r once more, since d falls by itself as 1 - d.
    const d = ((pastD + step) * particles) / (particles * (1 + step) + step * inverse * compton[i] * electrons);
    x6 = x5;
    x5 = x4;
    x4 = x3;
    x3 = x2;
    x2 = x1;
    x1 = x;
    d6 = d5;
    d5 = d4;
    d4 = d3;
    d3 = d2;
    d2 = d1;
    d1 = d;
    neutral[i] = x;
    cooling[i] = d;
    ionized[i] = electrons;
  }
}
