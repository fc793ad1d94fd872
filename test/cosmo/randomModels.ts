import fc from "fast-check";
import type { ModelGivens } from "../../cosmo/model";

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Models such as chains wander through: curvature, dark energy, neutrinos and both closures away from their defaults. */
export const chainModels: fc.Arbitrary<ModelGivens> = fc.record({
  hubble: between(50, 90),
  baryonDensity: between(0.018, 0.028),
  coldMatterDensity: between(0.09, 0.16),
  curvature: between(-0.06, 0.06),
  darkEnergy: fc.record({ w0: between(-1.3, -0.65), wa: between(-0.6, 0.3) }),
  neutrinos: fc.record({ effectiveNumber: between(2.7, 3.6), masses: fc.array(between(0, 0.6), { maxLength: 3 }) }),
  conventions: fc.record({ closure: fc.constantFrom("radiationInside" as const, "radiationOnTop" as const) }),
});

/** Redshifts that surveys and the background reach. */
export const pastRedshifts = between(0.01, 1100);
