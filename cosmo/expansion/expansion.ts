import type { ClosedModel } from "../model";
import { findMinimum, findRoot } from "../numerics";
import type { Evaluation, Part, Quantity } from "../quantity";
import { darkEnergyGrowth } from "./darkEnergyGrowth";
import { fermiDiracEnergy, fermiDiracPressure } from "./fermiDirac";
import { massToTemperature } from "./neutrinoDensity";
import { StateHistory, stateFunction } from "./stateHistory";

/** An evaluation of one closed model: what every quantity of `cosmo/` is computed from. */
export type ModelEvaluation = Evaluation<ClosedModel>;

/** A part of the evaluation of a closed model. */
export type ModelPart<T> = Part<ClosedModel, T>;

/** A quantity of a closed model. */
export type ModelQuantity = Quantity<ClosedModel>;

/**
 * The expansion of one model, in units of 100 km/s/Mpc so that densities stand as omega = Omega h^2.
 *
 * (H/100)^2 = omega_cb a^-3 + omega_r a^-4 + omega_nu(a) + omega_k a^-2 + omega_DE f(a). Written with a^4 taken out, every term
 * stays finite as a goes to 0.
 */
export class Expansion {
  readonly baryonsAndCold: number;
  readonly radiation: number;
  readonly curvatureDensity: number;
  readonly darkEnergy: number;
  private readonly w0: number;
  private readonly wa: number;
  private readonly speciesDensity: number;
  /** ln(1+z) where w has a kink or a jump: no panel of a quadrature should straddle one. */
  readonly kinks: readonly number[];
  /** The same places as sqrt(a). */
  readonly kinkRoots: readonly number[];
  /** y = m c^2/(k T_nu) today, one a massive species. */
  private readonly massRatios: readonly number[];

  constructor(
    model: ClosedModel,
    /** Dark energy whose w follows a formula or a table. */
    private readonly stateHistory?: StateHistory,
  ) {
    this.baryonsAndCold = model.baryonDensity + model.coldMatterDensity;
    this.radiation = model.radiationDensity;
    this.curvatureDensity = model.curvature * model.reducedHubble ** 2;
    this.darkEnergy = model.darkEnergyDensity;
    this.w0 = model.darkEnergy.w0;
    this.wa = model.darkEnergy.wa;
    this.kinks = stateHistory?.kinks ?? [];
    this.kinkRoots = this.kinks.map((t) => Math.exp(-t / 2));
    this.speciesDensity = model.neutrinos.masslessSpeciesDensity;
    const temperature = model.neutrinos.temperature;
    this.massRatios =
      temperature > 0
        ? model.neutrinos.masses.map((mass) => massToTemperature(mass, temperature, model.constants))
        : [];
  }

  /** omega_nu(a) a^4 of the massive species. */
  neutrinoTerm(a: number): number {
    let sum = 0;
    for (const ratio of this.massRatios) sum += this.speciesDensity * fermiDiracEnergy(ratio * a);
    return sum;
  }

  /** 3 P_nu(a) a^4 of the massive species, in the units of {@link neutrinoTerm}. */
  neutrinoPressureTerm(a: number): number {
    let sum = 0;
    for (const ratio of this.massRatios) sum += this.speciesDensity * fermiDiracPressure(ratio * a);
    return sum;
  }

  /** omega_DE f(a) a^4. */
  darkEnergyTerm(a: number): number {
    if (this.darkEnergy === 0) return 0;
    if (this.stateHistory !== undefined) return this.darkEnergy * this.stateHistory.growthTerm(a);
    return this.darkEnergy * darkEnergyGrowth(a, this.w0, this.wa) * a ** 4;
  }

  /** a^4 (H/100 km/s/Mpc)^2; negative where a closed model has no such a. */
  squaredTerm(a: number): number {
    return (
      this.radiation +
      this.neutrinoTerm(a) +
      a * (this.baryonsAndCold + a * this.curvatureDensity) +
      this.darkEnergyTerm(a)
    );
  }

  /** H in units of 100 km/s/Mpc at scale factor a; NaN where the model has no such a. */
  rate(a: number): number {
    return Math.sqrt(this.squaredTerm(a)) / (a * a);
  }

  /** w of the dark energy at scale factor a. */
  equationOfState(a: number): number {
    return this.stateHistory?.state(a) ?? this.w0 + this.wa * (1 - a);
  }

  /** w as a goes to 0. */
  earlyState(): number {
    return this.stateHistory?.earlyState ?? this.w0 + this.wa;
  }

  /** w as a goes to infinity, where it follows a formula or a table: it is held there. */
  lateHeldState(): number | undefined {
    return this.stateHistory?.lateState;
  }
}

/** Dark energy by formula or table; undefined where w0 and wa say it all. */
export const stateHistoryPart: ModelPart<StateHistory | undefined> = {
  name: "dark energy",
  compute: ({ model, precision }) => {
    const w = stateFunction(model.darkEnergy, precision);
    return w === undefined ? undefined : new StateHistory(model.darkEnergy, w);
  },
  approximate: (model) => model.darkEnergy.table !== undefined,
  relativeError: (evaluation) => evaluation.once(stateHistoryPart)?.relativeError ?? 0,
  notes: ({ model: { darkEnergy } }) => {
    const beyond = "followed from z = 1e8 to a = 1000 and held beyond";
    if (darkEnergy.equation !== undefined) {
      return [{ level: "note", text: `w = ${darkEnergy.equation.text}, ${beyond}` }];
    }
    if (darkEnergy.table === undefined) return [];
    const { redshifts } = darkEnergy.table;
    return [
      {
        level: "note",
        text: `w by cubic pieces in a through a table of ${redshifts.length} redshifts from ${redshifts[0]} to ${redshifts[redshifts.length - 1]}, held at its ends; the numerical error includes what half of the points would change`,
      },
    ];
  },
};

/** The expansion of the model. */
export const expansionPart: ModelPart<Expansion> = {
  name: "expansion",
  compute: (evaluation) => new Expansion(evaluation.model, evaluation.once(stateHistoryPart)),
  notes: ({ model }) =>
    model.photonTemperature === 0
      ? [
          {
            level: "note",
            text: "radiation neglected (photonTemperature 0): photons and neutrinos of a 2.7255 K background are 9e-5 of the density today, 3e-3 at z = 10 and half of it at z = 3400",
          },
        ]
      : [],
};

/**
 * The redshift beyond which the model does not exist (H = 0 there: a closed model that bounced), or undefined when it
 * reaches back to a Big Bang.
 *
 * Method: where every term is positive there is nothing to look for; otherwise a^4 H^2 is scanned over 600 points in ln a from
 * 1e-8 to 1, its lowest point refined, and the zero nearest to today found by Brent's method.
 */
export const turningRedshiftPart: ModelPart<number | undefined> = {
  name: "turning redshift",
  compute: (evaluation) => {
    const expansion = evaluation.once(expansionPart);
    if (expansion.curvatureDensity >= 0 && expansion.darkEnergy >= 0) return undefined;
    const points = 600;
    const lowest = Math.log(1e-8);
    const term = (s: number) => expansion.squaredTerm(Math.exp(s));
    const scaled = (s: number) => term(s) * Math.exp(-2 * s);
    let nearestRoot: number | undefined;
    let above = 0;
    for (let i = 1; i <= points && nearestRoot === undefined; i++) {
      const s = (lowest * i) / points;
      if (term(s) <= 0) {
        nearestRoot = findRoot(term, s, above).value;
      } else if (i > 1) {
        const middle = (lowest * (i - 1)) / points;
        const before = (lowest * (i - 2)) / points;
        if (scaled(middle) < scaled(s) && scaled(middle) < scaled(before)) {
          const bottom = findMinimum(scaled, s, before);
          if (bottom.minimum <= 0) nearestRoot = findRoot(term, bottom.value, before).value;
        }
      }
      above = s;
    }
    return nearestRoot === undefined ? undefined : Math.expm1(-nearestRoot);
  },
};
