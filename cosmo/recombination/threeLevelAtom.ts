import type { Expansion } from "../expansion";
import { hundredKmPerSecondPerMpc } from "../model";
import type { Gas } from "./gas";
import { heliumLogitRate } from "./heliumRates";
import {
  caseBRecombination,
  excitedIonizationOverRecombination,
  groundIonizationOverRecombination,
  lymanAlphaVolume,
  peeblesFactor,
} from "./hydrogenRates";
import { sahaLogarithms } from "./sahaFactors";

/** How helium is followed. */
export type HeliumTreatment = "saha" | "kinetic" | "gone";

/** The choices that tell one tier of the three-level atom from another. */
export interface AtomSettings {
  /** F, factor on the case-B coefficient. */
  readonly recombinationFactor: number;
  /** Factor on K at 1 + z. */
  readonly escapeCorrection: (onePlusRedshift: number) => number;
}

/**
 * y = n(He+)/n(He) in Saha equilibrium with the electrons of hydrogen and its own: f y^2 + (x_p + s) y - s = 0,
 * s = 4 G e^(-L_He/kT)/n_H. He++ is gone wherever this is used.
 */
export function heliumWithHydrogen(hydrogen: number, temperature: number, hydrogenDensity: number, gas: Gas): number {
  const s = Math.exp(sahaLogarithms(temperature, gas.constants).helium) / hydrogenDensity;
  const b = hydrogen + s;
  return s === 0 ? 0 : (2 * s) / (b + Math.sqrt(b * b + 4 * gas.heliumRatio * s));
}

/**
 * The three-level atom as a system of differential equations in t = ln(1+z).
 *
 * State: w = ln[x_p/(1 - x_p)], q = ln(T_m/T_r), and with kinetic helium v = ln[y/(1 - y)]. In these variables fractions cannot
 * leave (0, 1) (the equation in x_p has a root above 1 that attracts a stepper), both small ends keep their digits, and the
 * equilibrium that the early solution hugs is nearly a straight line.
 *
 * dx_p/dz = [x_e x_p n_H alpha - beta (1 - x_p) e^(-h c L_a/kT_m)] C/[H (1+z)];
 * dT_m/dz = [8 sigma_T a T_r^4/(3 H (1+z) m_e c)] x_e/(1 + f_He + x_e) (T_m - T_r) + 2 T_m/(1+z).
 * T_m in every rate, T_r only in Compton heating. Sources: Peebles 1968; Zeldovich, Kurt & Sunyaev 1968.
 */
export class ThreeLevelAtom {
  readonly dimension: number;

  constructor(
    private readonly gas: Gas,
    private readonly expansion: Expansion,
    private readonly settings: AtomSettings,
    private readonly helium: HeliumTreatment,
  ) {
    this.dimension = helium === "kinetic" ? 3 : 2;
  }

  /** x_e of a state at t. */
  ionized(t: number, state: Float64Array): number {
    const hydrogen = 1 / (1 + Math.exp(-state[0]!));
    return hydrogen + this.gas.heliumRatio * this.heliumOnce(t, state, hydrogen);
  }

  /** y = n(He+)/n(He) of a state at t. */
  heliumOnce(t: number, state: Float64Array, hydrogen = 1 / (1 + Math.exp(-state[0]!))): number {
    if (this.helium === "gone") return 0;
    if (this.helium === "kinetic") return 1 / (1 + Math.exp(-state[2]!));
    const onePlusRedshift = Math.exp(t);
    // At T_r, so that the history joins the Saha equilibrium above its start without a step.
    const temperature = this.gas.temperature * onePlusRedshift;
    return heliumWithHydrogen(hydrogen, temperature, this.gas.hydrogenDensity * onePlusRedshift ** 3, this.gas);
  }

  /** d(state)/dt into `out`. Called some thousand times a history: no allocation but the helium conditions. */
  derivative(t: number, state: Float64Array, out: Float64Array): void {
    const { gas } = this;
    const onePlusRedshift = Math.exp(t);
    const rate = hundredKmPerSecondPerMpc * this.expansion.rate(1 / onePlusRedshift);
    const hydrogenDensity = gas.hydrogenDensity * onePlusRedshift ** 3;
    const hydrogenOdds = Math.exp(state[0]!);
    const hydrogen = hydrogenOdds / (1 + hydrogenOdds);
    const neutral = 1 / (1 + hydrogenOdds);
    const temperature = gas.temperature * onePlusRedshift * Math.exp(state[1]!);
    const once = this.heliumOnce(t, state, hydrogen);
    const ionized = hydrogen + gas.heliumRatio * once;

    const alpha = this.settings.recombinationFactor * caseBRecombination(temperature);
    const beta = alpha * excitedIonizationOverRecombination(temperature, gas.constants);
    const escapeVolume = (lymanAlphaVolume / rate) * this.settings.escapeCorrection(onePlusRedshift);
    const share = peeblesFactor(escapeVolume, beta, hydrogenDensity * neutral);
    const fromGround = groundIonizationOverRecombination(temperature, gas.constants);
    // dx_p/dt divided by x_p (1 - x_p).
    out[0] =
      (share * alpha * (ionized * hydrogenDensity * (1 + hydrogenOdds) - fromGround * (1 + 1 / hydrogenOdds))) / rate;

    const compton = (gas.comptonRate * onePlusRedshift ** 4 * ionized) / (1 + gas.heliumRatio + ionized);
    out[1] = 1 - (compton * Math.expm1(-state[1]!)) / rate;

    if (this.helium === "kinetic") {
      const heliumOdds = Math.exp(state[2]!);
      const conditions = {
        temperature,
        hydrogenDensity,
        heliumRatio: gas.heliumRatio,
        rate,
        neutralHydrogen: neutral,
        neutralHelium: 1 / (1 + heliumOdds),
      };
      out[2] = heliumLogitRate(conditions, ionized, heliumOdds, gas.constants) / rate;
    }
  }
}
