import { validatedRange } from "../../../cosmo/batch";
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

/**
 * Random models with most parameters at one end or the other of the validated range: what the engine takes at its worst.
 */
export function cornerModels(count: number, seed: number): ModelGivens[] {
  const random = generator(seed);
  const pick = ([low, high]: readonly [number, number]): number => {
    const place = random();
    const inside = low + (high - low) * random();
    // Just inside, so that rounding does not put the model out.
    const margin = 1e-9 * (high - low);
    return place < 0.4 ? low + margin : place < 0.8 ? high - margin : inside;
  };
  const range = validatedRange;
  return Array.from({ length: count }, () => {
    const baryonDensity = pick(range.baryonDensity);
    const matter = Math.max(pick(range.matter), baryonDensity + 0.02);
    const plain = random() < 0.3;
    const w0 = plain ? -1 : pick(range.w0);
    const wa = plain ? 0 : Math.min(pick(range.wa), range.earlyState[1] - 1e-6 - w0);
    const sum = pick(range.massSum);
    const splits = [[1], [0.5, 0.5], [1 / 3, 1 / 3, 1 / 3], [0.6, 0.3, 0.1]];
    return {
      hubble: 100 * pick(range.reducedHubble),
      baryonDensity,
      coldMatterDensity: matter - baryonDensity,
      curvature: pick(range.curvature),
      darkEnergy: { w0, wa },
      neutrinos: {
        effectiveNumber: pick(range.effectiveNumber),
        masses: splits[Math.floor(4 * random())]!.map((share) => share * sum),
      },
      photonTemperature: pick(range.photonTemperature),
      helium: pick(range.helium),
      recombination: random() < 0.3 ? ("peebles" as const) : ("calibrated" as const),
    };
  });
}
