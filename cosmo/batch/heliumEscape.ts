import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";

/**
 * a' and b' of the escape into hydrogen's continuum, as in recombination/heliumRates.ts (Kholupenko et al. 2007; Wong, Moss &
 * Scott 2008; memory). A test holds what is built here against the single model's rate.
 */
const singletAmplitude = 0.36;
const singletExponent = 0.86;
const tripletAmplitude = 0.66;
const tripletExponent = 0.9;

/** Depth beyond which 1 - e^-tau is 1 to all digits. */
const opaque = 40;

/** ln of the ratio of g of the triplet line to that of the singlet. */
const tripletOverSinglet = Math.log(
  (atoms.heliumTripletRate * atoms.hydrogenCrossSectionAtSinglet * atoms.heliumSinglet2p ** 3) /
    (atoms.heliumSingletRate * atoms.hydrogenCrossSectionAtTriplet * atoms.heliumTriplet2p ** 3),
);

/**
 * What recombination of He I to singlets and triplets leaves in the ground state, m3/s: a_s (X + 51.3)/(X + 51.3 + b_s) + a_t/(1 + b_t/..).
 *
 * @param helium table of the tier; @param at place of the row in it; @param neutralHelium f_He (1 - y);
 * @param densityOverRate n_H (100 km/s/Mpc)/H; @param neutralHydrogen 1 - x_p.
 */
export function lineEscapes(
  helium: Float64Array,
  at: number,
  neutralHelium: number,
  densityOverRate: number,
  neutralHydrogen: number,
): number {
  const depths = (neutralHelium * densityOverRate) / hundredKmPerSecondPerMpc;
  const singletDepth = helium[at + 8] * depths;
  const tripletDepth = helium[at + 9] * depths;
  // One logarithm for both lines: their g differ by a factor alone.
  const logAbsorbers = Math.log((helium[at + 10] * neutralHelium) / neutralHydrogen);
  const singletEscape =
    (singletDepth > opaque ? 1 : -Math.expm1(-singletDepth)) / singletDepth +
    1 / (1 + singletAmplitude * Math.exp(singletExponent * logAbsorbers));
  const tripletEscape =
    -Math.expm1(-tripletDepth) / tripletDepth +
    1 / (1 + tripletAmplitude * Math.exp(tripletExponent * (logAbsorbers + tripletOverSinglet)));
  const singletDecay = helium[at + 4] * singletEscape + atoms.heliumTwoPhotonRate;
  const tripletDecay = helium[at + 6] * tripletEscape;
  return (
    (helium[at] * singletDecay) / (singletDecay + helium[at + 5]) +
    (helium[at + 1] * tripletDecay) / (tripletDecay + helium[at + 7])
  );
}
