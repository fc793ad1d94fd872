import { expansionPart, type ModelEvaluation, type ModelPart, requireBigBang } from "../expansion";
import type { RecombinationTier } from "../model";
import { type StiffSolution, solveStiff } from "../numerics";
import { type Gas, gasPart } from "./gas";
import { calibratedRecombinationFactor, fittedCoefficients, lymanAlphaCorrection } from "./lymanAlphaCorrection";
import { sahaEquilibrium } from "./saha";
import { type AtomSettings, type HeliumTreatment, ThreeLevelAtom } from "./threeLevelAtom";

/** Recombination of one model, without reionization: the fractions at every redshift. */
export interface IonizationHistory {
  readonly tier: RecombinationTier;
  /** x_e at t = ln(1+z), any t. */
  readonly ionized: (t: number) => number;
  /** x_p. */
  readonly hydrogen: (t: number) => number;
  /** n(He+)/n(He) and n(He++)/n(He). */
  readonly helium: (t: number) => { once: number; twice: number };
  /** ln(T_m/T_r). */
  readonly logTemperatureRatio: (t: number) => number;
  /**
   * Points in t, ascending from 0, between which x_e is smooth: quadrature over the history runs from point to point. Above
   * the last point everything is in Saha equilibrium.
   */
  readonly mesh: Float64Array;
  /** Derivative evaluations spent. */
  readonly evaluations: number;
}

/** Radiation temperature at which the three-level atom takes over from Saha, K: z = 3500 at 2.7255 K for `calibrated`. */
const kineticStart = { peebles: 2800 * 2.7255, calibrated: 3500 * 2.7255 };

/** ln(y/(1-y)) below which helium's electrons no longer show: 1e-13 of an electron a hydrogen nucleus. */
const heliumGone = -28;

const tolerances = {
  full: { hydrogen: 1e-10, temperature: 1e-10, helium: 1e-9 },
  coarse: { hydrogen: 2e-9, temperature: 2e-9, helium: 2e-8 },
};

/** Settings of a tier of the three-level atom; other coefficients than the fitted ones serve the fit itself. */
export function atomSettings(
  tier: "peebles" | "calibrated",
  coefficients: readonly number[] = fittedCoefficients,
): AtomSettings {
  if (tier === "peebles") return { recombinationFactor: 1, escapeCorrection: () => 1 };
  return {
    recombinationFactor: calibratedRecombinationFactor,
    escapeCorrection: (onePlusRedshift) => lymanAlphaCorrection(onePlusRedshift, coefficients),
  };
}

/** The history of the model, in its tier. */
export const ionizationHistoryPart: ModelPart<IonizationHistory> = {
  name: "ionization history",
  compute: (evaluation) => {
    const tier = evaluation.model.recombination;
    requireBigBang(evaluation, "recombination");
    const gas = evaluation.once(gasPart);
    if (tier === "saha") return sahaHistory(gas);
    return kineticHistory(evaluation, tier, atomSettings(tier));
  },
};

/**
 * Equilibrium at every redshift: tier `saha`.
 */
export function sahaHistory(gas: Gas): IonizationHistory {
  const state = (t: number) => equilibriumAt(t, gas);
  const last = Math.log(kineticStart.calibrated / gas.temperature);
  const pieces = 400;
  return {
    tier: "saha",
    ionized: (t) => state(t).ionized,
    hydrogen: (t) => state(t).hydrogen,
    helium: (t) => {
      const { heliumOnce, heliumTwice } = state(t);
      return { once: heliumOnce, twice: heliumTwice };
    },
    logTemperatureRatio: () => 0,
    mesh: Float64Array.from({ length: pieces + 1 }, (_, i) => (last * i) / pieces),
    evaluations: 0,
  };
}

/** Saha equilibrium at the radiation's temperature at t = ln(1+z). */
export function equilibriumAt(t: number, gas: Gas) {
  const onePlusRedshift = Math.exp(t);
  return sahaEquilibrium(
    gas.temperature * onePlusRedshift,
    gas.hydrogenDensity * onePlusRedshift ** 3,
    gas.heliumRatio,
    gas.constants,
  );
}

/**
 * The three-level atom from Saha equilibrium down to today: tiers `peebles` and `calibrated`.
 *
 * Method: implicit Runge-Kutta collocation (Radau IIA, 5 stages) in ln(1+z); its collocation polynomial gives the fractions
 * between steps. Kinetic helium is dropped once it carries less than 1e-13 electrons a hydrogen nucleus.
 */
export function kineticHistory(
  evaluation: ModelEvaluation,
  tier: "peebles" | "calibrated",
  settings: AtomSettings,
): IonizationHistory {
  const gas = evaluation.once(gasPart);
  const expansion = evaluation.once(expansionPart);
  const tolerance = tolerances[evaluation.precision];
  const start = Math.log(kineticStart[tier] / gas.temperature);
  const equilibrium = equilibriumAt(start, gas);
  const kinetic = tier === "calibrated" && gas.heliumRatio > 0;
  const first: HeliumTreatment = gas.heliumRatio === 0 ? "gone" : kinetic ? "kinetic" : "saha";
  const atom = new ThreeLevelAtom(gas, expansion, settings, first);

  const initial = new Float64Array(atom.dimension);
  initial[0] = equilibrium.hydrogenLogit;
  initial[1] = quasiSteadyTemperature(start, initial, atom);
  if (kinetic) initial[2] = equilibrium.heliumLogit;
  const absolute = Float64Array.of(tolerance.hydrogen, tolerance.temperature, tolerance.helium).slice(
    0,
    atom.dimension,
  );
  const pieces: { atom: ThreeLevelAtom; solution: StiffSolution; end: number }[] = [];
  const upper = solveStiff(atom, {
    start,
    end: 0,
    initial,
    absolute,
    ...(kinetic ? { stopWhen: (_t: number, state: Float64Array) => state[2]! < heliumGone } : {}),
  });
  const reached = upper.mesh[upper.steps]!;
  pieces.push({ atom, solution: upper, end: reached });
  if (reached > 0) {
    const lowerAtom = new ThreeLevelAtom(gas, expansion, settings, "gone");
    const values = upper.values.slice(upper.steps * atom.dimension, upper.steps * atom.dimension + 2);
    const lower = solveStiff(lowerAtom, { start: reached, end: 0, initial: values, absolute: absolute.slice(0, 2) });
    pieces.push({ atom: lowerAtom, solution: lower, end: 0 });
  }

  const buffers = pieces.map((piece) => new Float64Array(piece.atom.dimension));
  const at = (t: number) => {
    const index = pieces.length > 1 && t < pieces[0]!.end ? 1 : 0;
    const { solution, atom: piece } = pieces[index]!;
    const state = buffers[index]!;
    // The future is not integrated: the solution is asked from today on.
    solution.evaluate(Math.max(t, 0), state);
    return { piece, state };
  };
  const mesh = pieces.flatMap((piece, index) => Array.from(piece.solution.mesh).slice(index === 0 ? 0 : 1)).reverse();
  return {
    tier,
    ionized: (t) => {
      if (t > start) return equilibriumAt(t, gas).ionized;
      const { piece, state } = at(t);
      return piece.ionized(t, state);
    },
    hydrogen: (t) => (t > start ? equilibriumAt(t, gas).hydrogen : 1 / (1 + Math.exp(-at(t).state[0]!))),
    helium: (t) => {
      if (t > start) {
        const { heliumOnce, heliumTwice } = equilibriumAt(t, gas);
        return { once: heliumOnce, twice: heliumTwice };
      }
      const { piece, state } = at(t);
      return { once: piece.heliumOnce(t, state), twice: 0 };
    },
    logTemperatureRatio: (t) => (t > start ? 0 : at(t).state[1]!),
    mesh: Float64Array.from(mesh),
    evaluations: pieces.reduce((sum, piece) => sum + piece.solution.evaluations, 0),
  };
}

/** ln(T_m/T_r) at which Compton heating balances the expansion: avoids a transient at the start. */
function quasiSteadyTemperature(t: number, state: Float64Array, atom: ThreeLevelAtom): number {
  const probe = Float64Array.from(state);
  const out = new Float64Array(atom.dimension);
  const offset = -1e-3;
  probe[1] = offset;
  atom.derivative(t, probe, out);
  // out[1] = 1 - r expm1(-q): r from the probe, then q with out[1] = 0.
  const heating = (1 - out[1]!) / Math.expm1(-offset);
  return -Math.log1p(1 / heating);
}
