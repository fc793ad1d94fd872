import { readDelimited } from "./readDelimited";
import { readJsonLines } from "./readJsonLines";
import { type RowProblem, TableError } from "./tableError";
import type { TableFormat } from "./tableFormat";

/**
 * What a cell of a table holds. Text files give text only: what it means is for the reader of the column to say, so that
 * "00123" stays as it is. `null`: the value is missing. `undefined`: the row does not have the field at all (JSON lines).
 */
export type CellValue =
  | string
  | number
  | boolean
  | null
  | undefined
  | readonly CellValue[]
  | { readonly [field: string]: CellValue };

/** One row of a table. */
export interface TableRow {
  /** The first row of data is 1; header, comments and blank lines do not count. */
  readonly number: number;
  /** One a column; cells beyond the header stand only in the problem's reason. */
  readonly cells: readonly CellValue[];
  /** Why the row cannot be used as it stands. */
  readonly problem?: RowProblem | undefined;
  /** The line as the file has it, where a row can be written again unchanged (JSON lines). */
  readonly line?: string | undefined;
}

/** A table that is being read: its columns, and its rows in order, in batches of whatever size the source comes in. */
export interface TableReader {
  readonly columns: readonly string[];
  /** Rows that cannot be used come in their place with a problem. Throws TableError where nothing more can be read. */
  batches(): AsyncGenerator<readonly TableRow[], void, undefined>;
}

/** The characters that one row may take; more mean a quote that is never closed, or a file that is no table. */
export const longestRow = 4 * 1024 * 1024;

/**
 * Starts reading a table: reads up to the end of the header and stops there. Memory stays constant however long the table.
 *
 * @param bytes the content, in pieces of any size
 * @param file what to call it in errors
 * @throws TableError where the content is no such table: empty, not UTF-8 text, a column named twice
 * @example const table = await openTable(createReadStream("models.csv"), "models.csv", "csv");
 */
export function openTable(bytes: AsyncIterable<Uint8Array>, file: string, format: TableFormat): Promise<TableReader> {
  // Its table of contents stands at the end: see readParquet.
  if (format === "parquet") throw new TableError({ file, reason: "cannot be read as a stream, because it is Parquet" });
  return format === "jsonl" ? readJsonLines(bytes, file) : readDelimited(bytes, file, format);
}
