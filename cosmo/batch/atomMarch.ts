import { hundredKmPerSecondPerMpc } from "../model";
import { atomSettings } from "../recombination";
import { lymanAlphaVolume } from "../recombination/hydrogenRates";
import type { AtomTables } from "./atomTables";
import type { BatchRow } from "./batchRow";
import { heliumInEquilibrium, marchHelium } from "./marchHelium";
import { marchHydrogen } from "./marchHydrogen";
import { marchWithHelium, startHydrogen } from "./marchWithHelium";
import { gridBlocks, gridSize, gridTemperatures, heliumBlock } from "./temperatureGrid";

/** The state of the three-level atom at every point of the grid, and what the march needs of the row and the tier. */
export interface MarchState {
  readonly tables: AtomTables;
  /** 1 - x_p, 1 - T_m/T_r, x_e, and 1 - y where helium is followed. */
  readonly neutral: Float64Array;
  readonly cooling: Float64Array;
  readonly ionized: Float64Array;
  readonly neutralHelium: Float64Array;
  /** Where on the coarse block the opacity by hydrogen stands in its table; see heliumEscape.ts. */
  readonly continuumPlaces: Float64Array;
  /** T_r^3/(8 pi L_a^3) times the tier's correction, over 100 km/s/Mpc. */
  readonly escapes: Float64Array;
  /** 8 sigma_T a T_r^4/(3 m_e c) over 100 km/s/Mpc. */
  readonly compton: Float64Array;
  /** One; more only in the test that compares the converged step with the single model's equations. */
  readonly newtonSteps: number;
}

/**
 * The three-level atom down the grid by backward differentiation: a six-point prediction and one Newton step with the analytic
 * slope an equation. Helium first, on its coarse block, hydrogen being in Saha equilibrium there; then hydrogen.
 *
 * The equations are those of recombination/threeLevelAtom.ts in other variables: 1 - x_p, 1 - y and d = 1 - T_m/T_r, which keep their
 * digits at the stiff end; late, x_p is 2e-4 and 1 - (1 - x_p) still has twelve. Hydrogen's is multiplied through by Peebles'
 * denominator, the temperature's is linear in d. Both marches start from points in Saha equilibrium, so that the stiff beginning asks
 * for no switch. A test holds converged steps against the single model's derivative.
 */
export class AtomMarch implements MarchState {
  readonly neutral = new Float64Array(gridSize);
  readonly cooling = new Float64Array(gridSize);
  readonly ionized = new Float64Array(gridSize);
  readonly neutralHelium = new Float64Array(gridSize);
  readonly continuumPlaces = new Float64Array(heliumBlock.end);
  readonly escapes = new Float64Array(gridSize);
  readonly compton: Float64Array;
  private escapeTemperature = -1;

  /** @param comptonPerFourthPower Compton rate over T_r^4, 1/s/K^4. */
  constructor(
    readonly tables: AtomTables,
    comptonPerFourthPower: number,
    readonly newtonSteps = 1,
  ) {
    this.compton = gridTemperatures.map((t) => (comptonPerFourthPower / hundredKmPerSecondPerMpc) * t ** 4);
  }

  /** @param inverseRate 100 km/s/Mpc over H on the grid. */
  run(row: BatchRow, inverseRate: Float64Array): void {
    if (this.escapeTemperature !== row.photonTemperature) this.fillEscapes(row.photonTemperature);
    if (this.tables.kineticHelium && row.heliumRatio > 0) marchHelium(this, row, inverseRate);
    else heliumInEquilibrium(this, row);
    startHydrogen(this, row, inverseRate);
    marchWithHelium(this, row, inverseRate);
    for (let b = 0; b < gridBlocks.length; b++) marchHydrogen(this, b, row, inverseRate);
  }

  private fillEscapes(temperature: number): void {
    const correction = atomSettings(this.tables.tier).escapeCorrection;
    for (let i = 0; i < gridSize; i++) {
      const t = gridTemperatures[i];
      this.escapes[i] = (t ** 3 * lymanAlphaVolume * correction(t / temperature)) / hundredKmPerSecondPerMpc;
    }
    this.escapeTemperature = temperature;
  }
}
