import { redshiftArgument } from "../quantity";
import { type Expansion, expansionPart, type ModelEvaluation, type ModelQuantity } from "./expansion";
import { requireRedshift } from "./requirePast";

/**
 * Omega_X(z) = rho_X(z)/rho_c(z), the critical density that of H(z): matter, radiation, curvature and dark energy sum to one at
 * every redshift under both closures. Under `radiationOnTop` they differ at z = 0 from the fractions of the model, which divide by H0^2.
 */
function fractionAt(
  evaluation: ModelEvaluation,
  z: number,
  where: string,
  term: (expansion: Expansion, a: number) => number,
): number {
  requireRedshift(evaluation, z, where);
  const expansion = evaluation.once(expansionPart);
  const a = 1 / (1 + z);
  return term(expansion, a) / expansion.squaredTerm(a);
}

/** Omega_m(z): baryons, cold matter and massive neutrinos by their whole energy density. @param z above -1. Accuracy 1e-13. */
export function matterFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "matterFractionAt", (e, a) => a * e.baryonsAndCold + e.neutrinoTerm(a));
}

/** Omega_b(z). @param z above -1. Accuracy 1e-13. */
export function baryonFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "baryonFractionAt", (_, a) => a * evaluation.model.baryonDensity);
}

/** Omega_c(z). @param z above -1. Accuracy 1e-13. */
export function coldMatterFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "coldMatterFractionAt", (_, a) => a * evaluation.model.coldMatterDensity);
}

/** Omega_nu(z) of the massive species, whatever their speed. @param z above -1. Accuracy 1e-13. */
export function neutrinoFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "neutrinoFractionAt", (e, a) => e.neutrinoTerm(a));
}

/** Omega_r(z): photons and massless neutrinos. @param z above -1. Accuracy 1e-13. */
export function radiationFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "radiationFractionAt", (e) => e.radiation);
}

/** Omega_gamma(z). @param z above -1. Accuracy 1e-13. */
export function photonFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "photonFractionAt", () => evaluation.model.photonDensity);
}

/** Omega_DE(z). @param z above -1. Accuracy 1e-13. */
export function darkEnergyFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "darkEnergyFractionAt", (e, a) => e.darkEnergyTerm(a));
}

/** Omega_k(z). @param z above -1. Accuracy 1e-13. */
export function curvatureFractionAt(evaluation: ModelEvaluation, z: number): number {
  return fractionAt(evaluation, z, "curvatureFractionAt", (e, a) => a * a * e.curvatureDensity);
}

function describe(
  name: string,
  index: string,
  subject: string,
  numerator: string,
  compute: (evaluation: ModelEvaluation, z: number) => number,
): ModelQuantity {
  return {
    name,
    symbol: `Ω_${index}`,
    unit: "",
    arguments: [redshiftArgument],
    description: `${subject} over the critical density at a redshift`,
    equation: String.raw`\Omega(z) = ${numerator}\,\left(\frac{100}{H(z)}\right)^2`,
    method: "closed form; massive neutrinos by the exact Fermi-Dirac integral",
    accuracy: 1e-13,
    sources: ["hogg1999"],
    compute: (evaluation, [z]) => ({ value: compute(evaluation, z!), error: 0 }),
  };
}

export const matterFractionAtQuantity = describe(
  "matterFractionAt",
  "m",
  "Matter with massive neutrinos",
  String.raw`[\omega_{cb}(1+z)^3 + \omega_\nu(z)]`,
  matterFractionAt,
);
export const baryonFractionAtQuantity = describe(
  "baryonFractionAt",
  "b",
  "Baryons",
  String.raw`\omega_b(1+z)^3`,
  baryonFractionAt,
);
export const coldMatterFractionAtQuantity = describe(
  "coldMatterFractionAt",
  "c",
  "Cold matter",
  String.raw`\omega_c(1+z)^3`,
  coldMatterFractionAt,
);
export const neutrinoFractionAtQuantity = describe(
  "neutrinoFractionAt",
  "ν",
  "Massive neutrinos",
  String.raw`\omega_\nu(z)`,
  neutrinoFractionAt,
);
export const radiationFractionAtQuantity = describe(
  "radiationFractionAt",
  "r",
  "Photons and massless neutrinos",
  String.raw`\omega_r(1+z)^4`,
  radiationFractionAt,
);
export const photonFractionAtQuantity = describe(
  "photonFractionAt",
  "γ",
  "Photons",
  String.raw`\omega_\gamma(1+z)^4`,
  photonFractionAt,
);
export const darkEnergyFractionAtQuantity = describe(
  "darkEnergyFractionAt",
  "DE",
  "Dark energy",
  String.raw`\omega_{DE} f(z)`,
  darkEnergyFractionAt,
);
export const curvatureFractionAtQuantity = describe(
  "curvatureFractionAt",
  "k",
  "Curvature",
  String.raw`\omega_k(1+z)^2`,
  curvatureFractionAt,
);
