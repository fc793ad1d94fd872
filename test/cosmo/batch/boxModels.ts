import { type ConstantsSetName, constantsSets } from "../../../cosmo/constants";
import type { ModelGivens } from "../../../cosmo/model";

/** Numerical Recipes' linear congruence: the same models in every run (Press et al. 1992, section 7.1; constants from memory). */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/**
 * Random models over what the batch engine promises: omega_b 0.015 to 0.035, omega_c 0.06 to 0.25, curvature -0.2 to 0.2, up to three
 * masses to 2 eV, N_eff 1.5 to 5, w0 and wa, T_cmb 2.5 to 2.9 K, both closures, all sets of constants, both tiers.
 */
export function boxModels(count: number, seed: number): ModelGivens[] {
  const random = generator(seed);
  const between = (low: number, high: number) => low + (high - low) * random();
  const sets = Object.keys(constantsSets) as ConstantsSetName[];
  return Array.from({ length: count }, () => ({
    hubble: between(50, 90),
    baryonDensity: between(0.015, 0.035),
    coldMatterDensity: between(0.06, 0.25),
    curvature: random() < 0.3 ? 0 : between(-0.2, 0.2),
    darkEnergy: random() < 0.3 ? {} : { w0: between(-1.3, -0.65), wa: between(-0.6, 0.3) },
    neutrinos: {
      effectiveNumber: between(1.5, 5),
      // Half of them light, some massless.
      masses: Array.from({ length: Math.floor(4 * random()) }, () =>
        random() < 0.1 ? 0 : between(0, random() < 0.5 ? 0.2 : 2),
      ),
    },
    photonTemperature: random() < 0.3 ? 2.7255 : between(2.5, 2.9),
    recombination: random() < 0.25 ? ("peebles" as const) : ("calibrated" as const),
    conventions: {
      constants: sets[Math.floor(4 * random())]!,
      closure: random() < 0.3 ? ("radiationOnTop" as const) : ("radiationInside" as const),
      equalityMatter: random() < 0.3 ? ("allMatter" as const) : ("baryonsAndCold" as const),
    },
  }));
}
