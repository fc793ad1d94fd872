import { atoms, type ConstantsSet, lightSpeed, radiationConstant } from "../constants";
import { NoAnswerError } from "../errors";
import type { ModelPart } from "../expansion";
import { unitDensity } from "../model";

/** The baryonic gas of a model today: what every rate needs beside temperature and H. */
export interface Gas {
  /** n_H today, 1/m3: (1 - Y_p) omega_b rho_100/m_H. */
  readonly hydrogenDensity: number;
  /** f_He = n_He/n_H = Y_p/[(m_He/m_H)(1 - Y_p)]. */
  readonly heliumRatio: number;
  /** T_cmb, K. */
  readonly temperature: number;
  /** 8 sigma_T a T_cmb^4/(3 m_e c), 1/s: the Compton rate today but for the electrons' share. */
  readonly comptonRate: number;
  readonly constants: ConstantsSet;
}

/** f_He = Y_p/[(m_He/m_H)(1 - Y_p)], helium nuclei a hydrogen nucleus. */
export function heliumToHydrogenRatio(helium: number): number {
  return helium / (atoms.heliumToHydrogenMass * (1 - helium));
}

/**
 * The gas of the model.
 *
 * Refuses a model without baryons or without radiation: there is nothing that could recombine.
 */
export const gasPart: ModelPart<Gas> = {
  name: "gas",
  compute: ({ model }) => {
    if (!(model.baryonDensity > 0)) {
      throw new NoAnswerError({
        where: "recombination",
        reason: "this model has no baryons (baryonDensity 0), so nothing recombines",
        hint: "give baryonDensity a value near 0.0224",
      });
    }
    if (!(model.photonTemperature > 0)) {
      throw new NoAnswerError({
        where: "recombination",
        reason: "this model has no radiation (photonTemperature 0), so it was never ionized by heat",
        hint: "leave photonTemperature out for 2.7255 K",
      });
    }
    const constants = model.constants;
    const hydrogenMass = atoms.hydrogenMassInUnits * constants.atomicMassUnit;
    const temperature = model.photonTemperature;
    return {
      hydrogenDensity: ((1 - model.helium) * model.baryonDensity * unitDensity(constants)) / hydrogenMass,
      heliumRatio: heliumToHydrogenRatio(model.helium),
      temperature,
      comptonRate:
        (8 * constants.thomsonCrossSection * radiationConstant(constants) * temperature ** 4) /
        (3 * constants.electronMass * lightSpeed),
      constants,
    };
  },
};
