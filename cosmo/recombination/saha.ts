import type { ConstantsSet } from "../constants";
import { NotConvergedError } from "../errors";
import { sahaLogarithms } from "./sahaFactors";

/** Ionisation in Saha equilibrium. Fractions are of hydrogen nuclei (x) or helium nuclei (y). */
export interface SahaState {
  /** x_e = n_e/n_H. */
  readonly ionized: number;
  /** x_p = n_p/n_H. */
  readonly hydrogen: number;
  /** ln(x_p/(1 - x_p)): keeps its digits where x_p is close to 1. */
  readonly hydrogenLogit: number;
  /** y1 = n(He+)/n(He). */
  readonly heliumOnce: number;
  /** y2 = n(He++)/n(He). */
  readonly heliumTwice: number;
  /** ln(y1/(1 - y1 - y2)). */
  readonly heliumLogit: number;
}

/**
 * Hydrogen, He I and He II in Saha equilibrium with one electron density: tier `saha`.
 *
 * x_e = x_p + f_He (y1 + 2 y2), each fraction from n_e n_i/n_(i-1) (see sahaFactors.ts).
 *
 * @param temperature T in K, above 0; @param hydrogenDensity n_H in 1/m3, above 0; @param heliumRatio f_He, 0 or more.
 * Method: Newton's method in ln n_e on a monotone function, from the solution for pure hydrogen. Accuracy 1e-13.
 * Source: Peebles 1968. Pure hydrogen, h 0.7, T_cmb 2.725 K, Omega_b 0.046: x_e = 0.99 at z = 1586.7 (Callin 2006 has 1587.6 with 13.6057 eV).
 */
export function sahaEquilibrium(
  temperature: number,
  hydrogenDensity: number,
  heliumRatio: number,
  constants: ConstantsSet,
): SahaState {
  const saha = sahaLogarithms(temperature, constants);
  const logHydrogen = Math.log(hydrogenDensity);
  // Pure hydrogen: x^2/(1 - x) = e^d, in a form without overflow.
  const d = saha.hydrogen - logHydrogen;
  // With so few electrons x_e = e^(d/2) to the last digit, helium has none to add, and a search would run into underflow.
  if (d < -100) return stateAt(logHydrogen + d / 2, saha, heliumRatio);
  const start = d > 0 ? 2 / (1 + Math.sqrt(1 + 4 * Math.exp(-d))) : sahaLowIonization(d);
  let logElectrons = logHydrogen + Math.log(start);
  for (let iteration = 0; iteration < 200; iteration++) {
    const state = stateAt(logElectrons, saha, heliumRatio);
    const ratio = Math.exp(logElectrons - logHydrogen);
    const missing = ratio - state.ionized;
    const meanCharge = state.heliumOnce + 2 * state.heliumTwice;
    const heliumSpread = state.heliumOnce + 4 * state.heliumTwice - meanCharge * meanCharge;
    const slope = ratio + state.hydrogen * (1 - state.hydrogen) + heliumRatio * heliumSpread;
    if (slope === 0) return state;
    const change = missing / slope;
    logElectrons -= change;
    // The exponent d itself is known to a rounding error of its own size.
    if (Math.abs(change) < 1e-14 * Math.max(1, Math.abs(d))) return stateAt(logElectrons, saha, heliumRatio);
  }
  throw new NotConvergedError({ where: "saha", reason: `no electron density found at T = ${temperature} K` });
}

function sahaLowIonization(d: number): number {
  const s = Math.exp(d);
  return (2 * Math.sqrt(s)) / (Math.sqrt(s) + Math.sqrt(s + 4));
}

function stateAt(
  logElectrons: number,
  saha: { hydrogen: number; helium: number; heliumIon: number },
  heliumRatio: number,
): SahaState {
  const hydrogenLogit = saha.hydrogen - logElectrons;
  const heliumLogit = saha.helium - logElectrons;
  const heliumIonLogit = saha.heliumIon - logElectrons;
  const hydrogen = 1 / (1 + Math.exp(-hydrogenLogit));
  // Weights of He, He+, He++ relative to the largest, so that none overflows.
  const largest = Math.max(0, heliumLogit, heliumLogit + heliumIonLogit);
  const neutral = Math.exp(-largest);
  const once = Math.exp(heliumLogit - largest);
  const twice = Math.exp(heliumLogit + heliumIonLogit - largest);
  const sum = neutral + once + twice;
  return {
    ionized: hydrogen + (heliumRatio * (once + 2 * twice)) / sum,
    hydrogen,
    hydrogenLogit,
    heliumOnce: once / sum,
    heliumTwice: twice / sum,
    heliumLogit,
  };
}
