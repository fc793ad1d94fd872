import { redshiftArgument } from "../quantity";
import { type Expansion, expansionPart, type ModelEvaluation, type ModelQuantity } from "./expansion";
import { requireRedshift } from "./requirePast";

/**
 * a^4 (rho + 3 P)/rho_100 summed over everything that has pressure or density: positive while the expansion slows down.
 * Curvature has no part in it.
 */
export function decelerationTerm(expansion: Expansion, a: number): number {
  return (
    2 * expansion.radiation +
    expansion.neutrinoTerm(a) +
    expansion.neutrinoPressureTerm(a) +
    a * expansion.baryonsAndCold +
    (1 + 3 * expansion.equationOfState(a)) * expansion.darkEnergyTerm(a)
  );
}

/**
 * Deceleration q at a redshift: negative while the expansion speeds up.
 *
 * q = -a (d2a/dt2)/(da/dt)^2 = (1/2) sum (rho + 3 P)/rho_c, neutrino pressure by the exact Fermi-Dirac integral.
 *
 * @param z redshift above -1; beyond a turning point: NoAnswerError. Closed form; absolute accuracy 1e-13.
 * Source: common practice, no source (second Friedmann equation).
 * @example decelerationAt(evaluation, 0) // -0.53 near Planck's parameters
 */
export function decelerationAt(evaluation: ModelEvaluation, z: number): number {
  requireRedshift(evaluation, z, "decelerationAt");
  const expansion = evaluation.once(expansionPart);
  const a = 1 / (1 + z);
  return decelerationTerm(expansion, a) / (2 * expansion.squaredTerm(a));
}

export const decelerationAtQuantity: ModelQuantity = {
  name: "decelerationAt",
  symbol: "q",
  unit: "",
  arguments: [redshiftArgument],
  description: "Deceleration of the expansion at a redshift",
  equation: String.raw`q(z) = -\frac{\ddot a\, a}{\dot a^2} = \frac{1}{2}\sum_X \frac{\rho_X + 3 P_X}{\rho_c}`,
  method: "closed form; neutrino energy and pressure by the exact Fermi-Dirac integrals",
  accuracy: 1e-12,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => {
    const value = decelerationAt(evaluation, z!);
    return { value, error: 4 * Number.EPSILON };
  },
};
