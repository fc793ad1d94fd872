/**
 * Relative bounds: [bound, largest relative difference measured]. SHOW_MEASURED=1 vitest run test/reference/formulas.test.ts
 * prints what is measured now.
 */
const commonBound: readonly [bound: number, measured: number] = [2e-14, 2.6e-15];
export const widerBounds: Readonly<Record<string, readonly [bound: number, measured: number]>> = {
  // An exponential of -70 to -260 multiplies the rounding of its exponent.
  excitedIonizationOverRecombination: [1e-13, 1e-14],
  groundIonizationOverRecombination: [5e-13, 5.4e-14],
  heliumLogitRate: [5e-13, 4.6e-14],
  heliumWithHydrogen: [1e-13, 1.3e-14],
  // 1 + tanh of nearly -1.
  reionizationProfile: [5e-13, 4.2e-14],
  // Passes through zero at 4500 K.
  "sahaLogarithms.helium": [1e-12, 7.6e-14],
  // The lightest mass near an ordering's least sum.
  neutrinoMassesFromSum: [2e-13, 1.3e-14],
  // The share of dark energy before last scattering, which the reference leaves out.
  "ofReferenceModel.peakMultipole": [2e-9, 1.9e-10],
  "ofReferenceModel.peakSpacing": [2e-10, 2.5e-11],
  // 10 - 9.97 r^e.
  peakPhase: [1e-13, 8.8e-15],
};

/** The bound of a file of formulas/. */
export function formulaBound(name: string): number {
  return (widerBounds[name] ?? commonBound)[0];
}
