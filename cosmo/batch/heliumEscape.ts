import { atoms } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";

/**
 * a' and b' of the escape into hydrogen's continuum, as in recombination/heliumRates.ts (Kholupenko et al. 2007; Wong, Moss &
 * Scott 2008; memory). A test holds what is built here against the single model's rate.
 */
const singlet = { amplitude: 0.36, exponent: 0.86 };
const triplet = { amplitude: 0.66, exponent: 0.9 };

/** g of the triplet line over that of the singlet, the same everywhere. */
const tripletOverSinglet =
  (atoms.heliumTripletRate * atoms.hydrogenCrossSectionAtSinglet * atoms.heliumSinglet2p ** 3) /
  (atoms.heliumSingletRate * atoms.hydrogenCrossSectionAtTriplet * atoms.heliumTriplet2p ** 3);

/** Points a unit of g^(1/8), and how far: g to 2.8e13, beyond which the continuum plays no part. */
const pointsPerRoot = 80;
const highestRoot = 48;

/** 1/(1 + a' g^b') of singlet and triplet, in turn, at equal steps in the eighth root of the singlet's g. */
const continuum = new Float64Array(2 * (highestRoot * pointsPerRoot + 3));
for (let i = 0; i < continuum.length / 2; i++) {
  // The point before the first stands for the stencil alone.
  const g = (Math.max(i - 1, 0) / pointsPerRoot) ** 8;
  continuum[2 * i] = 1 / (1 + singlet.amplitude * g ** singlet.exponent);
  continuum[2 * i + 1] = 1 / (1 + triplet.amplitude * (tripletOverSinglet * g) ** triplet.exponent);
}

/** (1 - e^-tau)/tau at equal steps in tau; beyond the end it is 1/tau to 1e-12. */
const pointsPerDepth = 40;
const deepest = 28;
const sobolev = Float64Array.from({ length: deepest * pointsPerDepth + 3 }, (_, i) => {
  const depth = (i - 1) / pointsPerDepth;
  return depth === 0 ? 1 : -Math.expm1(-depth) / depth;
});

/**
 * What recombination of He I to singlets and triplets leaves in the ground state, m3/s: a_s (X + 51.3)/(X + 51.3 + b_s) + a_t/(1 + b_t/..).
 *
 * The powers and the exponential come from tables with cubic interpolation (1e-7), in variables that a square root gives.
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
  const absorbers = (helium[at + 10] * neutralHelium) / neutralHydrogen;
  let place = Math.sqrt(Math.sqrt(Math.sqrt(absorbers))) * pointsPerRoot;
  if (!(place < highestRoot * pointsPerRoot)) place = highestRoot * pointsPerRoot;
  let k = place | 0;
  let p = place - k;
  let q = 1 - p;
  let outer = -(p * q) / 6;
  let before = outer * (1 + q);
  let after = outer * (1 + p);
  let low = q * (1 + p) * (1 - 0.5 * p);
  let high = p * (1 + q) * (1 - 0.5 * q);
  k *= 2;
  const singletContinuum =
    before * continuum[k] + low * continuum[k + 2] + (high * continuum[k + 4] + after * continuum[k + 6]);
  const tripletContinuum =
    before * continuum[k + 1] + low * continuum[k + 3] + (high * continuum[k + 5] + after * continuum[k + 7]);

  const tripletDepth = helium[at + 9] * depths;
  let tripletEscape = 0;
  if (tripletDepth < deepest) {
    place = tripletDepth * pointsPerDepth;
    k = place | 0;
    p = place - k;
    q = 1 - p;
    outer = -(p * q) / 6;
    before = outer * (1 + q);
    after = outer * (1 + p);
    low = q * (1 + p) * (1 - 0.5 * p);
    high = p * (1 + q) * (1 - 0.5 * q);
    tripletEscape = before * sobolev[k] + low * sobolev[k + 1] + (high * sobolev[k + 2] + after * sobolev[k + 3]);
  } else {
    tripletEscape = 1 / tripletDepth;
  }
  // The singlet line is opaque wherever helium is followed: e^-tau is nothing.
  const singletDecay = helium[at + 4] * (1 / (helium[at + 8] * depths) + singletContinuum) + atoms.heliumTwoPhotonRate;
  const tripletDecay = helium[at + 6] * (tripletEscape + tripletContinuum);
  return (
    (helium[at] * singletDecay) / (singletDecay + helium[at + 5]) +
    (helium[at + 1] * tripletDecay) / (tripletDecay + helium[at + 7])
  );
}
