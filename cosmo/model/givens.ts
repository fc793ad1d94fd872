import type { ConstantsSetName } from "../constants";
import type { DarkEnergyEquation, DarkEnergyTable } from "./darkEnergyFunction";

/** Dark energy with w(a) = w0 + wa (1 - a) (Chevallier & Polarski 2001; Linder 2003), or with any w by a formula or a table. */
export interface DarkEnergyGivens {
  /** w0, the equation of state today; -1 by default. */
  w0?: number;
  /** wa, its change with 1 - a; 0 by default. */
  wa?: number;
  /** w as a formula in z or in a, in place of w0 and wa. Cells and `derive` take its text: "-1 + 0.1 z/(1 + z)". */
  equation?: string | DarkEnergyEquation;
  /** w at redshifts, in place of w0 and wa; interpolated in a, held at its end values beyond them. */
  table?: DarkEnergyTable;
}

/** How a sum of neutrino masses is shared among the three. */
export type NeutrinoOrdering = "oneMassive" | "degenerate" | "normal" | "inverted";

/** Neutrinos: three species, massless or with exact Fermi-Dirac energy and pressure. */
export interface NeutrinoGivens {
  /** N_eff, the effective number of species while they were relativistic; 3.044 by default. */
  effectiveNumber?: number;
  /** Masses in eV, at most three; those left out or zero are massless. [0.06] by default. */
  masses?: readonly number[];
  /** Sum of the masses in eV, in place of `masses`. */
  massSum?: number;
  /** How `massSum` is shared; `oneMassive` by default. */
  ordering?: NeutrinoOrdering;
}

/** How recombination is computed. */
export type RecombinationTier = "saha" | "peebles" | "calibrated";

/** Choices on which published numbers differ; every one is printed with every result. */
export interface ConventionGivens {
  /** CODATA set; `codata2022` by default. */
  constants?: ConstantsSetName;
  /** Whether radiation counts in closing the budget to one (`radiationInside`, default) or stands on top of it (`radiationOnTop`). */
  closure?: "radiationInside" | "radiationOnTop";
  /** Which matter defines equality: `baryonsAndCold` (default, as in the Planck tables) or `allMatter`, massive neutrinos included. */
  equalityMatter?: "baryonsAndCold" | "allMatter";
  /** How z_* is found: where the optical depth is one (`full`, default), or by the fit of Hu & Sugiyama 1996. */
  lastScattering?: "full" | "huSugiyama1996";
  /** How z_drag is found: where the drag depth is one (`full`, default), or by the fit of Eisenstein & Hu 1998. */
  drag?: "full" | "eisensteinHu1998";
  /**
   * How sound horizons are found: by the integral (`full`, default); by the closed form of Eisenstein & Hu 1998 at every redshift; or
   * r_drag alone by the fits of Aubourg et al. 2015 (eq. 16) or Brieden, Gil-Marin & Verde 2023, which need no z_drag.
   */
  soundHorizon?: "full" | "eisensteinHu1998" | "aubourg2015" | "brieden2023";
}

/** Errors of the givens, carried to every number of the model. */
export interface UncertaintyGivens {
  /** 68% errors by the given's flat name ("hubble", "darkEnergy.w0"): one number, or upper and lower apart, not signed. */
  errors?: { readonly [given: string]: number | { readonly upper: number; readonly lower: number } };
  /** A covariance matrix of several givens, in their units; these must not stand in `errors` too. */
  covariance?: { readonly parameters: readonly string[]; readonly matrix: readonly (readonly number[])[] };
  /** `linear` (default): with the matrix of derivatives. `sampling`: over quasi-random models, for what is not linear. */
  method?: "linear" | "sampling";
  /** Number of models of `sampling`; 256 by default. */
  samples?: number;
}

/**
 * Derived numbers that may stand in place of a parameter they determine; units are the vocabulary's.
 */
export interface DerivedGivens {
  /** Age today in Gyr. */
  age?: number;
  /** 100 theta_*, unit 0.01 rad. */
  acousticAngle?: number;
  /** l_A. */
  acousticMultipole?: number;
  /** R. */
  shiftParameter?: number;
  /** z_*. */
  lastScatteringRedshift?: number;
  /** r_* in Mpc. */
  lastScatteringSoundHorizon?: number;
  /** z_drag. */
  dragRedshift?: number;
  /** r_drag in Mpc. */
  dragSoundHorizon?: number;
  /** r_drag h in Mpc. */
  dragSoundHorizonTimesReducedHubble?: number;
  /** k_D in 1/Mpc. */
  dampingWavenumber?: number;
  /** 100 theta_D, unit 0.01 rad. */
  dampingAngle?: number;
  /** z_eq. */
  equalityRedshift?: number;
  /** k_eq in 1/Mpc. */
  equalityWavenumber?: number;
  /** 100 theta_eq, unit 0.01 rad. */
  equalityHorizonAngle?: number;
  /** 100 theta_s,eq, unit 0.01 rad. */
  equalitySoundAngle?: number;
  /** Redshift at which the expansion began to accelerate. */
  accelerationRedshift?: number;
  /** Omega_m h^3. */
  matterFractionTimesCubedHubble?: number;
  /** omega_nu of the massive neutrinos, in place of their masses. */
  neutrinoDensity?: number;
  /** Omega_nu of the massive neutrinos, in place of their masses. */
  neutrinoFraction?: number;
  /** omega_gamma, in place of photonTemperature. */
  photonDensity?: number;
  /** Omega_gamma, in place of photonTemperature. */
  photonFraction?: number;
  /** omega_r of photons and massless neutrinos, in place of neutrinos.effectiveNumber. */
  radiationDensity?: number;
  /** Omega_r of photons and massless neutrinos, in place of neutrinos.effectiveNumber. */
  radiationFraction?: number;
  /**
   * Parameters to be solved for that have a default and would keep it otherwise: `["curvature"]` lets a derived number
   * determine the curvature.
   */
  solveFor?: readonly string[];
  /** Where two models meet the givens: the one nearest to these values is taken, `{ curvature: 0 }`. */
  solveNear?: { readonly [parameter: string]: number };
  /** Errors of the givens; every number then comes with its uncertainty. */
  uncertainty?: UncertaintyGivens;
}

/**
 * A cosmological model as a notebook states it: a sufficient set of parameters, or of derived numbers in their place, the
 * rest by default.
 *
 * Densities are omega = Omega h^2; fractions are Omega today. Matter includes massive neutrinos.
 *
 * @example const base: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
 */
export interface ModelGivens extends DerivedGivens {
  /** H0 in km/s/Mpc. */
  hubble?: number;
  /** h = H0/(100 km/s/Mpc), in place of hubble. */
  reducedHubble?: number;
  /** omega_b = Omega_b h^2. */
  baryonDensity?: number;
  /** Omega_b, in place of baryonDensity. */
  baryonFraction?: number;
  /** omega_c = Omega_c h^2. */
  coldMatterDensity?: number;
  /** Omega_c, in place of coldMatterDensity. */
  coldMatterFraction?: number;
  /** omega_m = Omega_m h^2: baryons, cold matter and massive neutrinos; in place of coldMatterDensity. */
  matterDensity?: number;
  /** Omega_m: baryons, cold matter and massive neutrinos; in place of coldMatterDensity. */
  matterFraction?: number;
  /** Omega_k; 0 by default. Positive is open, negative closed. */
  curvature?: number;
  /** omega_DE = Omega_DE h^2, in place of curvature. */
  darkEnergyDensity?: number;
  /** Omega_DE, in place of curvature. */
  darkEnergyFraction?: number;
  darkEnergy?: DarkEnergyGivens;
  neutrinos?: NeutrinoGivens;
  /** T_cmb today in K; 2.7255 by default. 0 leaves radiation and neutrinos out. */
  photonTemperature?: number;
  /** Y_p, helium's share of the baryonic mass, or `nucleosynthesis` (default): from omega_b and N_eff. */
  helium?: number | "nucleosynthesis";
  /** z_re, the middle of hydrogen's reionization; none by default. */
  reionizationRedshift?: number;
  /** tau, the optical depth of reionization, in place of reionizationRedshift. */
  reionizationDepth?: number;
  /** How recombination is computed; `calibrated` by default. */
  recombination?: RecombinationTier;
  /** n_s, for the fits of the acoustic peaks only; 0.965 by default. */
  scalarSpectralIndex?: number;
  conventions?: ConventionGivens;
}
