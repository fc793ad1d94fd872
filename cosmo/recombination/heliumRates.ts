import { atoms, type ConstantsSet, lightSpeed } from "../constants";
import { electronStates, levelTemperature } from "./sahaFactors";

/** Coefficients of the recombination fits of He I (Wong, Moss & Scott 2008, 0711.1357; memory). */
const singlet = { q: 10 ** -16.744, p: 0.711 };
const triplet = { q: 10 ** -16.306, p: 0.761 };

const upperTemperature = 10 ** 5.114;
const lowerTemperature = 3;

function recombination(temperature: number, fit: { q: number; p: number }): number {
  const s1 = Math.sqrt(temperature / upperTemperature);
  const s2 = Math.sqrt(temperature / lowerTemperature);
  return fit.q / (s2 * (1 + s2) ** (1 - fit.p) * (1 + s1) ** (1 + fit.p));
}

/** Recombination coefficient to the singlets of He I, m3/s, at a temperature in K (Wong, Moss & Scott 2008; memory). */
export function heliumSingletRecombination(temperature: number): number {
  return recombination(temperature, singlet);
}

/** Recombination coefficient to the triplets of He I, m3/s, at a temperature in K (Wong, Moss & Scott 2008; memory). */
export function heliumTripletRecombination(temperature: number): number {
  return recombination(temperature, triplet);
}

/** A resonance line of He I whose photons hydrogen's continuum also absorbs. */
export interface HeliumLine {
  readonly rate: number;
  readonly level: number;
  readonly crossSection: number;
  /** a', b' of the continuum escape (Kholupenko et al. 2007; Wong, Moss & Scott 2008; memory). */
  readonly amplitude: number;
  readonly exponent: number;
}

/** 2 1P1-1 1S0. */
export const singletLine: HeliumLine = {
  rate: atoms.heliumSingletRate,
  level: atoms.heliumSinglet2p,
  crossSection: atoms.hydrogenCrossSectionAtSinglet,
  amplitude: 0.36,
  exponent: 0.86,
};

/** 2 3P1-1 1S0. */
export const tripletLine: HeliumLine = {
  rate: atoms.heliumTripletRate,
  level: atoms.heliumTriplet2p,
  crossSection: atoms.hydrogenCrossSectionAtTriplet,
  amplitude: 0.66,
  exponent: 0.9,
};

/** What the helium equation needs of the gas at one moment. */
export interface HeliumConditions {
  /** T_m, K. */
  readonly temperature: number;
  /** n_H, 1/m3. */
  readonly hydrogenDensity: number;
  /** f_He. */
  readonly heliumRatio: number;
  /** H, 1/s. */
  readonly rate: number;
  /** 1 - x_p. */
  readonly neutralHydrogen: number;
  /** 1 - y. */
  readonly neutralHelium: number;
}

// The escape terms divide by these shares; far before recombination they are rounding noise.
const leastNeutralHelium = 1e-15;
const leastNeutralHydrogen = 1e-12;

/**
 * Escape of line photons: P = (1 - e^-tau)/tau + 1/(1 + a' g^b').
 *
 * tau = 3 A f_He n_H (1 - y)/(8 pi H L^3); g = 3 A f_He (1 - y) c^2/[8 pi^1.5 sigma nu^2 D (1 - x_p)], nu = c L, D = nu sqrt(2 k T/(m_He c^2)).
 * Sources: Switzer & Hirata 2008; Kholupenko, Ivanchik & Varshalovich 2007; Wong, Moss & Scott 2008 (coefficients memory).
 */
function lineEscape(line: HeliumLine, gas: HeliumConditions, constants: ConstantsSet): number {
  const neutralHelium = Math.max(gas.neutralHelium, leastNeutralHelium);
  const neutralHydrogen = Math.max(gas.neutralHydrogen, leastNeutralHydrogen);
  const strength = 3 * line.rate * gas.heliumRatio * neutralHelium;
  const depth = (strength * gas.hydrogenDensity) / (8 * Math.PI * gas.rate * line.level ** 3);
  const frequency = lightSpeed * line.level;
  const mass = atoms.heliumMassInUnits * constants.atomicMassUnit;
  const doppler = (frequency * Math.sqrt((2 * constants.boltzmann * gas.temperature) / mass)) / lightSpeed;
  const continuum =
    (strength * lightSpeed * lightSpeed) /
    (8 * Math.PI ** 1.5 * line.crossSection * frequency * frequency * doppler * neutralHydrogen);
  return -Math.expm1(-depth) / depth + 1 / (1 + line.amplitude * continuum ** line.exponent);
}

/**
 * d ln[y/(1 - y)]/dt times H, 1/s, t = ln(1+z): helium I out of equilibrium through its singlets and triplets.
 *
 * dy/dz = (S + T)/[H (1+z)];
 * S = [x_e y n_H a_s - b_s (1-y) e^(-L_2s/kT)] (X + 51.3)/(X + 51.3 + b_s), X = 3 A_s P_s e^(-(L_2p - L_2s)/kT);
 * T = [x_e y n_H a_t - 3 b_t (1-y) e^(-L_3S/kT)]/[1 + b_t/(A_t P_t e^(-(L_3P - L_3S)/kT))].
 * Here divided by y (1 - y), exponents joined before they are taken.
 *
 * @param ionized x_e; @param heliumOdds y/(1 - y).
 * Sources: as {@link lineEscape}.
 */
export function heliumLogitRate(
  gas: HeliumConditions,
  ionized: number,
  heliumOdds: number,
  constants: ConstantsSet,
): number {
  const temperature = gas.temperature;
  const perLevel = levelTemperature(constants) / temperature;
  const states = electronStates(temperature, constants);
  const electrons = ionized * gas.hydrogenDensity;

  const toSinglet = heliumSingletRecombination(temperature);
  const toTriplet = heliumTripletRecombination(temperature);
  // Both levels are emptied to the same ground state: b e^(-L/kT) joins to 4 a G e^(-L_He/kT).
  const ionizations = 4 * states * Math.exp(-atoms.heliumLimit * perLevel);
  // [x_e y n_H a - b (1 - y) e^..]/(y (1 - y)) = a [n_e (1 + odds) - ionizations (1 + 1/odds)].
  const net = electrons * (1 + heliumOdds) - ionizations * (1 + 1 / heliumOdds);

  const singletIonization = 4 * toSinglet * states * Math.exp(-(atoms.heliumLimit - atoms.heliumSinglet2s) * perLevel);
  const singletDecay =
    3 *
      atoms.heliumSingletRate *
      lineEscape(singletLine, gas, constants) *
      Math.exp(-(atoms.heliumSinglet2p - atoms.heliumSinglet2s) * perLevel) +
    atoms.heliumTwoPhotonRate;
  const throughSinglets = (toSinglet * singletDecay) / (singletDecay + singletIonization);

  // b_t over A_t P_t e^(-(L_3P - L_3S)/kT), the exponents joined: late, each alone underflows to 0/0.
  const tripletBalance =
    ((4 / 3) * toTriplet * states * Math.exp(-(atoms.heliumLimit - atoms.heliumTriplet2p) * perLevel)) /
    (atoms.heliumTripletRate * lineEscape(tripletLine, gas, constants));
  const throughTriplets = toTriplet / (1 + tripletBalance);

  return net * (throughSinglets + throughTriplets);
}
