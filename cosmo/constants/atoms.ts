/**
 * Atomic masses, levels and rates that recombination needs. Levels are above the ground state in 1/m (the NIST Atomic
 * Spectra Database prints 1/cm); the energy of a level L is h c L.
 */

/** Neutral hydrogen atom, u (AME2020, memory). */
export const hydrogenMassInUnits = 1.0078250319;

/** Neutral helium-4 atom, u (AME2020, memory). */
export const heliumMassInUnits = 4.002603254;

/** m_He/m_H of the neutral atoms, unrounded. */
export const heliumToHydrogenMass = heliumMassInUnits / hydrogenMassInUnits;

const perCentimeter = 100;

/** H I ionisation limit L_H (NIST ASD). */
export const hydrogenLimit = 109678.77174307 * perCentimeter;

/** H I n = 2 and Lyman alpha: statistical mean of 2p J = 1/2 (82258.9191133) and J = 3/2 (82259.2850014) (NIST ASD). */
export const lymanAlpha = 82259.16304 * perCentimeter;

/** He I ionisation limit L_He (NIST ASD). */
export const heliumLimit = 198310.66637 * perCentimeter;

/** He I 2 1S0 (NIST ASD). */
export const heliumSinglet2s = 166277.44 * perCentimeter;

/** He I 2 1P1 (NIST ASD, memory). */
export const heliumSinglet2p = 171134.897 * perCentimeter;

/** He I 2 3S1 (NIST ASD). */
export const heliumTriplet2s = 159855.974 * perCentimeter;

/** He I 2 3P1 (NIST ASD, memory). */
export const heliumTriplet2p = 169086.843 * perCentimeter;

/** He II ionisation limit (NIST ASD). */
export const heliumIonLimit = 438908.8789 * perCentimeter;

/** H I 2s-1s two-photon rate, 1/s (Goldman 1989, memory). */
export const hydrogenTwoPhotonRate = 8.22458;

/** He I 2 1S0-1 1S0 two-photon rate, 1/s (Drake, Victor & Dalgarno 1969, memory). */
export const heliumTwoPhotonRate = 51.3;

/** He I 2 1P1-1 1S0 rate A_s, 1/s (memory). */
export const heliumSingletRate = 1.798287e9;

/** He I 2 3P1-1 1S0 intercombination rate A_t, 1/s (memory). */
export const heliumTripletRate = 177.58;

/** Hydrogen 1s photo-ionisation cross section at the He I 2 1P1-1 1S0 line, m2 (Stobbe 1930; see the test that recomputes it). */
export const hydrogenCrossSectionAtSinglet = 1.8742e-22;

/** Hydrogen 1s photo-ionisation cross section at the He I 2 3P1-1 1S0 line, m2. */
export const hydrogenCrossSectionAtTriplet = 1.9381e-22;
