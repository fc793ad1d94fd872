import { DomainError } from "../../cosmo/errors";
import type { ModelGivens } from "../../cosmo/model";
import { findQuantity } from "../../cosmo/quantities";
import { checkArguments, type QuantityValue } from "../../cosmo/quantity";
import { evaluateModel } from "../../cosmo/solve";
import {
  type CellResult,
  type Chart,
  cellOutput,
  type LineSeries,
  lineChart,
  type PointSeries,
  table,
} from "../display";
import { checkOptions } from "./checkOptions";
import { compileModel } from "./compileModel";
import { modelTable } from "./modelTable";
import { notesOf, sourcesOf } from "./quantityTable";
import { type RedshiftList, redshiftList, spacedRedshifts } from "./redshiftList";

/** Options of {@link distanceCell}. */
export interface DistanceCellOptions {
  /** The redshifts of the rows: the survey's bins, say. */
  redshifts: RedshiftList;
  /** Quantities of z by name, a column each. */
  quantities?: readonly string[];
}

/** What the next cell gets: the redshifts and one array a quantity, by the vocabulary's names. */
export type DistanceValues = { redshift: Float64Array } & { [quantity: string]: Float64Array };

const defaultQuantities = [
  "hubbleRate",
  "comovingDistance",
  "transverseDistance",
  "angularDiameterDistance",
  "luminosityDistance",
  "volumeDistance",
  "lookbackTime",
];

/**
 * Distances and times at a list of redshifts: one row a redshift, one column a quantity, and the distances as curves.
 *
 * @param model the model, see ModelGivens; @param options `redshifts` (above -1), `quantities` (names of quantities of z;
 * by default H, D_C, D_M, D_A, D_L, D_V in Mpc and km/s/Mpc, and the lookback time in Gyr).
 * Errors: an unknown name, or a redshift outside a quantity's domain, named with its place in the list.
 * @returns `values.redshift` and `values.<quantity>`, typed arrays for the next cell.
 * Accuracy 1e-12. Source: Hogg 1999.
 * @example distanceCell({ hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }, { redshifts: [0.3, 0.5, 1.1] })
 */
export function distanceCell(model: ModelGivens, options: DistanceCellOptions): CellResult<DistanceValues> {
  const where = "distanceCell";
  checkOptions(options, ["redshifts", "quantities"], where);
  const numbers = evaluateModel(compileModel(model, where), { where });
  const redshifts = redshiftList(options?.redshifts, where);
  const names = options.quantities ?? defaultQuantities;
  if (names.length === 0) {
    throw new DomainError({ where, argument: "quantities", rule: "must name at least one quantity", value: names });
  }
  const definitions = names.map((name) => {
    const definition = findQuantity(name, where);
    if (definition.arguments.length !== 1 || definition.arguments[0]!.name !== "z") {
      throw new DomainError({ where, argument: "quantities", rule: "must be quantities of a redshift z", value: name });
    }
    return definition;
  });
  // Every row is checked before anything is computed: a bad last redshift should not cost the first ones.
  redshifts.forEach((z, row) => {
    for (const definition of definitions) checkArguments(definition, [z], `entry ${row + 1} of redshifts`);
  });

  const columns = definitions.map((definition) =>
    Array.from(redshifts, (z, row) => {
      try {
        return numbers.quantity(definition.name, z);
      } catch (failure) {
        if (failure instanceof Error) failure.message += ` (entry ${row + 1} of redshifts)`;
        throw failure;
      }
    }),
  );
  const everything = columns.flat();
  const values = { redshift: redshifts } as DistanceValues;
  definitions.forEach((definition, i) => {
    values[definition.name] = Float64Array.from(columns[i]!, (each) => each.value);
  });

  const rows = Array.from(redshifts, (z, row) => {
    const cells: Record<string, number> = { redshift: z };
    definitions.forEach((definition, i) => {
      cells[definition.name] = columns[i]![row]!.value;
    });
    return cells;
  });
  const result = table({
    title: "Distances and times",
    columns: [
      { key: "redshift", label: "", symbol: "z", digits: "all" },
      ...definitions.map((definition) => ({
        key: definition.name,
        label: "",
        symbol: definition.symbol,
        unit: definition.unit,
        digits: 8,
      })),
    ],
    rows,
    notes: [
      `numerical error at most ${largestRelativeError(everything).toExponential(0)} of each value`,
      definitions.map((definition) => `${definition.symbol}: ${definition.description}`).join("; "),
    ],
  });
  const charts = distanceChart(numbers, redshifts, columns);
  return cellOutput({
    title: `Distances at ${redshifts.length} redshift${redshifts.length === 1 ? "" : "s"}`,
    tables: [result, modelTable(numbers.model)],
    charts,
    notes: notesOf(everything),
    sources: sourcesOf(everything),
    values,
  });
}

function largestRelativeError(values: readonly QuantityValue[]): number {
  return Math.max(...values.map((each) => (each.value === 0 ? 0 : each.error / Math.abs(each.value))), 1e-16);
}

/** Curves of the columns in Mpc, with the asked redshifts as points on them; none where no column is a distance. */
function distanceChart(
  numbers: ReturnType<typeof evaluateModel>,
  redshifts: Float64Array,
  columns: readonly (readonly QuantityValue[])[],
): Chart[] {
  const distances = columns.filter((column) => column[0]!.unit === "Mpc");
  if (distances.length === 0) return [];
  const highest = Math.max(...redshifts);
  const lowest = Math.min(0, ...redshifts);
  const wide = highest > 10;
  const end = highest + (wide ? 0 : 0.05 * (highest - lowest));
  const grid = end > lowest ? spacedRedshifts(lowest, end, 120, wide ? "onePlusRedshift" : "linear") : [lowest];
  const drawable = grid.filter(
    (z) => (!wide || z > 0) && distances.every((column) => computable(numbers, column[0]!.name, z)),
  );
  if (drawable.length < 2) return [];
  // D_M of a flat model lies on D_C: one curve, named for both.
  const shown = distances.filter(
    (column, i) =>
      !distances.slice(0, i).some((before) => before.every((each, row) => each.value === column[row]!.value)),
  );
  const labelOf = (column: readonly QuantityValue[]) =>
    distances
      .filter((each) => each.every((value, row) => value.value === column[row]!.value))
      .map((each) => each[0]!.symbol)
      .join(" = ");
  const series: LineSeries[] = shown.map((column) => ({
    label: labelOf(column),
    x: drawable,
    y: drawable.map((z) => numbers.value(column[0]!.name, z)),
  }));
  const points: PointSeries[] = shown.map((column) => {
    const kept = Array.from(redshifts.keys()).filter((row) => !wide || column[row]!.value > 0);
    return { label: labelOf(column), x: kept.map((row) => redshifts[row]!), y: kept.map((row) => column[row]!.value) };
  });
  return [
    lineChart({
      title: "Distances over redshift",
      description: `${shown.map(labelOf).join(", ")} in Mpc from z = ${lowest} to ${Number(end.toPrecision(3))}, the asked redshifts marked.`,
      x: { label: "redshift", symbol: "z", scale: wide ? "onePlusRedshift" : "linear" },
      // Far out D_L would flatten everything else.
      y: { label: "distance", unit: "Mpc", scale: wide ? "log" : "linear" },
      series,
      points,
    }),
  ];
}

function computable(numbers: ReturnType<typeof evaluateModel>, name: string, z: number): boolean {
  try {
    numbers.value(name, z);
    return true;
  } catch {
    return false;
  }
}
