import type { QuantityValue } from "../../cosmo/quantity";
import { citation } from "../../cosmo/sources";
import { formatNumber, type SourceLine, type Table, type TableRow, table } from "../display";

/** Digits shown of a quantity: what a paper would print and two more, all of them computed. */
const shownDigits = 8;

/**
 * A table of named numbers: quantity, symbol, value, unit, numerical error.
 *
 * Values stand at eight significant digits, fewer where the numerical error reaches further; with a column of uncertainties where
 * the model states errors of its givens.
 */
export function quantityTable(title: string, values: readonly QuantityValue[], notes: readonly string[] = []): Table {
  const uncertain = values.some((each) => each.uncertainty !== undefined);
  const rows: TableRow[] = values.map((each) => ({
    quantity: describe(each),
    symbol: each.symbol,
    value: roundedToError(each),
    unit: each.unit,
    uncertainty: uncertaintyText(each),
    error: each.error,
  }));
  return table({
    title,
    columns: [
      { key: "quantity", label: "quantity" },
      { key: "symbol", label: "symbol", symbols: true },
      { key: "value", label: "value", digits: shownDigits },
      ...(uncertain ? [{ key: "uncertainty", label: "uncertainty (68%)" }] : []),
      { key: "unit", label: "unit", symbols: true },
      { key: "error", label: "numerical error", digits: 1 },
    ],
    rows,
    notes,
  });
}

/** What the errors of the givens make of the number, two digits each side. */
function uncertaintyText({ uncertainty }: QuantityValue): string {
  if (uncertainty === undefined) return "";
  const [upper, lower] = [
    formatNumber(uncertainty.upper, { digits: 2 }),
    formatNumber(uncertainty.lower, { digits: 2 }),
  ];
  return upper === lower ? `± ${upper}` : `+${upper} −${lower}`;
}

function describe(each: QuantityValue): string {
  if (each.arguments.length === 0) return each.name;
  return `${each.name}(${each.arguments.map((value) => formatNumber(Number(value.toPrecision(shownDigits)))).join(", ")})`;
}

/** No digit is shown that the numerical error does not vouch for. */
function roundedToError(each: QuantityValue): number {
  if (each.value === 0 || each.error === 0) return each.value;
  const certain = Math.floor(Math.log10(Math.abs(each.value) / each.error));
  return Number(each.value.toPrecision(Math.max(1, Math.min(17, certain))));
}

/** Notes of several numbers, each once; warnings first and marked. */
export function notesOf(values: readonly QuantityValue[]): string[] {
  const notes = values.flatMap((each) => each.notes);
  const warnings = notes.filter((note) => note.level === "warning").map((note) => `Warning: ${note.text}`);
  const others = notes.filter((note) => note.level === "note").map((note) => note.text);
  return [...new Set([...warnings, ...others])];
}

/** The sources of several numbers, each once, in order of first use. */
export function sourcesOf(values: readonly QuantityValue[]): SourceLine[] {
  const keys = [...new Set(values.flatMap((each) => each.sources))];
  return keys.map((key) => ({ key, citation: citation(key) }));
}
