import type { ModelGivens } from "../../cosmo/model";
import { evaluateModel } from "../../cosmo/solve";
import { type CellResult, cellOutput, lineChart } from "../display";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { namedQuantities } from "./namedQuantities";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";
import { spacedRedshifts } from "./redshiftList";

/** What the next cell gets: plain numbers, and r_s on a grid. */
export interface SoundHorizonValues {
  lastScatteringRedshift: number;
  lastScatteringSoundHorizon: number;
  dragRedshift: number;
  dragSoundHorizon: number;
  dragSoundHorizonTimesReducedHubble: number;
  dampingWavenumber: number;
  redshift: Float64Array;
  /** r_s(z), Mpc. */
  soundHorizon: Float64Array;
}

/**
 * How far sound went before the photons and the baryons let go: r_* and r_drag, and the growth of the sound horizon to them.
 *
 * r_s(z) = int_0^a c_s da/(a^2 H), c_s = c/sqrt[3 (1 + R)], in comoving Mpc.
 *
 * @param model the model, see ModelGivens; `recombination` chooses the tier.
 * Errors: a model without baryons, without radiation, or without a Big Bang.
 * Accuracy 1e-7. Sources: Hu & Sugiyama 1996; Eisenstein & Hu 1998.
 * @example soundHorizonCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.dragSoundHorizon // 147
 */
export function soundHorizonCell(model: ModelGivens): CellResult<SoundHorizonValues> {
  const where = "soundHorizonCell";
  const numbers = evaluateModel(compileModel(model, where), { where });
  const { list, values } = namedQuantities(numbers, [
    "lastScatteringRedshift",
    "lastScatteringSoundHorizon",
    "dragRedshift",
    "dragSoundHorizon",
    "dragSoundHorizonTimesReducedHubble",
    "dampingWavenumber",
  ] as const);
  const speed = numbers.quantity("soundSpeed", values.lastScatteringRedshift);
  const loading = numbers.quantity("baryonLoading", values.lastScatteringRedshift);
  // A little past the later of the two, so that their marks stand inside the plot.
  const end = 0.8 * Math.min(values.dragRedshift, values.lastScatteringRedshift);
  const grid = Float64Array.from(spacedRedshifts(end, 1e5, 200, "onePlusRedshift"));
  const horizon = grid.map((z) => numbers.value("soundHorizon", z));
  const everything = [...list, speed, loading];
  return cellOutput({
    title: "Sound horizon",
    tables: [quantityTable("The acoustic ruler", everything), modelTable(numbers.model)],
    charts: [
      lineChart({
        title: "Growth of the sound horizon",
        description: `Comoving sound horizon from z = 100000 past the drag epoch; r_* = ${values.lastScatteringSoundHorizon.toFixed(2)} Mpc at z_*, r_drag = ${values.dragSoundHorizon.toFixed(2)} Mpc at z_drag. Time runs to the right.`,
        x: { label: "redshift", symbol: "z", scale: "onePlusRedshift", reverse: true },
        y: { label: "comoving sound horizon", symbol: "r_s", unit: "Mpc" },
        series: [{ label: "r_s(z)", x: grid, y: horizon }],
        points: [
          { label: "r_*", x: [values.lastScatteringRedshift], y: [values.lastScatteringSoundHorizon] },
          { label: "r_drag", x: [values.dragRedshift], y: [values.dragSoundHorizon] },
        ],
      }),
    ],
    notes: notesOf(everything),
    sources: sourcesOf(everything),
    values: { ...values, redshift: grid, soundHorizon: horizon },
  });
}
