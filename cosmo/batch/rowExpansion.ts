import { darkEnergyGrowth } from "../expansion";
import type { BatchRow } from "./batchRow";
import { tabulatedEnergy } from "./neutrinoTable";

/**
 * a^4 (H/100 km/s/Mpc)^2 of a row at any scale factor, as Expansion.squaredTerm of expansion/expansion.ts but with neutrinos from the
 * table.
 *
 * @param a scale factor; @param logA ln a, which most callers know already.
 */
export function squaredTermAt(row: BatchRow, a: number, logA: number): number {
  let radiation = row.radiationDensity;
  for (let m = 0; m < row.massCount; m++) {
    radiation += row.speciesDensity * row.massShares[m] * tabulatedEnergy(row.logMassRatios[m] + logA);
  }
  const square = a * a;
  const darkEnergy =
    row.w0 === -1 && row.wa === 0 ? row.darkEnergyDensity : row.darkEnergyDensity * darkEnergyGrowth(a, row.w0, row.wa);
  const curvature = row.curvature * row.reducedHubble * row.reducedHubble;
  return radiation + a * (row.baryonDensity + row.coldMatterDensity + a * curvature) + square * square * darkEnergy;
}
