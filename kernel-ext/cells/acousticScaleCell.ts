import type { ModelGivens } from "../../cosmo/model";
import { planck2018Table2 } from "../../cosmo/published";
import { evaluateModel } from "../../cosmo/solve";
import { citation } from "../../cosmo/sources";
import { type CellResult, cellOutput, intervalChart, table } from "../display";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { namedQuantities } from "./namedQuantities";
import { notesOf, quantityTable, sourcesOf } from "./quantityTable";

const names = [
  "acousticAngle",
  "acousticMultipole",
  "shiftParameter",
  "lastScatteringRedshift",
  "lastScatteringSoundHorizon",
  "dampingWavenumber",
  "dampingAngle",
  "equalityRedshift",
  "equalityWavenumber",
  "equalitySoundAngle",
] as const;

/** What the next cell gets: plain numbers by the vocabulary's names, and D_M(z_*). */
export type AcousticScaleValues = { [name in (typeof names)[number]]: number } & {
  /** D_M(z_*), Mpc. */
  transverseDistance: number;
};

/** The printed quantities shown beside the model's own. */
const compared = ["acousticAngle", "lastScatteringSoundHorizon", "lastScatteringRedshift", "dragSoundHorizon"] as const;

/**
 * The acoustic scale: theta_*, l_A and the shift parameter, beside what Planck 2018 printed with its errors.
 *
 * theta_* = r_s(z_*)/D_M(z_*); l_A = pi/theta_*; R = sqrt(Omega_m) (H0/c) D_M(z_*). z_* from the full computation.
 *
 * @param model the model, see ModelGivens; `recombination` chooses the tier.
 * Errors: a model without baryons, without radiation, or without a Big Bang.
 * Accuracy 1e-7. Sources: Planck 2018 VI; Bond, Efstathiou & Tegmark 1997. theta_* alone is no inference: that needs the full
 * spectrum of perturbations, which this program does not compute.
 * @example acousticScaleCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).values.acousticAngle // 1.04
 */
export function acousticScaleCell(model: ModelGivens): CellResult<AcousticScaleValues> {
  const where = "acousticScaleCell";
  const numbers = evaluateModel(compileModel(model, where), { where });
  const { list, values } = namedQuantities(numbers, names);
  const distance = numbers.quantity("transverseDistance", values.lastScatteringRedshift);
  const everything = [...list, distance];

  const ownValues = compared.map((name) => numbers.quantity(name));
  const columns = planck2018Table2;
  const pulls = table({
    title: "Beside Planck 2018 VI, table 2 (means and 68% errors)",
    columns: [
      { key: "column", label: "column" },
      ...ownValues.map((each) => ({
        key: each.name,
        label: "",
        symbol: each.symbol,
        unit: each.unit,
        align: "right" as const,
      })),
    ],
    rows: [
      {
        column: "this model",
        ...Object.fromEntries(ownValues.map((each) => [each.name, each.value.toPrecision(7)])),
      },
      ...columns.map((column) => ({
        column: column.name,
        ...Object.fromEntries(
          compared.map((name) => {
            const printed = column.numbers[name]!;
            const symmetric = printed.upper === printed.lower;
            const places = printed.digits.split(".")[1]?.length ?? 0;
            const [upper, lower] = [printed.upper!.toFixed(places), printed.lower!.toFixed(places)];
            const error = symmetric ? `± ${upper}` : `+${upper} −${lower}`;
            return [name, `${printed.digits} ${error}`];
          }),
        ),
      })),
    ],
    notes: ["the printed means belong to the parameters of their own columns, not to this model"],
  });
  const panels = (["acousticAngle", "acousticMultipole"] as const).map((name) => {
    const own = list.find((each) => each.name === name)!;
    return {
      axis: { label: "", symbol: own.symbol, unit: own.unit },
      rows: [
        { label: "this model", value: own.value, group: "computed", text: own.value.toPrecision(7) },
        ...columns.map((column) => {
          const printed = column.numbers["acousticAngle"]!;
          const angle = Number(printed.digits);
          const error = Math.max(printed.upper!, printed.lower!);
          const toMultipole = (100 * Math.PI) / angle;
          return name === "acousticAngle"
            ? { label: column.name, value: angle, error, group: "printed" }
            : { label: column.name, value: toMultipole, error: (toMultipole * error) / angle, group: "printed" };
        }),
      ],
    };
  });
  return cellOutput({
    title: "Acoustic scale",
    summary: `100 θ_* = ${values.acousticAngle.toPrecision(7)}, l_A = ${values.acousticMultipole.toPrecision(7)}`,
    tables: [quantityTable("The acoustic scale", everything), pulls, modelTable(numbers.model)],
    charts: [
      intervalChart({
        title: "Acoustic scale beside Planck 2018",
        description: `100 theta_* = ${values.acousticAngle.toPrecision(7)} and l_A = ${values.acousticMultipole.toPrecision(7)} of this model beside the printed means of Planck 2018 VI table 2 with 68% errors; l_A there is pi over the printed theta_*.`,
        panels,
      }),
    ],
    notes: [
      ...notesOf(everything),
      "parameter inference needs the full perturbation spectrum, which this program does not compute",
    ],
    sources: [...sourcesOf(everything), { key: "planck2018Parameters", citation: citation("planck2018Parameters") }],
    values: { ...values, transverseDistance: distance.value },
  });
}
