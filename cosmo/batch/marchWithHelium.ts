import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";
import type { MarchState } from "./atomMarch";
import { heliumColumns, hydrogenColumns } from "./atomTables";
import { coolingSlopeWeight, coolingWeights, pastWeights, predictionWeights, slopeWeight } from "./backwardDifferences";
import type { BatchRow } from "./batchRow";
import { equilibriumPoints, gridStep, heliumEnd, mainFirst } from "./temperatureGrid";

/** He+ a helium nucleus in Saha equilibrium: y with f y^2 + (x_p + s) y - s = 0, as heliumWithHydrogen of recombination/threeLevelAtom.ts. */
function equilibriumShare(hydrogen: number, s: number, ratio: number): number {
  const b = hydrogen + s;
  return (2 * s) / (b + Math.sqrt(b * b + 4 * ratio * s));
}

/** Hydrogen in equilibrium at the first points of the fine block, whatever helium does. */
export function startHydrogen(state: MarchState, row: BatchRow, inverseRate: Float64Array): void {
  const { tables, neutral, cooling, ionized, neutralHelium, compton } = state;
  const { hydrogen: rates, helium, hydrogenSaha, kineticHelium } = tables;
  const density = row.hydrogenDensity / row.photonTemperature ** 3;
  const ratio = row.heliumRatio;
  for (let i = mainFirst; i < mainFirst + equilibriumPoints; i++) {
    const n = density * rates[i * hydrogenColumns + 9];
    const s = helium[i * heliumColumns + 2] / n;
    const hydrogen = hydrogenSaha[i] / n;
    let once = kineticHelium ? 1 - neutralHelium[i] : 1;
    let share = 0;
    for (let k = 0; k < 4; k++) {
      const electrons = 1 - share + ratio * once;
      share = electrons / (hydrogen + electrons);
      if (!kineticHelium) once = equilibriumShare(1 - share, s, ratio);
    }
    const electrons = 1 - share + ratio * once;
    neutral[i] = share;
    ionized[i] = electrons;
    cooling[i] = 1 / (1 + (compton[i] * inverseRate[i] * electrons) / (1 + ratio + electrons));
  }
}

/**
 * Hydrogen's march down the fine block as far as helium counts: helium's share is known from its own march, or in equilibrium.
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
  // Fourth order is enough for d, which is a correction of 1e-5 while ionization changes fast.
  const t1 = coolingWeights[0];
  const t2 = coolingWeights[1];
  const t3 = coolingWeights[2];
  const t4 = coolingWeights[3];
  const p1 = predictionWeights[0];
  const p2 = predictionWeights[1];
  const p3 = predictionWeights[2];
  const p4 = predictionWeights[3];
  const p5 = predictionWeights[4];
  const p6 = predictionWeights[5];
  const density = row.hydrogenDensity / row.photonTemperature ** 3;
  const ratio = row.heliumRatio;
  const step = gridStep * slopeWeight;
  const thermalStep = (step * coolingSlopeWeight) / slopeWeight;
  const weight = step / hundredKmPerSecondPerMpc;
  const twoPhoton = atoms.hydrogenTwoPhotonRate;
  const last = mainFirst + equilibriumPoints - 1;
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
  for (let i = mainFirst + equilibriumPoints; i < heliumEnd; i++) {
    const inverse = inverseRate[i];
    const span = weight * inverse;
    const at = i * hydrogenColumns;

    const pastX = c1 * x1 + (c2 * x2 + c3 * x3 + (c4 * x4 + c5 * x5 + c6 * x6));
    let x = p1 * x1 + (p2 * x2 + p3 * x3 + (p4 * x4 + p5 * x5 + p6 * x6));
    const pastD = t1 * d1 + (t2 * d2 + (t3 * d3 + t4 * d4));
    const predictedD = 5 * (d1 - d4) + (10 * (d3 - d2) + d5);

    let once = 1 - neutralHelium[i];
    let onceSlope = 0;
    if (!kineticHelium) {
      // In equilibrium He+ moves with hydrogen.
      const ionizations = helium[i * heliumColumns + 2] * (1 + helium[i * heliumColumns + 3] * predictedD);
      const s = ionizations / (density * rates[at + 9]);
      once = equilibriumShare(1 - x, s, ratio);
      onceSlope = (once * once) / (2 * s - once * (1 - x + s));
    }

    const recombination = density * rates[at] * (1 + predictedD * rates[at + 1]);
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
    const d =
      ((pastD + thermalStep) * particles) /
      (particles * (1 + thermalStep) + thermalStep * inverse * compton[i] * electrons);
    x6 = x5;
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
    ionized[i] = electrons;
  }
}
