import { DomainError, UnknownNameError } from "../../../cosmo/errors";
import { type ColumnSummary, histogram, planeDensity, shownRange } from "../../chain";
import {
  type Chart,
  correlationChart,
  formatNumber,
  type HistogramPanel,
  histogramChart,
  type RegionPair,
  regionChart,
} from "../../display";

/** A column of a chain as the charts need it. */
export interface ChainColumn {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly values: Float64Array;
  readonly summary: ColumnSummary;
}

const where = "chainCell";
/** Bins before anything reaches a chart: the charts stay small whatever the number of rows. */
const bins = 28;
const planeBins = 56;
const mostRegions = 5;
const mostShown = 24;

/** The charts of a chain: regions of pairs, distributions, correlations. None of a column that does not vary. */
export function chainCharts(
  columns: readonly ChainColumn[],
  weights: Float64Array | undefined,
  matrix: readonly (readonly number[])[],
  derived: readonly string[],
  wanted: readonly string[] | undefined,
): Chart[] {
  if (columns.length === 0) return [];
  const shown = columns.slice(0, mostShown);
  const panels = new Map(shown.map((column) => [column.name, panelOf(column, weights)]));
  const charts: Chart[] = [];
  const chosen = regionColumns(shown, derived, wanted);
  if (chosen.length >= 2) charts.push(regions(chosen, panels, weights, matrix, columns));
  charts.push(
    histogramChart({
      title: "Distributions",
      description:
        "Weight over each column, the highest bin 1; darker inside the 68% interval, a dashed line at the mean.",
      panels: shown.map(({ name }) => panels.get(name)!),
    }),
  );
  if (shown.length >= 2) {
    charts.push(
      correlationChart({
        title: "Correlations",
        description: "Pearson's correlation of each pair of columns.",
        names: shown.map(({ symbol }) => symbol),
        matrix: matrix.slice(0, shown.length).map((row) => row.slice(0, shown.length)),
      }),
    );
  }
  return charts;
}

function panelOf({ symbol, unit, values, summary }: ChainColumn, weights: Float64Array | undefined): HistogramPanel {
  const range = shownRange(values, weights);
  return {
    axis: { label: "", symbol, unit },
    range,
    heights: histogram(values, weights, range, bins),
    middle: summary.mean,
    interval: summary.interval68,
  };
}

/** The columns asked for; else up to three derived ones, and parameters before them up to five. */
function regionColumns(
  columns: readonly ChainColumn[],
  derived: readonly string[],
  wanted: readonly string[] | undefined,
): readonly ChainColumn[] {
  if (wanted === undefined) {
    const added = columns.filter(({ name }) => derived.includes(name)).slice(0, 3);
    const others = columns.filter(({ name }) => !derived.includes(name)).slice(0, mostRegions - added.length);
    return [...others, ...added];
  }
  if (!(wanted.length >= 2 && wanted.length <= 6 && new Set(wanted).size === wanted.length)) {
    throw new DomainError({
      where,
      argument: "regions",
      rule: "must name two to six different columns",
      value: wanted,
    });
  }
  return wanted.map((name) => {
    const found = columns.find((column) => column.name === name);
    if (found === undefined) {
      throw new UnknownNameError({
        where: `${where}: regions`,
        kind: "column",
        given: name,
        known: columns.map((each) => each.name),
      });
    }
    return found;
  });
}

function regions(
  chosen: readonly ChainColumn[],
  panels: ReadonlyMap<string, HistogramPanel>,
  weights: Float64Array | undefined,
  matrix: readonly (readonly number[])[],
  all: readonly ChainColumn[],
): Chart {
  const pairs: RegionPair[] = [];
  const words: string[] = [];
  chosen.forEach((down, y) => {
    chosen.slice(0, y).forEach((along, x) => {
      const density = planeDensity(
        along.values,
        down.values,
        weights,
        [panels.get(along.name)!.range, panels.get(down.name)!.range],
        [along.summary.deviation, down.summary.deviation],
        Math.min(along.summary.effectiveSize, down.summary.effectiveSize),
        [0.68, 0.95],
        planeBins,
      );
      pairs.push({ x, y, bins: planeBins, cells: density.cells, levels: density.levels as [number, number] });
      const correlation = matrix[all.indexOf(along)]![all.indexOf(down)]!;
      words.push(`${along.name} and ${down.name}: correlation ${formatNumber(correlation, { digits: 2 })}`);
    });
  });
  return regionChart({
    title: "Regions of pairs",
    description: `The smallest regions with 68% and 95% of the weight, for pairs of ${chosen.map(({ name }) => name).join(", ")}; the distribution of each on the diagonal.`,
    panels: chosen.map(({ name }) => panels.get(name)!),
    pairs,
    names: ["68% of the weight", "95% of the weight"],
    words,
  });
}
