import { unparse } from "papaparse";
import type { TableFormat } from "./tableFormat";
import type { CellValue, TableRow } from "./tableReader";

/** Turns rows into text of one format. */
export interface TableWriter {
  /** The header, "" where the format has none. */
  header(): string;
  /** One row: the cells that were read and those that are added, one a column. */
  row(row: TableRow, added: readonly CellValue[]): string;
}

/**
 * A writer of rows that were read, with columns added behind.
 *
 * Text is written as it came. Numbers are written with the fewest digits that read back as the same double: whoever wants
 * fewer rounds first ({@link roundDigits}). A missing value is an empty field, or null in JSON. A row that came as a JSON line
 * goes out as it came where the output is JSON lines too.
 *
 * @param columns those that were read; @param added those behind them
 */
export function tableWriter(
  format: Exclude<TableFormat, "parquet">,
  columns: readonly string[],
  added: readonly string[],
): TableWriter {
  return format === "jsonl" ? jsonLinesWriter(columns, added) : delimitedWriter(format, columns, added);
}

/**
 * A number rounded to so many significant digits.
 *
 * @param digits 1 to 17; 15 are those that survive a decimal reading and writing in any double precision program
 * @example roundDigits(13.792749503791248, 15) // 13.7927495037912
 */
export function roundDigits(value: number, digits: number): number {
  if (!Number.isFinite(value)) throw new RangeError(`roundDigits: value must be finite, got ${value}`);
  return Number(value.toPrecision(digits));
}

/**
 * The text of a number rounded to so many significant digits: what {@link tableWriter} makes of {@link roundDigits}, at half the cost, which shows
 * in a million rows.
 *
 * @example digitsText(13.792749503791248, 4) // "13.79"
 */
export function digitsText(value: number, digits: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`digitsText: value must be finite, got ${value}`);
  const text = value.toPrecision(digits);
  // Beyond 15 digits a double may have a shorter text.
  if (digits > 15 || value === 0 || text.includes("e")) return numberText(Number(text));
  let end = text.length;
  if (!text.includes(".")) return text;
  while (text.charCodeAt(end - 1) === 0x30) end--;
  return text.slice(0, text.charCodeAt(end - 1) === 0x2e ? end - 1 : end);
}

function delimitedWriter(format: "csv" | "tsv", columns: readonly string[], added: readonly string[]): TableWriter {
  const settings = {
    delimiter: format === "csv" ? "," : "\t",
    newline: "\n",
    header: false,
    // Unquoted, a row that begins with # would be read as a comment.
    quotes: (value: unknown, column: number) => column === 0 && typeof value === "string" && value.startsWith("#"),
  };
  const special = format === "csv" ? /[\r\n"\ufeff,]|^[ #]| $/ : /[\r\n"\ufeff\t]|^[ #]| $/;
  const line = (cells: readonly CellValue[]): string => {
    let text = "";
    for (let index = 0; index < cells.length; index++) {
      const cell = cells[index];
      const piece = typeof cell === "number" ? numberText(cell) : delimitedCell(cell);
      // Where a cell may need quotes, papaparse settles the whole line.
      if (piece !== null && typeof cell !== "number" && special.test(piece)) {
        return `${unparse([cells.map(delimitedCell)], settings)}\n`;
      }
      text += index === 0 ? (piece ?? "") : `${settings.delimiter}${piece ?? ""}`;
    }
    return `${text}\n`;
  };
  return { header: () => line([...columns, ...added]), row: (row, more) => line([...row.cells, ...more]) };
}

/** Lists as a;b, objects as JSON text. */
function delimitedCell(value: CellValue): string | null {
  if (value === null || value === undefined) return null;
  if (typeof value === "number") return numberText(value);
  if (typeof value !== "object") return String(value);
  const plain = Array.isArray(value) && value.every((each) => typeof each === "number" || typeof each === "string");
  return plain ? (value as readonly (number | string)[]).map(String).join(";") : JSON.stringify(value);
}

function jsonLinesWriter(columns: readonly string[], added: readonly string[]): TableWriter {
  const names = [...columns, ...added].map((name) => JSON.stringify(name));
  const members = (cells: readonly CellValue[], from: number): string =>
    cells
      .map((cell, index) => (cell === undefined ? "" : `${names[from + index]}:${jsonCell(cell)}`))
      .filter((member) => member !== "")
      .join(",");
  return {
    header: () => "",
    row(row, more) {
      const behind = members(more, columns.length);
      if (row.line === undefined) {
        const all = [members(row.cells, 0), behind].filter((part) => part !== "").join(",");
        return `{${all}}\n`;
      }
      const opened = row.line.slice(0, -1).trimEnd();
      const separator = opened.endsWith("{") || behind === "" ? "" : ",";
      return `${opened}${separator}${behind}}\n`;
    },
  };
}

function jsonCell(value: CellValue): string {
  return typeof value === "number" ? numberText(value) : JSON.stringify(value);
}

function numberText(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`a number to be written must be finite, got ${value}`);
  return String(Object.is(value, -0) ? 0 : value);
}
