import type { SourceKey } from "../sources";

/** A complete set of physical constants, SI units. */
export interface ConstantsSet {
  /** Its name in `conventions.constants`. */
  readonly name: ConstantsSetName;
  readonly source: SourceKey;
  /** G, m3 kg-1 s-2. */
  readonly gravitation: number;
  /** h, J s. */
  readonly planck: number;
  /** k_B, J/K. */
  readonly boltzmann: number;
  /** e, C: one electronvolt in joule. */
  readonly elementaryCharge: number;
  /** m_e, kg. */
  readonly electronMass: number;
  /** m_p, kg. */
  readonly protonMass: number;
  /** u, kg. */
  readonly atomicMassUnit: number;
  /** sigma_T, m2. */
  readonly thomsonCrossSection: number;
  /** sigma_SB, W m-2 K-4, as printed in the list, not recomputed from the others. */
  readonly stefanBoltzmann: number;
}

/** The names that `conventions.constants` takes. */
export type ConstantsSetName = "codata2010" | "codata2014" | "codata2018" | "codata2022";

/** c, m/s: exact in every set. */
export const lightSpeed = 299792458;

/**
 * The CODATA sets, digits as SciPy's copies of the CODATA lists print them.
 *
 * G sets the critical density, so it moves z_eq by 7e-5 between 2010 and 2018: enough to show in a printed digit.
 */
export const constantsSets: Readonly<Record<ConstantsSetName, ConstantsSet>> = {
  codata2010: {
    name: "codata2010",
    source: "codata2010",
    gravitation: 6.67384e-11,
    planck: 6.62606957e-34,
    boltzmann: 1.3806488e-23,
    elementaryCharge: 1.602176565e-19,
    electronMass: 9.10938291e-31,
    protonMass: 1.672621777e-27,
    atomicMassUnit: 1.660538921e-27,
    thomsonCrossSection: 6.652458734e-29,
    stefanBoltzmann: 5.670373e-8,
  },
  codata2014: {
    name: "codata2014",
    source: "codata2014",
    gravitation: 6.67408e-11,
    planck: 6.62607004e-34,
    boltzmann: 1.38064852e-23,
    elementaryCharge: 1.6021766208e-19,
    electronMass: 9.10938356e-31,
    protonMass: 1.672621898e-27,
    atomicMassUnit: 1.66053904e-27,
    thomsonCrossSection: 6.6524587158e-29,
    stefanBoltzmann: 5.670367e-8,
  },
  codata2018: {
    name: "codata2018",
    source: "codata2018",
    gravitation: 6.6743e-11,
    planck: 6.62607015e-34,
    boltzmann: 1.380649e-23,
    elementaryCharge: 1.602176634e-19,
    electronMass: 9.1093837015e-31,
    protonMass: 1.67262192369e-27,
    atomicMassUnit: 1.6605390666e-27,
    thomsonCrossSection: 6.6524587321e-29,
    stefanBoltzmann: 5.6703744191844314e-8,
  },
  codata2022: {
    name: "codata2022",
    source: "codata2022",
    gravitation: 6.6743e-11,
    planck: 6.62607015e-34,
    boltzmann: 1.380649e-23,
    elementaryCharge: 1.602176634e-19,
    electronMass: 9.1093837139e-31,
    protonMass: 1.67262192595e-27,
    atomicMassUnit: 1.66053906892e-27,
    thomsonCrossSection: 6.6524587051e-29,
    stefanBoltzmann: 5.6703744191844314e-8,
  },
};

/** a = 4 sigma_SB/c, J m-3 K-4: energy density of blackbody radiation is a T^4. */
export function radiationConstant(set: ConstantsSet): number {
  return (4 * set.stefanBoltzmann) / lightSpeed;
}
