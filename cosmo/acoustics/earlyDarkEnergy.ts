import { expansionPart, type ModelEvaluation, type ModelPart } from "../expansion";
import { lastScatteringPart } from "../lastScattering";
import { integrate } from "../numerics";

const shareBeforePart: ModelPart<number> = {
  name: "dark energy before last scattering",
  compute: (evaluation) => {
    const expansion = evaluation.once(expansionPart);
    if (expansion.darkEnergy === 0) return 0;
    const end = Math.exp(-evaluation.once(lastScatteringPart) / 2);
    // d eta = da/(a^2 H), in sqrt(a), where both integrands are smooth.
    const weighted = (root: number, share: boolean) => {
      const a = root * root;
      const squared = expansion.squaredTerm(a);
      return ((2 * root) / Math.sqrt(squared)) * (share ? expansion.darkEnergyTerm(a) / squared : 1);
    };
    // The share of a constant is 1e-9, of which relative digits are wanted nowhere.
    const time = integrate((root) => weighted(root, false), 0, end).value;
    return integrate((root) => weighted(root, true), 0, end, { relative: 1e-9, absolute: 1e-14 * time }).value / time;
  },
};

/**
 * Share of dark energy in the critical density before last scattering, averaged over conformal time.
 *
 * O = (1/eta_star) int_0^eta_star Omega_DE(eta) d eta.
 *
 * Method: adaptive Gauss-Kronrod. Accuracy 1e-9, or 1e-14 absolute. Source: Doran & Lilley 2002 (memory).
 * @example earlyDarkEnergy(evaluation) // 2.4e-10 for a cosmological constant
 */
export function earlyDarkEnergy(evaluation: ModelEvaluation): number {
  return evaluation.once(shareBeforePart);
}
