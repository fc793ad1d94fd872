import type { ModelGivens } from "../../cosmo/model";
import { evaluateModel } from "../../cosmo/solve";
import { type CellResult, cellOutput, formatWithError, intervalChart, table } from "../display";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";

/** What the next cell gets. */
export interface PeakValues {
  /** l_1, l_2, l_3. */
  peakMultipole: [number, number, number];
  /** (l_3 - l_1)/2. */
  peakSpacing: number;
  /** H_2 and H_3: heights over that of the first peak. */
  peakHeightRatio: [number, number];
  /** l_A, the spacing of the peaks far out. */
  acousticMultipole: number;
}

/**
 * Peaks of the measured temperature spectrum with 68% errors: Planck 2018 I, A&A 641, A1, arXiv:1807.06205, table of peaks and troughs
 * (memory).
 */
const measuredPeaks = [
  { multipole: 220.6, error: 0.6 },
  { multipole: 538.1, error: 1.3 },
  { multipole: 809.8, error: 1.0 },
] as const;

/** How near the fits come to the measured peaks at Planck's parameters, relative: see the notes of peakMultipole. */
const positionAccuracy = 0.006;

const measuredSource = {
  key: "planck2018Overview",
  citation: "Planck Collaboration I 2020, A&A 641, A1, arXiv:1807.06205 (digits from memory)",
};

/**
 * The acoustic peaks of the temperature spectrum by the published fits, beside their measured positions.
 *
 * l_m = l_A (m - phi_m), phi_m by Doran & Lilley 2002; heights H_2, H_3 over the first peak by Hu et al. 2001, in omega_b, omega_m and n_s.
 *
 * @param model the model, see ModelGivens; `scalarSpectralIndex` is read here alone.
 * Errors: a model without baryons, without radiation, or without a Big Bang.
 * @returns `values.peakMultipole` (l_1 to l_3), `values.peakSpacing`, `values.peakHeightRatio` (H_2, H_3), `values.acousticMultipole`.
 * Accuracy: that of the fits, 0.6% in position and 3% in height near Planck's parameters; l_A 1e-10. The spectrum is not computed.
 * Sources: Hu, Fukugita, Zaldarriaga & Tegmark 2001; Doran & Lilley 2002 (memory).
 * @example peakCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.peakMultipole[0] // 221
 */
export function peakCell(model: ModelGivens): CellResult<PeakValues> {
  const where = "peakCell";
  const numbers = evaluateModel(compileModel(model, where), { where });
  const peaks = [1, 2, 3].map((m) => numbers.quantity("peakMultipole", m));
  const spacing = numbers.quantity("peakSpacing");
  const heights = [2, 3].map((m) => numbers.quantity("peakHeightRatio", m));
  const scale = numbers.quantity("acousticMultipole");
  const everything = [...peaks, spacing, ...heights, scale];
  const index = numbers.model.scalarSpectralIndex;

  const pairs = measuredPeaks.map(({ multipole, error }, i) => ({
    peak: i + 1,
    value: peaks[i]!.value,
    multipole,
    error,
  }));
  const [first, , third] = measuredPeaks;
  const measuredSpacing = (third.multipole - first.multipole) / 2;
  const spacingError = Math.hypot(third.error, first.error) / 2;
  const beside = table({
    title: "Beside the measured positions (Planck 2018 I, 68% errors, from memory)",
    columns: [
      { key: "peak", label: "peak", symbols: true },
      { key: "model", label: "this model, by the fits", digits: 5 },
      { key: "measured", label: "measured", align: "right" },
      { key: "difference", label: "difference", unit: "%", digits: 2 },
    ],
    rows: [
      ...pairs.map(({ peak, value, multipole, error }) => ({
        peak: `l_${peak}`,
        model: value,
        measured: `${multipole.toFixed(1)} ± ${error.toFixed(1)}`,
        difference: 100 * (value / multipole - 1),
      })),
      {
        peak: "(l_3 − l_1)/2",
        model: spacing.value,
        measured: formatWithError(measuredSpacing, spacingError),
        difference: 100 * (spacing.value / measuredSpacing - 1),
      },
    ],
    notes: [
      `the fits are good to ${100 * positionAccuracy}% in position, so a difference of that size says nothing of the model`,
      "the measured spacing follows from the positions, their errors taken as independent",
    ],
  });
  const chart = intervalChart({
    title: "Acoustic peaks beside the measured ones",
    description: `Peaks at l = ${pairs.map(({ value }) => value.toFixed(1)).join(", ")} by the published fits, beside those measured at ${measuredPeaks.map(({ multipole }) => multipole).join(", ")} (Planck 2018 I, 68% errors, from memory).`,
    panels: pairs.map(({ peak, value, multipole, error }) => ({
      axis: { label: `multipole of peak ${peak}`, symbol: `l_${peak}` },
      rows: [
        {
          label: "this model, by the fits",
          value,
          error: positionAccuracy * value,
          group: "fits",
          text: `${value.toFixed(1)}, good to ${100 * positionAccuracy}%`,
        },
        {
          label: "measured",
          value: multipole,
          error,
          group: "measured",
          text: `${multipole.toFixed(1)} ± ${error.toFixed(1)}`,
        },
      ],
    })),
  });
  return cellOutput({
    title: "Acoustic peaks",
    summary: `l_1 = ${pairs[0]!.value.toFixed(1)}, l_2 = ${pairs[1]!.value.toFixed(1)}, l_3 = ${pairs[2]!.value.toFixed(1)}, by published fits.`,
    tables: [
      quantityTable("Positions, spacing and heights of the peaks", everything, [
        `spectral index n_s = ${index}${numbers.model.givens.scalarSpectralIndex === undefined ? " (default)" : ""}`,
        "the numerical error is that of evaluating the fits, not theirs",
      ]),
      beside,
      modelTable(numbers.model),
    ],
    charts: [chart],
    notes: [...notesOf(everything), "the peaks come from fitting formulas; the spectrum itself is not computed"],
    sources: [...sourcesOf(everything), measuredSource],
    values: {
      peakMultipole: [peaks[0]!.value, peaks[1]!.value, peaks[2]!.value],
      peakSpacing: spacing.value,
      peakHeightRatio: [heights[0]!.value, heights[1]!.value],
      acousticMultipole: scale.value,
    },
  });
}
