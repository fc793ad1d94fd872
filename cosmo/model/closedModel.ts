import type { ConstantsSet } from "../constants";
import type { DarkEnergyEquation, DarkEnergyTable } from "./darkEnergyFunction";
import type { ConventionGivens, ModelGivens, RecombinationTier } from "./givens";

/** Dark energy of a closed model. */
export interface ClosedDarkEnergy {
  /** w today. */
  readonly w0: number;
  /** wa of w0 + wa (1 - a); 0 where w follows an equation or a table. */
  readonly wa: number;
  readonly equation?: DarkEnergyEquation;
  readonly table?: DarkEnergyTable;
}

/** Neutrinos of a closed model. */
export interface ClosedNeutrinos {
  /** N_eff. */
  readonly effectiveNumber: number;
  /** The masses above zero in eV, largest first; the other species of three are massless. */
  readonly masses: readonly number[];
  /** T_nu today in K: (4/11)^(1/3) (N_eff/3)^(1/4) T_cmb. */
  readonly temperature: number;
  /** omega of one species if it were massless. */
  readonly masslessSpeciesDensity: number;
}

/** How a model was closed where fields alone did not do it. */
export interface ModelSolution {
  /** Parameters that were solved for, and the givens that determined them. */
  readonly solvedFor: readonly string[];
  readonly determinedBy: readonly string[];
  /** Evaluations of the model at full precision that the search took. */
  readonly evaluations: number;
  /** Givens beyond what was needed, which follow from the others within their rounding. */
  readonly agreeing: readonly string[];
}

/** A model with nothing left open: every density, fraction and convention a number or a word. */
export interface ClosedModel {
  /** What it was closed from. */
  readonly givens: ModelGivens;
  /** H0 in km/s/Mpc: the normalizing one under `radiationOnTop`. */
  readonly hubble: number;
  readonly reducedHubble: number;
  readonly baryonDensity: number;
  readonly coldMatterDensity: number;
  /** omega_nu of the massive species: their whole energy density today. */
  readonly neutrinoDensity: number;
  /** omega_m: baryons, cold matter and massive neutrinos. */
  readonly matterDensity: number;
  readonly photonDensity: number;
  /** omega_r: photons and massless neutrinos. */
  readonly radiationDensity: number;
  readonly darkEnergyDensity: number;
  readonly baryonFraction: number;
  readonly coldMatterFraction: number;
  readonly neutrinoFraction: number;
  readonly matterFraction: number;
  readonly photonFraction: number;
  readonly radiationFraction: number;
  readonly darkEnergyFraction: number;
  /** Omega_k. */
  readonly curvature: number;
  readonly darkEnergy: ClosedDarkEnergy;
  readonly neutrinos: ClosedNeutrinos;
  /** K. */
  readonly photonTemperature: number;
  /** Y_p, a mass fraction. */
  readonly helium: number;
  readonly heliumSource: "given" | "nucleosynthesis";
  readonly reionizationRedshift: number | undefined;
  readonly reionizationDepth: number | undefined;
  readonly recombination: RecombinationTier;
  /** n_s, which only the peak fits read. */
  readonly scalarSpectralIndex: number;
  readonly conventions: Required<ConventionGivens>;
  readonly constants: ConstantsSet;
  /** Present where a derived number stood in for a parameter, or where more was given than needed. */
  readonly solution?: ModelSolution;
}
