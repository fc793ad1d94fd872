import { visibilityHalfHeights } from "../../cosmo/lastScattering";
import type { ModelGivens } from "../../cosmo/model";
import { evaluateModel } from "../../cosmo/solve";
import { type CellResult, cellOutput, lineChart } from "../display";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { namedQuantities } from "./namedQuantities";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";
import { spacedRedshifts } from "./redshiftList";

/** What the next cell gets: plain numbers, and the visibility function on a grid. */
export interface LastScatteringValues {
  lastScatteringRedshift: number;
  visibilityPeakRedshift: number;
  visibilityWidth: number;
  visibilityMedianRedshift: number;
  dragRedshift: number;
  /** T_r(z_*), K. */
  radiationTemperature: number;
  /** t(z_*), Gyr. */
  ageAt: number;
  redshift: Float64Array;
  /** g(z), per unit z. */
  visibility: Float64Array;
}

/**
 * When the photons last scattered: z_*, the visibility function with its peak, width and median, and the drag epoch.
 *
 * tau(z_*) = 1; g(z) = (dtau/dz) e^-tau, reionization excluded.
 *
 * @param model the model, see ModelGivens; `recombination` chooses the tier.
 * Errors: a model without baryons, without radiation, or without a Big Bang.
 * Accuracy 1e-7. Sources: Hu & Sugiyama 1996; Planck 2018 VI.
 * @example lastScatteringCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.lastScatteringRedshift
 */
export function lastScatteringCell(model: ModelGivens): CellResult<LastScatteringValues> {
  const where = "lastScatteringCell";
  const numbers = evaluateModel(compileModel(model, where), { where });
  const { list, values } = namedQuantities(numbers, [
    "lastScatteringRedshift",
    "visibilityPeakRedshift",
    "visibilityMedianRedshift",
    "visibilityWidth",
    "dragRedshift",
  ] as const);
  const z = values.lastScatteringRedshift;
  const temperature = numbers.quantity("radiationTemperature", z);
  const age = numbers.quantity("ageAt", z);
  const { low, high } = visibilityHalfHeights(numbers.evaluation);
  const spread = high - low;
  const grid = Float64Array.from(spacedRedshifts(Math.max(0, low - 1.5 * spread), high + 2 * spread, 300, "linear"));
  const visibility = grid.map((each) => numbers.value("visibility", each));
  const everything = [...list, temperature, age];
  return cellOutput({
    title: "Last scattering",
    tables: [quantityTable("When the photons last scattered", everything), modelTable(numbers.model)],
    charts: [
      lineChart({
        title: "Visibility function",
        description: `Density of last scatterings per unit redshift, peak at z = ${values.visibilityPeakRedshift.toFixed(1)}, full width at half maximum ${spread.toFixed(1)}; z_* = ${z.toFixed(2)} marked.`,
        x: { label: "redshift", symbol: "z" },
        y: { label: "visibility per unit redshift", symbol: "g" },
        series: [{ label: "g(z)", x: grid, y: visibility }],
        rules: [
          { axis: "x", at: z, label: "z_*" },
          { axis: "x", at: values.dragRedshift, label: "z_drag" },
        ],
        bands: [{ axis: "x", from: low, to: high, label: "half maximum" }],
      }),
    ],
    notes: notesOf(everything),
    sources: sourcesOf(everything),
    values: {
      ...values,
      radiationTemperature: temperature.value,
      ageAt: age.value,
      redshift: grid,
      visibility,
    },
  });
}
