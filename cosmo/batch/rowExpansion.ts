import type { BatchRow } from "./batchRow";
import { addEnergy } from "./neutrinoTable";

/** ln of the share of matter below which dark energy is left out: 1e-10. */
const unseen = -23;

/**
 * a^4 (H/100 km/s/Mpc)^2 of a row at many scale factors, as Expansion.squaredTerm of expansion/expansion.ts (held to it by a test), but with
 * neutrinos from the table and f(a) from the logarithm that is known. All nodes in one call: no number goes to the heap between.
 *
 * @param a scale factors; @param logs their logarithms; @param from, @param to the range of nodes to fill, the last not included.
 */
export function fillSquaredTerms(
  row: BatchRow,
  a: Float64Array,
  logs: Float64Array,
  out: Float64Array,
  from: number,
  to: number,
): void {
  const radiation = row.radiationDensity;
  const matter = row.baryonDensity + row.coldMatterDensity;
  const curvature = row.curvature * row.reducedHubble * row.reducedHubble;
  const darkEnergy = row.darkEnergyDensity;
  if (row.w0 === -1 && row.wa === 0) {
    for (let i = from; i < to; i++) {
      const here = a[i];
      const square = here * here;
      out[i] = radiation + here * (matter + here * curvature) + square * square * darkEnergy;
    }
  } else {
    // a^4 f(a) = a e^growth.
    const power = -3 * (row.w0 + row.wa);
    const tilt = 3 * row.wa;
    for (let i = from; i < to; i++) {
      const here = a[i];
      const growth = power * logs[i] - tilt * (1 - here);
      const seen = growth < unseen ? 0 : darkEnergy * Math.exp(growth);
      out[i] = radiation + here * (matter + seen + here * curvature);
    }
  }
  for (let m = 0; m < row.massCount; m++) {
    addEnergy(row.logMassRatios[m], row.speciesDensity * row.massShares[m], logs, out, from, to);
  }
}
