/**
 * One row of a batch while it is worked on: the numbers of a closed model, today, as plain mutable fields. One object serves all
 * rows, so nothing is allocated on the way. Every field starts as a fraction, not a whole number, so that the engine keeps it as
 * a double from the start.
 */
export class BatchRow {
  /** H0 in km/s/Mpc and h. */
  hubble = 0.5;
  reducedHubble = 0.5;
  baryonDensity = 0.5;
  coldMatterDensity = 0.5;
  neutrinoDensity = 0.5;
  matterDensity = 0.5;
  photonDensity = 0.5;
  radiationDensity = 0.5;
  darkEnergyDensity = 0.5;
  darkEnergyFraction = 0.5;
  /** Omega_k. */
  curvature = 0.5;
  w0 = 0.5;
  wa = 0.5;
  /** N_eff. */
  effectiveNumber = 0.5;
  /** Sum of the masses in eV. */
  massSum = 0.5;
  /** K. */
  photonTemperature = 0.5;
  logPhotonTemperature = 0.5;
  /** Y_p by mass. */
  helium = 0.5;
  /** omega of one massless species. */
  speciesDensity = 0.5;
  /** Different masses above zero: their number, ln of m c^2/(k T_nu) today and how many species share each. */
  massCount = 0;
  readonly logMassRatios: Float64Array = new Float64Array(3);
  readonly massShares: Float64Array = new Float64Array(3);
  /** n_H today, 1/m3, and f_He. */
  hydrogenDensity = 0.5;
  heliumRatio = 0.5;
  /** c sigma_T n_H over 100 km/s/Mpc, today. */
  scattering = 0.5;
  /** R (1+z) = 3 omega_b/(4 omega_gamma). */
  loading = 0.5;
}
