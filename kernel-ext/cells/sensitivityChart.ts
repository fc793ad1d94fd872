import { barChart, type Chart } from "../display";
import type { SensitivityColumn, SensitivityEntry } from "./sensitivityMatrix";

/** The matrix as bars: a panel a unit, each on a scale of its own. */
export function sensitivityChart(columns: readonly SensitivityColumn[], rows: readonly SensitivityEntry[][]): Chart {
  const logarithmic = columns.flatMap((column, i) => (column.logarithmic ? [i] : []));
  const others = columns.flatMap((column, i) => (column.logarithmic ? [] : [[i]]));
  const panels = [logarithmic, ...others]
    .filter((indices) => indices.length > 0)
    .flatMap((indices) =>
      [false, true].map((perUnit) => {
        const { logarithmic: ln, request, value } = columns[indices[0]!]!;
        const top = ln ? `d ln ${indices.length === 1 ? request.text : "quantity"}` : `d ${request.text}`;
        return {
          axis: { label: `${top} / d ${perUnit ? "" : "ln "}parameter`, ...(ln ? {} : { unit: value.unit }) },
          rows: rows
            .filter((row) => row[0]!.parameter.perUnit === perUnit)
            .map((row) => ({
              label: `${row[0]!.parameter.name} ${row[0]!.parameter.symbol}`.trim(),
              bars: indices.map((i) => ({ group: row[i]!.column.request.text, value: row[i]!.shown })),
            })),
        };
      }),
    )
    .filter((panel) => panel.rows.length > 0);
  const strongest = columns.map(({ request }, i) => {
    const row = rows.reduce((best, each) => (Math.abs(each[i]!.shown) > Math.abs(best[i]!.shown) ? each : best));
    return `${request.text} most by ${row[i]!.parameter.name}`;
  });
  return barChart({
    title: "Sensitivity",
    description: `Derivatives of ${columns.map(({ request }) => request.text).join(", ")} by each parameter, the others held, each panel on a scale of its own; ${strongest.join(", ")}.`,
    panels,
  });
}
