import { type ClosedModel, type ModelGivens, modelFieldByName } from "../../../cosmo/model";
import { findQuantity, quantityRegister } from "../../../cosmo/quantities";
import { formatNumber, type Table, table } from "../../display";
import type { ChainCellOptions } from "../chainCell";
import type { ChainColumn } from "./chainCharts";
import type { ColumnPlan } from "./planColumns";

const where = "chainCell";

/** Symbol and unit of a column by its name; a name outside the vocabulary is its own symbol. */
export function labelOf(name: string): { symbol: string; unit: string } {
  const field = modelFieldByName.get(name);
  if (field !== undefined) return { symbol: field.symbol, unit: field.unit };
  const base = name.replace(/\(.*$/, "");
  if (!quantityRegister.has(base)) return { symbol: name, unit: "" };
  const quantity = findQuantity(base, where);
  const values = /\((.*)\)$/.exec(name)?.[1];
  if (values === undefined) return { symbol: quantity.symbol, unit: quantity.unit };
  return { symbol: `${quantity.symbol.replace(/\(.*\)$/, "")}(${values})`, unit: quantity.unit };
}

/** Digits down to a hundredth of the standard deviation. */
function digitsOf(value: number, deviation: number): string {
  if (!(deviation > 0) || value === 0) return formatNumber(value, { digits: value === 0 ? "all" : 8 });
  const digits = Math.ceil(Math.log10(Math.abs(value) / deviation)) + 2;
  return formatNumber(value, { digits: Math.max(2, Math.min(12, digits)) });
}

/** A row a column. */
export function summaryTable(columns: readonly ChainColumn[]): Table {
  return table({
    title: "Posterior",
    columns: [
      { key: "name", label: "column" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "unit", label: "unit", symbols: true },
      { key: "mean", label: "mean", align: "right" },
      { key: "deviation", label: "standard deviation", align: "right" },
      { key: "median", label: "median", align: "right" },
      { key: "interval68", label: "68% interval", align: "right" },
      { key: "interval95", label: "95% interval", align: "right" },
      { key: "effectiveSize", label: "effective samples", align: "right" },
    ],
    rows: columns.map(({ name, symbol, unit, summary }) => {
      const digits = (value: number): string => digitsOf(value, summary.deviation);
      const interval = ([low, high]: readonly [number, number]): string => `${digits(low)} to ${digits(high)}`;
      return {
        name,
        symbol,
        unit,
        mean: digits(summary.mean),
        deviation: formatNumber(summary.deviation, { digits: 3 }),
        median: digits(summary.median),
        interval68: interval(summary.interval68),
        interval95: interval(summary.interval95),
        effectiveSize: formatNumber(Math.round(summary.effectiveSize), { digits: "all" }),
      };
    }),
    notes: [
      "intervals are equal-tailed: 16% and 84%, 2.5% and 97.5% of the weight lie below their ends",
      "effective samples: so many independent ones would fix the mean as well (autocorrelation along the chain, and weights)",
    ],
  });
}

/** What the numbers came from. */
export function settingsTable(
  all: number,
  dropped: number,
  used: number,
  plan: ColumnPlan,
  options: ChainCellOptions,
  reached: string | undefined,
  model: ClosedModel | undefined,
): Table {
  const count = (value: number): string => formatNumber(value, { digits: "all" });
  const renamed = [...plan.columns]
    .filter(([column, name]) => column !== name)
    .map(([column, name]) => `${column} is ${name}`);
  const rows = [
    { what: "rows of the chain", value: count(all) },
    { what: "left out as burn-in", value: count(dropped) },
    { what: "summed up", value: count(used) },
    { what: "weights", value: plan.weights === undefined ? "none: all rows count the same" : `column ${plan.weights}` },
    ...(renamed.length === 0 ? [] : [{ what: "renamed", value: renamed.join(", ") }]),
    ...(reached === undefined ? [] : [{ what: "accuracy of the derived columns", value: reached }]),
    ...sharedRows(options.shared ?? {}),
  ];
  return table({
    title: "What was done",
    columns: [
      { key: "what", label: "what" },
      { key: "value", label: "value" },
    ],
    rows,
    notes: model === undefined ? [] : [conventionsOf(model)],
  });
}

function conventionsOf({ conventions, recombination }: ClosedModel): string {
  const { constants, closure, equalityMatter } = conventions;
  return `conventions: constants ${constants}, closure ${closure}, equalityMatter ${equalityMatter}, recombination ${recombination}`;
}

/** The shared givens and the conventions in force, so that the numbers can be had again. */
function sharedRows(shared: ModelGivens): { what: string; value: string }[] {
  const given: string[] = [];
  const walk = (prefix: string, object: object): void => {
    for (const [name, value] of Object.entries(object)) {
      if (typeof value === "object" && value !== null && !Array.isArray(value)) walk(`${prefix}${name}.`, value);
      else given.push(`${prefix}${name} = ${Array.isArray(value) ? value.join(";") : String(value)}`);
    }
  };
  walk("", shared);
  return [
    {
      what: "shared by all rows",
      value: given.length === 0 ? "the defaults" : `${given.join(", ")}; the rest by default`,
    },
  ];
}
