import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";
import type { MarchState } from "./atomMarch";
import { coldPointsPerRoot, hydrogenColumns } from "./atomTables";
import { coolingSlopeWeight, coolingWeights, pastWeights, predictionWeights, slopeWeight } from "./backwardDifferences";
import type { BatchRow } from "./batchRow";
import { gridBlocks, gridStep, gridTemperatures, heliumEnd } from "./temperatureGrid";

/** 1 - T_m/T_r up to which the Taylor series of the case-B coefficient serves: its third term is below 1e-8 of it. */
const seriesLimit = 3e-3;

/**
 * The march down one block, or what is left of the first, where helium is gone. Works on locals as {@link marchWithHelium} does.
 */
export function marchHydrogen(state: MarchState, b: number, row: BatchRow, inverseRate: Float64Array): void {
  const { tables, neutral, cooling, ionized, escapes, compton, newtonSteps } = state;
  const { hydrogen: rates, coldRecombination: cold } = tables;
  const temperatures = gridTemperatures;
  const coldPerRoot = coldPointsPerRoot;
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
  const { first, end, stride } = gridBlocks[b];
  const start = b === 0 ? heliumEnd : first;
  const density = row.hydrogenDensity / row.photonTemperature ** 3;
  const others = 1 + row.heliumRatio;
  const step = stride * gridStep * slopeWeight;
  const thermalStep = (step * coolingSlopeWeight) / slopeWeight;
  const weight = step / hundredKmPerSecondPerMpc;
  const twoPhoton = atoms.hydrogenTwoPhotonRate;
  // At a block's beginning the points of the finer block stand in, every second of them.
  const back = b === 0 ? 1 : 2;
  const last = start - 1;
  let x1 = neutral[last];
  let x2 = neutral[last - back];
  let x3 = neutral[last - 2 * back];
  let x4 = neutral[last - 3 * back];
  let x5 = neutral[last - 4 * back];
  let x6 = neutral[last - 5 * back];
  let d1 = cooling[last];
  let d2 = cooling[last - back];
  let d3 = cooling[last - 2 * back];
  let d4 = cooling[last - 3 * back];
  let d5 = cooling[last - 4 * back];
  let d6 = cooling[last - 5 * back];
  let d7 = cooling[last - 6 * back];
  for (let i = start; i < end; i++) {
    const inverse = inverseRate[i];
    const span = weight * inverse;
    const at = i * hydrogenColumns;
    const pastX = c1 * x1 + (c2 * x2 + c3 * x3 + (c4 * x4 + c5 * x5 + c6 * x6));
    let x = p1 * x1 + (p2 * x2 + p3 * x3 + (p4 * x4 + p5 * x5 + p6 * x6));
    const pastD = t1 * d1 + (t2 * d2 + (t3 * d3 + t4 * d4));
    // Two steps ahead of the last known: that point's d then stands off the chain from point to point.
    const predictedD = 21 * d2 - 70 * d3 + (105 * d4 - 84 * d5) + (35 * d6 - 6 * d7);

    let recombination = density * rates[at];
    if (predictedD < seriesLimit) {
      recombination *= 1 + predictedD * (rates[at + 1] + predictedD * rates[at + 2]);
    } else {
      // Far colder than the radiation: the coefficient at T_m itself, from its own table in sqrt(T_m).
      const place = Math.sqrt(temperatures[i] * (1 - predictedD)) * coldPerRoot;
      const k = place | 0;
      recombination = density * rates[at + 9] * (cold[k] + (place - k) * (cold[k + 1] - cold[k]));
    }
    const ionization = rates[at + 3] * (1 + predictedD * (rates[at + 4] + predictedD * rates[at + 5]));
    const ground = rates[at + 6] * (1 + predictedD * (rates[at + 7] + predictedD * rates[at + 8]));
    const stuck = density * escapes[i] * inverse;
    const decay = stuck * twoPhoton;
    const blocked = decay + stuck * ionization;
    for (let k = 0; k < newtonSteps; k++) {
      const free = 1 - x;
      const net = recombination * free * free - ground * x;
      const netSlope = -2 * recombination * free - ground;
      const gap = x - pastX;
      const upper = span * (1 + decay * x);
      const lower = 1 + blocked * x;
      x -= (gap * lower - net * upper) / (lower + gap * blocked - (netSlope * upper + span * net * decay));
    }
    const electrons = 1 - x;
    const particles = others + electrons;
    const d =
      ((pastD + thermalStep) * particles) /
      (particles * (1 + thermalStep) + thermalStep * inverse * compton[i] * electrons);
    x6 = x5;
    x5 = x4;
    x4 = x3;
    x3 = x2;
    x2 = x1;
    x1 = x;
    d7 = d6;
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
