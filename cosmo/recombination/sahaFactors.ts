import { atoms, type ConstantsSet, lightSpeed } from "../constants";

/** h c/k_B in m K: a level L in 1/m times this is a temperature. */
export function levelTemperature(constants: ConstantsSet): number {
  return (constants.planck * lightSpeed) / constants.boltzmann;
}

/**
 * G(T) = (2 pi m_e k T/h^2)^(3/2), 1/m3: density of electron states.
 *
 * @param temperature K. Source: Saha's equation, as in Peebles 1968.
 */
export function electronStates(temperature: number, constants: ConstantsSet): number {
  const inner = (2 * Math.PI * constants.electronMass * constants.boltzmann * temperature) / constants.planck ** 2;
  return inner * Math.sqrt(inner);
}

/** ln of n_e n_(i+1)/n_i in 1/m3 in Saha equilibrium for the three ionisations, at one temperature. */
export interface SahaLogarithms {
  readonly hydrogen: number;
  readonly helium: number;
  readonly heliumIon: number;
}

/**
 * n_e n_i/n_(i-1) = w (2 pi m_e k T/h^2)^(3/2) e^(-chi/kT), w = 1 for H, 4 for He I, 1 for He II; as logarithms, since the
 * exponentials underflow late.
 *
 * @param temperature K, above 0.
 */
export function sahaLogarithms(temperature: number, constants: ConstantsSet): SahaLogarithms {
  const states = Math.log(electronStates(temperature, constants));
  const perLevel = levelTemperature(constants) / temperature;
  return {
    hydrogen: states - atoms.hydrogenLimit * perLevel,
    helium: Math.log(4) + states - atoms.heliumLimit * perLevel,
    heliumIon: states - atoms.heliumIonLimit * perLevel,
  };
}
