import { atoms } from "../constants";
import { singletLine, tripletLine } from "../recombination/heliumRates";

const twoPhoton = atoms.heliumTwoPhotonRate;

/** g of the triplet line over that of the singlet, the same everywhere. */
const tripletOverSinglet =
  (atoms.heliumTripletRate * atoms.hydrogenCrossSectionAtSinglet * atoms.heliumSinglet2p ** 3) /
  (atoms.heliumSingletRate * atoms.hydrogenCrossSectionAtTriplet * atoms.heliumTriplet2p ** 3);

/** Points a unit of g^(1/8), and how far: g to 2.8e13, beyond which the continuum plays no part. */
const pointsPerRoot = 80;
const highestRoot = 48;

/** 1/(1 + a' g^b') of singlet and triplet, in turn, at equal steps in the eighth root of the singlet's g. */
const continuumEscapes = new Float64Array(2 * (highestRoot * pointsPerRoot + 3));
for (let i = 0; i < continuumEscapes.length / 2; i++) {
  // The point before the first stands for the stencil alone.
  const g = (Math.max(i - 1, 0) / pointsPerRoot) ** 8;
  continuumEscapes[2 * i] = 1 / (1 + singletLine.amplitude * g ** singletLine.exponent);
  continuumEscapes[2 * i + 1] = 1 / (1 + tripletLine.amplitude * (tripletOverSinglet * g) ** tripletLine.exponent);
}

/** (1 - e^-tau)/tau at equal steps in tau; beyond the end it is 1/tau to 1e-12. */
const pointsPerDepth = 40;
const deepest = 28;
const sobolev = Float64Array.from({ length: deepest * pointsPerDepth + 3 }, (_, i) => {
  const depth = (i - 1) / pointsPerDepth;
  return depth === 0 ? 1 : -Math.expm1(-depth) / depth;
});

/** (1 - e^-tau)/tau from the table. @param depth tau, 0 or more. */
export function sobolevEscape(depth: number): number {
  if (!(depth < deepest)) return 1 / depth;
  const place = depth * pointsPerDepth;
  const k = place | 0;
  const p = place - k;
  const q = 1 - p;
  const outer = (p * q) / -6;
  return (
    outer * ((1 + q) * sobolev[k] + (1 + p) * sobolev[k + 3]) +
    (q * (1 + p) * (1 - 0.5 * p) * sobolev[k + 1] + p * (1 + q) * (1 - 0.5 * q) * sobolev[k + 2])
  );
}

/** Place in {@link continuumEscapes}: the eighth root of the singlet's g, which square roots give. @param g above 0. */
export function continuumPlace(g: number): number {
  return Math.min(Math.sqrt(Math.sqrt(Math.sqrt(g))) * pointsPerRoot, highestRoot * pointsPerRoot);
}

/**
 * Recombination of He I that stays in the ground state, m3/s: a_s (X + 51.3)/(X + 51.3 + b_s) + a_t/(1 + b_t/..), S and T of
 * recombination/heliumRates.ts without their brackets.
 *
 * The powers and the exponential come from tables with cubic interpolation (1e-7). The singlet line is opaque wherever helium is
 * followed: e^-tau is nothing. Written out, not in parts, so that the compiler sets it into the march and no number goes to the heap.
 *
 * @param helium table of the tier; @param at place of the row in it; @param depths f_He (1 - y) n_H/H, m-3 s; @param place from
 * {@link continuumPlace}.
 */
export function lineEscapes(helium: Float64Array, at: number, depths: number, place: number): number {
  let k = place | 0;
  const p = place - k;
  k *= 2;
  const q = 1 - p;
  const outer = (p * q) / -6;
  const w0 = outer * (1 + q);
  const w1 = q * (1 + p) * (1 - 0.5 * p);
  const w2 = p * (1 + q) * (1 - 0.5 * q);
  const w3 = outer * (1 + p);
  const table = continuumEscapes;
  const singletContinuum = w0 * table[k] + w1 * table[k + 2] + (w2 * table[k + 4] + w3 * table[k + 6]);
  const tripletContinuum = w0 * table[k + 1] + w1 * table[k + 3] + (w2 * table[k + 5] + w3 * table[k + 7]);
  const singletDecay = helium[at + 4] * (1 / (helium[at + 8] * depths) + singletContinuum) + twoPhoton;
  const tripletDecay = helium[at + 6] * (sobolevEscape(helium[at + 9] * depths) + tripletContinuum);
  return (
    (helium[at] * singletDecay) / (singletDecay + helium[at + 5]) +
    (helium[at + 1] * tripletDecay) / (tripletDecay + helium[at + 7])
  );
}
