import type { ModelGivens } from "../../cosmo/model";
import { evaluateModel, type ModelNumbers } from "../../cosmo/solve";

/** Models without radiation and neutrinos, for which everything is known in closed form. */
export function withoutRadiation(givens: ModelGivens): ModelNumbers {
  return evaluateModel({ hubble: 70, baryonDensity: 0, photonTemperature: 0, ...givens });
}

/** c/H0 in Mpc at 70 km/s/Mpc. */
export const hubbleDistance70 = 299792.458 / 70;

/** 1/H0 in Gyr at 70 km/s/Mpc: pc = 648000/pi au, au = 149597870700 m (IAU), Julian years. */
export const hubbleTime70 = ((648000 / Math.PI) * 149597870700 * 1e3) / 70 / (1e9 * 31557600);

export const einsteinDeSitter = () => withoutRadiation({ coldMatterFraction: 1 });
export const milne = () => withoutRadiation({ coldMatterFraction: 0, curvature: 1 });
export const deSitter = () => withoutRadiation({ coldMatterFraction: 0 });
/** Matter and a cosmological constant, flat. */
export const flatLambda = (matter: number) => withoutRadiation({ coldMatterFraction: matter });
/** Matter and curvature. */
export const matterAndCurvature = (matter: number) =>
  withoutRadiation({ coldMatterFraction: matter, darkEnergyFraction: 0 });

/** The model of the demo notebooks. */
export const plain: ModelGivens = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

export function relative(value: number, expected: number): number {
  return Math.abs(value / expected - 1);
}
