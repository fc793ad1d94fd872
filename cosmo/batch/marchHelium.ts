import { hundredKmPerSecondPerMpc } from "../model";
import type { MarchState } from "./atomMarch";
import { heliumColumns, hydrogenColumns } from "./atomTables";
import { pastWeights, predictionWeights, slopeWeight } from "./backwardDifferences";
import type { BatchRow } from "./batchRow";
import { continuumPlace, lineEscapes } from "./heliumEscape";
import { equilibriumPoints, gridStep, heliumAtMainTop, heliumBlock, heliumEnd, mainFirst } from "./temperatureGrid";

/** Points in equilibrium before the first step: one more than the formula looks back at, for the extrapolation two steps ahead. */
const startPoints = equilibriumPoints + 1;

/**
 * Saha equilibrium of hydrogen and helium on the coarse block from `from` to before `to`. Each pass gains the factor 1 - x_p: 1e-9 at
 * the top, 0.02 at the bottom.
 */
function fillEquilibrium(state: MarchState, row: BatchRow, from: number, to: number, passes: number): void {
  const { tables, neutral, ionized, neutralHelium, continuumPlaces } = state;
  const { hydrogen: rates, helium, hydrogenSaha } = tables;
  const density = row.hydrogenDensity / row.photonTemperature ** 3;
  const ratio = row.heliumRatio;
  for (let i = from; i < to; i++) {
    const n = density * rates[i * hydrogenColumns + 9];
    const s = helium[i * heliumColumns + 2] / n;
    const hydrogen = hydrogenSaha[i] / n;
    let electrons = 1 + ratio;
    let share = 0;
    for (let k = 0; k < passes; k++) {
      share = electrons / (hydrogen + electrons);
      const b = 1 - share + s;
      electrons = 1 - share + (ratio * 2 * s) / (b + Math.sqrt(b * b + 4 * ratio * s));
    }
    neutral[i] = share;
    // y (x_e + s) = s.
    neutralHelium[i] = electrons / (electrons + s);
    continuumPlaces[i] = continuumPlace((helium[i * heliumColumns + 10] * ratio * neutralHelium[i]) / share);
    ionized[i] = electrons;
  }
}

/** The coarse block for the tier whose helium never leaves equilibrium, and for gas without helium. */
export function heliumInEquilibrium(state: MarchState, row: BatchRow): void {
  fillEquilibrium(state, row, heliumBlock.first, heliumBlock.end, 3);
}

/**
 * Helium's march down its coarse block, hydrogen in Saha equilibrium and T_m = T_r: there 1 - T_m/T_r is below 1e-6. Then 1 - y
 * at the points of the fine block, every second of which lies between two of the coarse one.
 */
export function marchHelium(state: MarchState, row: BatchRow, inverseRate: Float64Array): void {
  const { tables, neutral, ionized, neutralHelium, continuumPlaces: places, newtonSteps } = state;
  const { hydrogen: rates, helium, hydrogenSaha } = tables;
  const { first, end, stride } = heliumBlock;
  fillEquilibrium(state, row, first, first + startPoints, 1);
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
  const weight = (stride * gridStep * slopeWeight) / hundredKmPerSecondPerMpc;
  const perRate = 1 / hundredKmPerSecondPerMpc;
  const last = first + startPoints - 1;
  let y1 = neutralHelium[last];
  let y2 = neutralHelium[last - 1];
  let y3 = neutralHelium[last - 2];
  let y4 = neutralHelium[last - 3];
  let y5 = neutralHelium[last - 4];
  let y6 = neutralHelium[last - 5];
  for (let i = first + startPoints; i < end; i++) {
    const at = i * heliumColumns;
    const n = density * rates[i * hydrogenColumns + 9];
    const past = c1 * y1 + (c2 * y2 + c3 * y3 + (c4 * y4 + c5 * y5 + c6 * y6));
    let y = p1 * y1 + (p2 * y2 + p3 * y3 + (p4 * y4 + p5 * y5 + p6 * y6));
    // The opacity by hydrogen goes as the eighth root of a power: smooth enough to be extrapolated two steps, which takes
    // its square roots off the chain from one point to the next.
    const place =
      21 * places[i - 2] -
      70 * places[i - 3] +
      (105 * places[i - 4] - 84 * places[i - 5]) +
      (35 * places[i - 6] - 6 * places[i - 7]);
    const hydrogen = hydrogenSaha[i] / n;
    // 1 - x_p enters the electrons alone, and is small wherever helium still changes: the last point's helium is near enough.
    const before = 1 / (1 + hydrogen / (1 + ratio * (1 - y1)));
    const ionizations = helium[at + 2];
    const depths = ratio * y * n * inverseRate[i] * perRate;
    const through = weight * inverseRate[i] * lineEscapes(helium, at, depths, place);
    for (let k = 0; k < newtonSteps; k++) {
      const held = n * (1 - before + ratio * (1 - y));
      const missing = y - past - through * (held * (1 - y) - ionizations * y);
      y -= missing / (1 + through * (held + n * ratio * (1 - y) + ionizations));
    }
    y6 = y5;
    y5 = y4;
    y4 = y3;
    y3 = y2;
    y2 = y1;
    y1 = y;
    const electrons = 1 - before + ratio * (1 - y);
    const x = electrons / (hydrogen + electrons);
    places[i] = continuumPlace((helium[at + 10] * ratio * y * (hydrogen + electrons)) / electrons);
    neutral[i] = x;
    neutralHelium[i] = y;
    ionized[i] = 1 - x + ratio * (1 - y);
  }
  let coarse = heliumAtMainTop;
  for (let i = mainFirst; i < heliumEnd; i += 2, coarse++) {
    neutralHelium[i] = neutralHelium[coarse];
    neutralHelium[i + 1] =
      (9 * (neutralHelium[coarse] + neutralHelium[coarse + 1]) -
        (neutralHelium[coarse - 1] + neutralHelium[coarse + 2])) /
      16;
  }
}
