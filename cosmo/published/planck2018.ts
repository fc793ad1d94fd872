/** A printed number: its digits, and its 68% errors where the table gives them. */
export interface PrintedNumber {
  /** As printed, trailing zeros kept: the last digit's place is the rounding. */
  readonly digits: string;
  /** Upper 68% error, in the value's unit. */
  readonly upper?: number;
  /** Lower 68% error, not signed. */
  readonly lower?: number;
}

/** One column of a printed table: numbers by the vocabulary's names. */
export interface PrintedColumn {
  readonly name: string;
  readonly numbers: Readonly<Record<string, PrintedNumber>>;
}

/**
 * Planck 2018 VI (A&A 641, A6, arXiv:1807.06209), table 2: means and 68% errors of the base model, as printed. Units are the
 * vocabulary's (km/s/Mpc, Gyr, Mpc, 1/Mpc; angles in 0.01 rad).
 *
 * Its conventions: three neutrino species, one of 0.06 eV; N_eff 3.046; T_cmb 2.7255 K; helium from nucleosynthesis; z_eq from
 * baryons and cold matter; reionization width 0.5. Means of a posterior are not one parameter point.
 */
export const planck2018Table2: readonly PrintedColumn[] = [
  {
    name: "TT+lowE",
    numbers: {
      baryonDensity: { digits: "0.02212", upper: 0.00022, lower: 0.00022 },
      coldMatterDensity: { digits: "0.1206", upper: 0.0021, lower: 0.0021 },
      reionizationDepth: { digits: "0.0522", upper: 0.008, lower: 0.008 },
      hubble: { digits: "66.88", upper: 0.92, lower: 0.92 },
      darkEnergyFraction: { digits: "0.679", upper: 0.013, lower: 0.013 },
      matterFraction: { digits: "0.321", upper: 0.013, lower: 0.013 },
      matterDensity: { digits: "0.1434", upper: 0.002, lower: 0.002 },
      matterFractionTimesCubedHubble: { digits: "0.09589", upper: 0.00046, lower: 0.00046 },
      reionizationRedshift: { digits: "7.50", upper: 0.82, lower: 0.82 },
      age: { digits: "13.830", upper: 0.037, lower: 0.037 },
      lastScatteringRedshift: { digits: "1090.30", upper: 0.41, lower: 0.41 },
      lastScatteringSoundHorizon: { digits: "144.46", upper: 0.48, lower: 0.48 },
      acousticAngle: { digits: "1.04097", upper: 0.00046, lower: 0.00046 },
      dragRedshift: { digits: "1059.39", upper: 0.46, lower: 0.46 },
      dragSoundHorizon: { digits: "147.21", upper: 0.48, lower: 0.48 },
      dampingWavenumber: { digits: "0.14054", upper: 0.00052, lower: 0.00052 },
      equalityRedshift: { digits: "3411", upper: 48, lower: 48 },
      equalityWavenumber: { digits: "0.01041", upper: 0.00014, lower: 0.00014 },
      equalitySoundAngle: { digits: "0.4483", upper: 0.0046, lower: 0.0046 },
    },
  },
  {
    name: "TE+lowE",
    numbers: {
      baryonDensity: { digits: "0.02249", upper: 0.00025, lower: 0.00025 },
      coldMatterDensity: { digits: "0.1177", upper: 0.002, lower: 0.002 },
      reionizationDepth: { digits: "0.0496", upper: 0.0085, lower: 0.0085 },
      hubble: { digits: "68.44", upper: 0.91, lower: 0.91 },
      darkEnergyFraction: { digits: "0.699", upper: 0.012, lower: 0.012 },
      matterFraction: { digits: "0.301", upper: 0.012, lower: 0.012 },
      matterDensity: { digits: "0.1408", upper: 0.0019, lower: 0.0019 },
      matterFractionTimesCubedHubble: { digits: "0.09635", upper: 0.00051, lower: 0.00051 },
      reionizationRedshift: { digits: "7.11", upper: 0.91, lower: 0.75 },
      age: { digits: "13.761", upper: 0.038, lower: 0.038 },
      lastScatteringRedshift: { digits: "1089.57", upper: 0.42, lower: 0.42 },
      lastScatteringSoundHorizon: { digits: "144.95", upper: 0.48, lower: 0.48 },
      acousticAngle: { digits: "1.04156", upper: 0.00049, lower: 0.00049 },
      dragRedshift: { digits: "1060.03", upper: 0.54, lower: 0.54 },
      dragSoundHorizon: { digits: "147.59", upper: 0.49, lower: 0.49 },
      dampingWavenumber: { digits: "0.14043", upper: 0.00057, lower: 0.00057 },
      equalityRedshift: { digits: "3349", upper: 46, lower: 46 },
      equalityWavenumber: { digits: "0.01022", upper: 0.00014, lower: 0.00014 },
      equalitySoundAngle: { digits: "0.4547", upper: 0.0045, lower: 0.0045 },
    },
  },
  {
    name: "EE+lowE",
    numbers: {
      baryonDensity: { digits: "0.0240", upper: 0.0012, lower: 0.0012 },
      coldMatterDensity: { digits: "0.1158", upper: 0.0046, lower: 0.0046 },
      reionizationDepth: { digits: "0.0527", upper: 0.009, lower: 0.009 },
      hubble: { digits: "69.9", upper: 2.7, lower: 2.7 },
      darkEnergyFraction: { digits: "0.711", upper: 0.033, lower: 0.026 },
      matterFraction: { digits: "0.289", upper: 0.026, lower: 0.033 },
      matterDensity: { digits: "0.1404", upper: 0.0034, lower: 0.0039 },
      matterFractionTimesCubedHubble: { digits: "0.0981", upper: 0.0016, lower: 0.0018 },
      reionizationRedshift: { digits: "7.10", upper: 0.87, lower: 0.73 },
      age: { digits: "13.64", upper: 0.16, lower: 0.14 },
      lastScatteringRedshift: { digits: "1087.8", upper: 1.6, lower: 1.7 },
      lastScatteringSoundHorizon: { digits: "144.29", upper: 0.64, lower: 0.64 },
      acousticAngle: { digits: "1.04001", upper: 0.00086, lower: 0.00086 },
      dragRedshift: { digits: "1063.2", upper: 2.4, lower: 2.4 },
      dragSoundHorizon: { digits: "146.46", upper: 0.7, lower: 0.7 },
      dampingWavenumber: { digits: "0.1426", upper: 0.0012, lower: 0.0012 },
      equalityRedshift: { digits: "3340", upper: 81, lower: 92 },
      equalityWavenumber: { digits: "0.01019", upper: 0.00025, lower: 0.00028 },
      equalitySoundAngle: { digits: "0.4562", upper: 0.0092, lower: 0.0092 },
    },
  },
  {
    name: "TT,TE,EE+lowE",
    numbers: {
      baryonDensity: { digits: "0.02236", upper: 0.00015, lower: 0.00015 },
      coldMatterDensity: { digits: "0.1202", upper: 0.0014, lower: 0.0014 },
      reionizationDepth: { digits: "0.0544", upper: 0.007, lower: 0.0081 },
      hubble: { digits: "67.27", upper: 0.6, lower: 0.6 },
      darkEnergyFraction: { digits: "0.6834", upper: 0.0084, lower: 0.0084 },
      matterFraction: { digits: "0.3166", upper: 0.0084, lower: 0.0084 },
      matterDensity: { digits: "0.1432", upper: 0.0013, lower: 0.0013 },
      matterFractionTimesCubedHubble: { digits: "0.09633", upper: 0.00029, lower: 0.00029 },
      reionizationRedshift: { digits: "7.68", upper: 0.79, lower: 0.79 },
      age: { digits: "13.800", upper: 0.024, lower: 0.024 },
      lastScatteringRedshift: { digits: "1089.95", upper: 0.27, lower: 0.27 },
      lastScatteringSoundHorizon: { digits: "144.39", upper: 0.3, lower: 0.3 },
      acousticAngle: { digits: "1.04109", upper: 0.0003, lower: 0.0003 },
      dragRedshift: { digits: "1059.93", upper: 0.3, lower: 0.3 },
      dragSoundHorizon: { digits: "147.05", upper: 0.3, lower: 0.3 },
      dampingWavenumber: { digits: "0.14090", upper: 0.00032, lower: 0.00032 },
      equalityRedshift: { digits: "3407", upper: 31, lower: 31 },
      equalityWavenumber: { digits: "0.010398", upper: 0.000094, lower: 0.000094 },
      equalitySoundAngle: { digits: "0.4490", upper: 0.003, lower: 0.003 },
    },
  },
  {
    name: "TT,TE,EE+lowE+lensing",
    numbers: {
      baryonDensity: { digits: "0.02237", upper: 0.00015, lower: 0.00015 },
      coldMatterDensity: { digits: "0.1200", upper: 0.0012, lower: 0.0012 },
      reionizationDepth: { digits: "0.0544", upper: 0.0073, lower: 0.0073 },
      hubble: { digits: "67.36", upper: 0.54, lower: 0.54 },
      darkEnergyFraction: { digits: "0.6847", upper: 0.0073, lower: 0.0073 },
      matterFraction: { digits: "0.3153", upper: 0.0073, lower: 0.0073 },
      matterDensity: { digits: "0.1430", upper: 0.0011, lower: 0.0011 },
      matterFractionTimesCubedHubble: { digits: "0.09633", upper: 0.0003, lower: 0.0003 },
      reionizationRedshift: { digits: "7.67", upper: 0.73, lower: 0.73 },
      age: { digits: "13.797", upper: 0.023, lower: 0.023 },
      lastScatteringRedshift: { digits: "1089.92", upper: 0.25, lower: 0.25 },
      lastScatteringSoundHorizon: { digits: "144.43", upper: 0.26, lower: 0.26 },
      acousticAngle: { digits: "1.04110", upper: 0.00031, lower: 0.00031 },
      dragRedshift: { digits: "1059.94", upper: 0.3, lower: 0.3 },
      dragSoundHorizon: { digits: "147.09", upper: 0.26, lower: 0.26 },
      dampingWavenumber: { digits: "0.14087", upper: 0.0003, lower: 0.0003 },
      equalityRedshift: { digits: "3402", upper: 26, lower: 26 },
      equalityWavenumber: { digits: "0.010384", upper: 0.000081, lower: 0.000081 },
      equalitySoundAngle: { digits: "0.4494", upper: 0.0026, lower: 0.0026 },
    },
  },
  {
    name: "TT,TE,EE+lowE+lensing+BAO",
    numbers: {
      baryonDensity: { digits: "0.02242", upper: 0.00014, lower: 0.00014 },
      coldMatterDensity: { digits: "0.11933", upper: 0.00091, lower: 0.00091 },
      reionizationDepth: { digits: "0.0561", upper: 0.0071, lower: 0.0071 },
      hubble: { digits: "67.66", upper: 0.42, lower: 0.42 },
      darkEnergyFraction: { digits: "0.6889", upper: 0.0056, lower: 0.0056 },
      matterFraction: { digits: "0.3111", upper: 0.0056, lower: 0.0056 },
      matterDensity: { digits: "0.14240", upper: 0.00087, lower: 0.00087 },
      matterFractionTimesCubedHubble: { digits: "0.09635", upper: 0.0003, lower: 0.0003 },
      reionizationRedshift: { digits: "7.82", upper: 0.71, lower: 0.71 },
      age: { digits: "13.787", upper: 0.02, lower: 0.02 },
      lastScatteringRedshift: { digits: "1089.80", upper: 0.21, lower: 0.21 },
      lastScatteringSoundHorizon: { digits: "144.57", upper: 0.22, lower: 0.22 },
      acousticAngle: { digits: "1.04119", upper: 0.00029, lower: 0.00029 },
      dragRedshift: { digits: "1060.01", upper: 0.29, lower: 0.29 },
      dragSoundHorizon: { digits: "147.21", upper: 0.23, lower: 0.23 },
      dampingWavenumber: { digits: "0.14078", upper: 0.00028, lower: 0.00028 },
      equalityRedshift: { digits: "3387", upper: 21, lower: 21 },
      equalityWavenumber: { digits: "0.010339", upper: 0.000063, lower: 0.000063 },
      equalitySoundAngle: { digits: "0.4509", upper: 0.002, lower: 0.002 },
    },
  },
];

/** Planck 2018 VI, table 1, best-fit column: one parameter point. */
export const planck2018BestFit: PrintedColumn = {
  name: "best fit",
  numbers: {
    baryonDensity: { digits: "0.022383" },
    coldMatterDensity: { digits: "0.12011" },
    reionizationDepth: { digits: "0.0543" },
    matterDensity: { digits: "0.14314" },
    hubble: { digits: "67.32" },
    matterFraction: { digits: "0.3158" },
    age: { digits: "13.7971" },
    reionizationRedshift: { digits: "7.68" },
    acousticAngle: { digits: "1.041085" },
    dragSoundHorizon: { digits: "147.049" },
  },
};

/** The column that the calibrated tier was fitted to; it is no test of the tier. */
export const calibrationColumn = "TT,TE,EE+lowE+lensing";
