import { atoms, type ConstantsSet } from "../constants";
import { electronStates, levelTemperature } from "./sahaFactors";

/** Coefficients (a, b, c, d) of the case-B fit; Pequignot, Petitjean & Boisson 1991, table 1 (memory). */
const caseB = { a: 4.309, b: -0.6166, c: 0.6703, d: 0.53 };

/**
 * Case-B recombination coefficient of hydrogen, m3/s.
 *
 * alpha = 1e-19 a t^b/(1 + c t^d), t = T/10^4 K.
 *
 * @param temperature matter temperature in K. Source: Pequignot, Petitjean & Boisson 1991 (memory); stated there for 40 K to 20,000 K.
 * @example caseBRecombination(1e4) // 2.58e-19
 */
export function caseBRecombination(temperature: number): number {
  const t = temperature / 1e4;
  return (1e-19 * caseB.a * t ** caseB.b) / (1 + caseB.c * t ** caseB.d);
}

/**
 * Photo-ionisation rate from n = 2 over the recombination coefficient, 1/m3, by detailed balance.
 *
 * beta/alpha = (2 pi m_e k T/h^2)^(3/2) e^(-h c (L_H - L_a)/kT). Source: Peebles 1968.
 */
export function excitedIonizationOverRecombination(temperature: number, constants: ConstantsSet): number {
  const gap = (atoms.hydrogenLimit - atoms.lymanAlpha) * levelTemperature(constants);
  return electronStates(temperature, constants) * Math.exp(-gap / temperature);
}

/**
 * The same from the ground state: (beta/alpha) e^(-h c L_a/kT), with the exponents joined so that nothing overflows.
 */
export function groundIonizationOverRecombination(temperature: number, constants: ConstantsSet): number {
  const gap = atoms.hydrogenLimit * levelTemperature(constants);
  return electronStates(temperature, constants) * Math.exp(-gap / temperature);
}

/** K H = 1/(8 pi L_a^3), m3: the volume that a Lyman-alpha photon's redshifting frees, times H. */
export const lymanAlphaVolume = 1 / (8 * Math.PI * atoms.lymanAlpha ** 3);

/**
 * Peebles' factor C: the share of excitations that end in the ground state.
 *
 * C = [1 + K Lambda n_1s]/[1 + K (Lambda + beta) n_1s]. Source: Peebles 1968, eq. 31.
 *
 * @param escapeVolume K in m3 s; @param ionization beta in 1/s; @param groundDensity n_1s in 1/m3.
 */
export function peeblesFactor(escapeVolume: number, ionization: number, groundDensity: number): number {
  const stuck = escapeVolume * groundDensity;
  return (1 + stuck * atoms.hydrogenTwoPhotonRate) / (1 + stuck * (atoms.hydrogenTwoPhotonRate + ionization));
}
