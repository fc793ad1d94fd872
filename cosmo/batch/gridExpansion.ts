import type { BatchRow } from "./batchRow";
import { addNeutrinoEnergy } from "./neutrinoTable";
import { gridBlocks, gridSize, gridStep, gridTemperatures, heliumBlock, mainFirst } from "./temperatureGrid";

/** One over the expansion rate on the grid, with what makes up the rate kept for as long as rows share it. */
export class GridExpansion {
  /** 100 km/s/Mpc over H at every point. */
  readonly inverseRate = new Float64Array(gridSize);
  /** Energy of the massive species over omega of a massless one, times a^4. */
  private readonly neutrinos = new Float64Array(gridSize);
  /** What {@link neutrinos} holds: T_cmb, then mass ratios and shares. */
  private readonly held = new Float64Array(7).fill(-1);

  /**
   * Fills {@link inverseRate} for a row.
   *
   * (H/100)^2 = omega_cb (1+z)^3 + omega_r (1+z)^4 + omega_nu(z) + omega_k (1+z)^2 + omega_DE f(z), as expansion/expansion.ts.
   */
  fill(row: BatchRow): void {
    this.fillNeutrinos(row);
    const { inverseRate, neutrinos } = this;
    const temperatures = gridTemperatures;
    const scale = 1 / row.photonTemperature;
    const species = row.speciesDensity;
    const radiation = row.radiationDensity;
    const matter = row.baryonDensity + row.coldMatterDensity;
    const curvature = row.curvature * row.reducedHubble * row.reducedHubble;
    const constant = row.w0 === -1 && row.wa === 0;
    const darkEnergy = row.darkEnergyDensity;
    if (constant) {
      for (let i = 0; i < gridSize; i++) {
        const x = temperatures[i] * scale;
        inverseRate[i] =
          1 / Math.sqrt(x * x * (x * (x * (radiation + species * neutrinos[i]) + matter) + curvature) + darkEnergy);
      }
      return;
    }
    // f = a^-p e^(-3 wa (1 - a)): the power by one factor a step, the exponential of the small 3 wa a by its series.
    const power = 3 * (1 + row.w0 + row.wa);
    const tilt = 3 * row.wa;
    const fineFactor = Math.exp(-power * gridStep);
    let factor = Math.exp(-power * gridStep * heliumBlock.stride);
    let grown = 0;
    for (let b = -1; b < gridBlocks.length; b++) {
      const { first, end } = b < 0 ? heliumBlock : gridBlocks[b];
      if (b === 0) factor = fineFactor;
      else if (b > 0) factor *= factor;
      for (let i = first; i < end; i++) {
        if (i === heliumBlock.first || i === mainFirst) {
          grown = darkEnergy * Math.exp(power * Math.log(gridTemperatures[i] * scale) - tilt);
        } else {
          grown *= factor;
        }
        const x = temperatures[i] * scale;
        const s = tilt / x;
        const total =
          x * x * (x * (x * (radiation + species * neutrinos[i]) + matter) + curvature) +
          grown * (1 + s * (1 + s * (1 / 2 + s * (1 / 6 + s * (1 / 24)))));
        inverseRate[i] = 1 / Math.sqrt(total);
      }
    }
  }

  private fillNeutrinos(row: BatchRow): void {
    const { held, neutrinos } = this;
    let same = held[0] === row.photonTemperature;
    for (let m = 0; m < 3; m++) {
      const share = m < row.massCount ? row.massShares[m] : 0;
      const ratio = m < row.massCount ? row.logMassRatios[m] : 0;
      same = same && held[1 + m] === ratio && held[4 + m] === share;
      held[1 + m] = ratio;
      held[4 + m] = share;
    }
    held[0] = row.photonTemperature;
    if (same) return;
    neutrinos.fill(0);
    for (let m = 0; m < row.massCount; m++) {
      addNeutrinoEnergy(row.logMassRatios[m], row.logPhotonTemperature, row.massShares[m], neutrinos);
    }
  }
}
