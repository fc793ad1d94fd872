import { fermiDiracEnergy } from "../expansion";
import { gridPlaces, gridSize, gridStep, mainTop } from "./temperatureGrid";

// Below the range the energy is that of a massless species to 1e-15; above it lies every mass that the engine takes.
const lowest = -17;
const points = 2801;

let energies: Float64Array | undefined;

/** rho(y)/rho(0) at equal steps of the grid in ln y, from the function that the single model uses. */
function table(): Float64Array {
  energies ??= Float64Array.from({ length: points }, (_, i) => fermiDiracEnergy(Math.exp(lowest + gridStep * i)));
  return energies;
}

/** The largest ln y that the table serves, neighbors of the stencil left over. */
export const highestLogMassRatio = lowest + gridStep * (points - 4);

/**
 * Adds weight times rho(y)/rho(0) of one species at any scale factors, by cubic interpolation in the table. Accuracy 2e-10.
 *
 * @param logMassRatioToday ln of m c^2/(k T_nu) today; @param logs ln a; @param from, @param to range of nodes.
 */
export function addEnergy(
  logMassRatioToday: number,
  weight: number,
  logs: Float64Array,
  sum: Float64Array,
  from: number,
  to: number,
): void {
  const energy = table();
  const offset = (logMassRatioToday - lowest) / gridStep;
  const perStep = 1 / gridStep;
  for (let i = from; i < to; i++) {
    const place = offset + logs[i] * perStep;
    if (!(place >= 1)) {
      sum[i] += weight;
      continue;
    }
    const k = place | 0;
    const p = place - k;
    const q = 1 - p;
    sum[i] +=
      weight *
      (q * (1 + p) * (1 - 0.5 * p) * energy[k] +
        p * (1 + q) * (1 - 0.5 * q) * energy[k + 1] -
        (p * q * ((1 + q) * energy[k - 1] + (1 + p) * energy[k + 2])) / 6);
  }
}

/**
 * Adds weight times rho(y)/rho(0) of one species to `sum` at every point of the grid. Both grids have the same step, so the
 * interpolation weights are the same at every point.
 *
 * @param logMassRatioToday ln of m c^2/(k T_nu) today; @param logTemperatureToday ln T_cmb.
 */
export function addNeutrinoEnergy(
  logMassRatioToday: number,
  logTemperatureToday: number,
  weight: number,
  sum: Float64Array,
): void {
  const energy = table();
  const place = (logMassRatioToday + logTemperatureToday - mainTop - lowest) / gridStep;
  const index = Math.floor(place);
  const p = place - index;
  const q = 1 - p;
  const w0 = (-weight * p * q * (1 + q)) / 6;
  const w1 = weight * q * (1 + p) * (1 - 0.5 * p);
  const w2 = weight * p * (1 + q) * (1 - 0.5 * q);
  const w3 = (-weight * p * q * (1 + p)) / 6;
  const places = gridPlaces;
  for (let i = 0; i < gridSize; i++) {
    const base = index + places[i];
    if (base < 1) sum[i] += weight;
    else sum[i] += w0 * energy[base - 1] + w1 * energy[base] + w2 * energy[base + 1] + w3 * energy[base + 2];
  }
}
