import type { ModelEvaluation, ModelQuantity } from "../expansion";
import { fitNotes, type PublishedFit, peakPhase, radiationToMatterAt } from "../fits";
import { historyQuantity, lastScatteringRedshift, throughLastScattering } from "../lastScattering";
import type { QuantityArgument } from "../quantity";
import { acousticMultipole } from "./acousticMultipole";
import { earlyDarkEnergy } from "./earlyDarkEnergy";

/** The phases' fit; the measured positions of Planck 2018 I are met to 0.6%. */
export const peakPhaseFit: PublishedFit = {
  source: "doranLilley2002",
  label: "Doran & Lilley 2002",
  statement: "phases of the first three peaks; no domain seen, 0.6% from the measured peaks near Planck's parameters",
  limits: [],
};

/**
 * Multipole of an acoustic peak of the temperature spectrum.
 *
 * l_m = l_A (m - phi_m), phi_m by the fit of Doran & Lilley 2002, l_A and z_* of the model.
 *
 * @param peak m: 1, 2 or 3. Accuracy of the fit: 0.6% at the measured peaks; of l_A 1e-10.
 * Source: Hu, Fukugita, Zaldarriaga & Tegmark 2001; Doran & Lilley 2002.
 * @example peakMultipole(evaluation, 1) // 220.7
 */
export function peakMultipole(evaluation: ModelEvaluation, peak: number): number {
  const { model } = evaluation;
  const phase = peakPhase(peak, {
    baryonDensity: model.baryonDensity,
    ratio: radiationToMatterAt(model.matterDensity, lastScatteringRedshift(evaluation)),
    spectralIndex: model.scalarSpectralIndex,
    earlyDarkEnergy: earlyDarkEnergy(evaluation),
  });
  return acousticMultipole(evaluation) * (peak - phase);
}

/**
 * Mean spacing of the first three acoustic peaks in multipole: (l_3 - l_1)/2.
 *
 * Higher peaks stand l_A apart. Accuracy and source as {@link peakMultipole}.
 * @example peakSpacing(evaluation) // 296.7
 */
export function peakSpacing(evaluation: ModelEvaluation): number {
  return (peakMultipole(evaluation, 3) - peakMultipole(evaluation, 1)) / 2;
}

const peakArgument: QuantityArgument = {
  name: "peak",
  symbol: "m",
  unit: "",
  rule: "must be 1, 2 or 3",
  accepts: (value) => value === 1 || value === 2 || value === 3,
};

const shared = {
  unit: "",
  method: "l_A of the model, phases by a published fit",
  methodBesideFits: "l_A of the model, phases by the fit of Doran & Lilley 2002",
  steps: ["lastScattering", "soundHorizon"] as const,
  needsHistory: throughLastScattering,
  accuracy: 1e-10,
  sources: ["doranLilley2002", "hu2001"] as const,
};

/** The phases' fit is one under every convention. */
const withPhaseNote = (quantity: ModelQuantity): ModelQuantity => ({
  ...quantity,
  notes: (evaluation, values) => [...fitNotes(peakPhaseFit, evaluation.model), ...quantity.notes!(evaluation, values)],
});

export const peakMultipoleQuantity = withPhaseNote(
  historyQuantity({
    ...shared,
    name: "peakMultipole",
    symbol: "l_m",
    arguments: [peakArgument],
    description: "Multipole of an acoustic peak of the temperature spectrum",
    equation: String.raw`\ell_m = \ell_A\,(m - \varphi_m)`,
    compute: (evaluation, [peak]) => peakMultipole(evaluation, peak!),
  }),
);

export const peakSpacingQuantity = withPhaseNote(
  historyQuantity({
    ...shared,
    name: "peakSpacing",
    symbol: "Δl",
    description: "Mean spacing of the first three acoustic peaks in multipole",
    equation: String.raw`\Delta\ell = \tfrac12(\ell_3 - \ell_1)`,
    compute: peakSpacing,
  }),
);
