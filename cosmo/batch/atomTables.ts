import { atoms, type ConstantsSet } from "../constants";
import { atomSettings } from "../recombination";
import { heliumSingletRecombination, heliumTripletRecombination } from "../recombination/heliumRates";
import {
  caseBRecombination,
  excitedIonizationOverRecombination,
  groundIonizationOverRecombination,
} from "../recombination/hydrogenRates";
import { electronStates, levelTemperature, sahaLogarithms } from "../recombination/sahaFactors";
import { gridSize, gridTemperatures, heliumEnd } from "./temperatureGrid";

/** Numbers a point in {@link AtomTables.hydrogen}: alpha T_r^3, beta, beta e^(-L_a/kT), each with two Taylor coefficients in d; T_r^3. */
export const hydrogenColumns = 10;

/** Numbers a point in {@link AtomTables.helium}; see {@link heliumRow}. */
export const heliumColumns = 11;

/** Every rate of the three-level atom that depends on T_r alone, tabulated from the functions of the single model. */
export interface AtomTables {
  readonly tier: "peebles" | "calibrated";
  /** Whether helium is out of equilibrium. */
  readonly kineticHelium: boolean;
  /** Hydrogen's rates at T_m = T_r with Taylor coefficients in d = 1 - T_m/T_r. */
  readonly hydrogen: Float64Array;
  /** Helium's rates, down to {@link heliumEnd}. */
  readonly helium: Float64Array;
  /** F alpha, m3/s, at equal steps in sqrt(T_m/K), {@link coldPointsPerRoot} a unit: for gas far colder than the radiation. */
  readonly coldRecombination: Float64Array;
  /** n_e n_p/n_1s of Saha equilibrium, 1/m3, at every point where helium counts. */
  readonly hydrogenSaha: Float64Array;
}

/** Points a unit of sqrt(T_m/K): linear interpolation errs by 1e-6 at 100 K. */
export const coldPointsPerRoot = 50;

/** As far as 3600 K; the gas parts from the radiation below 2000 K. */
const coldPoints = 60 * coldPointsPerRoot;

/** Step of the differences that give the Taylor coefficients: their error is below 1e-8 for the steepest exponential. */
const difference = 2e-4;

/** Writes f(T) and the first two Taylor coefficients of f[T (1 - d)]/f(T) in d. */
function writeSeries(out: Float64Array, at: number, f: (temperature: number) => number, temperature: number): void {
  const middle = f(temperature);
  out[at] = middle;
  if (middle === 0) return;
  const near = f(temperature * (1 - difference)) / middle;
  const far = f(temperature * (1 - 2 * difference)) / middle;
  const nearAbove = f(temperature * (1 + difference)) / middle;
  const farAbove = f(temperature * (1 + 2 * difference)) / middle;
  out[at + 1] = (8 * (near - nearAbove) - (far - farAbove)) / (12 * difference);
  out[at + 2] = (16 * (near + nearAbove) - (far + farAbove) - 30) / (24 * difference * difference);
}

/**
 * Helium's coefficients at one temperature: a_s, a_t, 4 G e^(-L_He/kT) with its first Taylor coefficient in d, then what the escape
 * needs: 3 A_s e^(-(L_2p - L_2s)/kT), b_s, A_t e^(-(L_3P - L_3S)/kT), b_t, the depth of either line over f_He n_H (1 - y)/H and
 * g of the singlet line over f_He (1 - y)/(1 - x_p).
 */
function heliumRow(out: Float64Array, at: number, temperature: number, constants: ConstantsSet): void {
  const perLevel = levelTemperature(constants) / temperature;
  const states = electronStates(temperature, constants);
  const toSinglet = heliumSingletRecombination(temperature);
  const toTriplet = heliumTripletRecombination(temperature);
  const ground = (t: number) => Math.exp(sahaLogarithms(t, constants).helium);
  out[at] = toSinglet;
  out[at + 1] = toTriplet;
  out[at + 2] = ground(temperature);
  out[at + 3] =
    (ground(temperature * (1 - difference)) / out[at + 2] - ground(temperature * (1 + difference)) / out[at + 2]) /
    (2 * difference);
  const singletGap = atoms.heliumSinglet2p - atoms.heliumSinglet2s;
  const tripletGap = atoms.heliumTriplet2p - atoms.heliumTriplet2s;
  out[at + 4] = 3 * atoms.heliumSingletRate * Math.exp(-singletGap * perLevel);
  out[at + 5] = 4 * toSinglet * states * Math.exp(-(atoms.heliumLimit - atoms.heliumSinglet2s) * perLevel);
  out[at + 6] = atoms.heliumTripletRate * Math.exp(-tripletGap * perLevel);
  out[at + 7] = (4 / 3) * toTriplet * states * Math.exp(-(atoms.heliumLimit - atoms.heliumTriplet2s) * perLevel);
  const speed = Math.sqrt(
    (2 * constants.boltzmann * temperature) / (atoms.heliumMassInUnits * constants.atomicMassUnit),
  );
  const depth = (rate: number, level: number) => (3 * rate) / (8 * Math.PI * level ** 3);
  out[at + 8] = depth(atoms.heliumSingletRate, atoms.heliumSinglet2p);
  out[at + 9] = depth(atoms.heliumTripletRate, atoms.heliumTriplet2p);
  out[at + 10] =
    (3 * atoms.heliumSingletRate) /
    (8 * Math.PI ** 1.5 * atoms.hydrogenCrossSectionAtSinglet * atoms.heliumSinglet2p ** 3 * speed);
}

const known = new Map<string, AtomTables>();

/** The tables of a tier under a set of constants, built at the first call. */
export function atomTables(tier: "peebles" | "calibrated", constants: ConstantsSet): AtomTables {
  const key = `${tier} ${constants.name}`;
  const found = known.get(key);
  if (found !== undefined) return found;
  const factor = atomSettings(tier).recombinationFactor;
  const hydrogen = new Float64Array(gridSize * hydrogenColumns);
  const helium = new Float64Array(heliumEnd * heliumColumns);
  const hydrogenSaha = new Float64Array(heliumEnd);
  const alpha = (temperature: number) => factor * caseBRecombination(temperature);
  const beta = (temperature: number) => alpha(temperature) * excitedIonizationOverRecombination(temperature, constants);
  const ground = (temperature: number) =>
    alpha(temperature) * groundIonizationOverRecombination(temperature, constants);
  for (let i = 0; i < gridSize; i++) {
    const temperature = gridTemperatures[i];
    writeSeries(hydrogen, i * hydrogenColumns, alpha, temperature);
    hydrogen[i * hydrogenColumns] *= temperature ** 3;
    hydrogen[i * hydrogenColumns + 9] = temperature ** 3;
    writeSeries(hydrogen, i * hydrogenColumns + 3, beta, temperature);
    writeSeries(hydrogen, i * hydrogenColumns + 6, ground, temperature);
    if (i < heliumEnd) {
      heliumRow(helium, i * heliumColumns, temperature, constants);
      hydrogenSaha[i] = Math.exp(sahaLogarithms(temperature, constants).hydrogen);
    }
  }
  // Below 0.25 K, which no gas of the validated range comes to, the table stays level.
  const coldRecombination = Float64Array.from({ length: coldPoints + 1 }, (_, i) =>
    alpha(Math.max(i / coldPointsPerRoot, 0.5) ** 2),
  );
  const built: AtomTables = {
    tier,
    kineticHelium: tier === "calibrated",
    hydrogen,
    helium,
    coldRecombination,
    hydrogenSaha,
  };
  known.set(key, built);
  return built;
}
