import { unitHubbleDistance } from "../distances";
import { expansionPart, type ModelEvaluation, type ModelPart } from "../expansion";
import { historyQuantity, lastScatteringPart, opticalDepthPart } from "../lastScattering";
import { gaussLegendre, integrate } from "../numerics";
import { ionizationHistoryPart } from "../recombination";

const rule = gaussLegendre(8);

/** Beyond this many e-folds above the history's mesh less than 1e-16 of the integral is left: it falls like (1+z)^-3. */
const farEnough = 12;

/** He++ takes its second electron at about these temperatures of the background, K: the integrand has a step there. */
const secondHeliumStep = [5000 * 2.7255, 6500 * 2.7255];

const dampingPart: ModelPart<number> = {
  name: "photon diffusion",
  compute: (evaluation) => {
    const depths = evaluation.once(opticalDepthPart);
    const { mesh } = evaluation.once(ionizationHistoryPart);
    const expansion = evaluation.once(expansionPart);
    const from = evaluation.once(lastScatteringPart);
    // d eta/(a n_e sigma_T) = (c/a H)^2 dt/(dtau/dt), with dtau/dt = c sigma_T n_e/H.
    const integrand = (t: number) => {
      const a = Math.exp(-t);
      const loading = depths.loading(t);
      const horizon = 1 / (a * expansion.rate(a));
      const mixing = (loading * loading + (16 / 15) * (1 + loading)) / (1 + loading) ** 2;
      return (horizon * horizon * mixing) / depths.rate(t);
    };
    const last = mesh[mesh.length - 1]!;
    let sum = 0;
    let start = from;
    for (let i = 0; i < mesh.length; i++) {
      const end = mesh[i]!;
      if (end <= start) continue;
      const half = (end - start) / 2;
      for (let node = 0; node < rule.nodes.length; node++) {
        sum += half * rule.weights[node]! * integrand((start + end) / 2 + half * rule.nodes[node]!);
      }
      start = end;
    }
    const breakpoints = secondHeliumStep
      .map((temperature) => Math.log(temperature / evaluation.model.photonTemperature))
      .filter((t) => t > start);
    sum += integrate(integrand, start, Math.max(start, last) + farEnough, { breakpoints, absolute: 1e-13 * sum }).value;
    return 1 / (unitHubbleDistance * Math.sqrt(sum / 6));
  },
};

/**
 * Damping wavenumber k_D at last scattering, 1/Mpc: photons diffuse out of waves shorter than this.
 *
 * k_D^-2 = (1/6) int_0^eta(z_*) d eta/(a n_e sigma_T) [R^2 + 16 (1+R)/15]/(1+R)^2, with He++ in Saha equilibrium early.
 *
 * The history is the full one under every convention; z_* is the one in force.
 *
 * Method: Gauss-Legendre nodes on the steps of the ionization history from z_* up, adaptive Gauss-Kronrod above it, split where
 * He++ recombines. Accuracy 5e-10.
 * Source: Kaiser 1983; Zaldarriaga & Harari 1995.
 * @example dampingWavenumber(evaluation) // 0.1409
 */
export function dampingWavenumber(evaluation: ModelEvaluation): number {
  return evaluation.once(dampingPart);
}

export const dampingWavenumberQuantity = historyQuantity({
  name: "dampingWavenumber",
  symbol: "k_D",
  unit: "1/Mpc",
  description: "Wavenumber of photon diffusion at last scattering",
  equation: String.raw`k_D^{-2} = \frac16 \int_0^{\eta_*} \frac{d\eta}{a\,n_e \sigma_T}\,\frac{R^2 + \frac{16}{15}(1+R)}{(1+R)^2}`,
  method: "quadrature on the steps of the ionization history, Saha equilibrium above",
  steps: ["lastScattering"],
  accuracy: 5e-10,
  sources: ["kaiser1983", "zaldarriagaHarari1995"],
  compute: dampingWavenumber,
});
