import { redshiftArgument } from "../quantity";
import { expansionPart, type ModelEvaluation, type ModelQuantity } from "./expansion";
import { requireRedshift } from "./requirePast";

/**
 * H(z) in km/s/Mpc.
 *
 * H^2 = (100 km/s/Mpc)^2 [omega_cb (1+z)^3 + omega_r (1+z)^4 + omega_nu(z) + omega_k (1+z)^2 + omega_DE f(z)].
 * Under `radiationOnTop`, hubbleRate(0) = H0 sqrt(1 + Omega_r).
 *
 * @param z redshift above -1; the future is z below 0. Beyond the turning point of a closed model: NoAnswerError.
 * Accuracy 1e-13, closed form but for the Fermi-Dirac energy. Source: Hogg 1999, eq. 14.
 * @example hubbleRate(evaluation, 0) // 67.4
 */
export function hubbleRate(evaluation: ModelEvaluation, z: number): number {
  requireRedshift(evaluation, z, "hubbleRate");
  return 100 * evaluation.once(expansionPart).rate(1 / (1 + z));
}

export const hubbleRateQuantity: ModelQuantity = {
  name: "hubbleRate",
  symbol: "H",
  unit: "km/s/Mpc",
  arguments: [redshiftArgument],
  description: "Expansion rate at a redshift",
  equation: String.raw`H(z) = 100\,\sqrt{\omega_{cb}(1+z)^3 + \omega_r(1+z)^4 + \omega_\nu(z) + \omega_k(1+z)^2 + \omega_{DE} f(z)}`,
  method: "closed form; massive neutrinos by the exact Fermi-Dirac integral",
  accuracy: 1e-13,
  sources: ["hogg1999"],
  compute: (evaluation, [z]) => ({ value: hubbleRate(evaluation, z!), error: 0 }),
};
