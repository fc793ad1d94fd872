import { DataRowError, DomainError, describeValue, UnknownNameError } from "../../cosmo/errors";
import { openFile, openTable, parseNumber, readParquet, readSpaced, type TableReader } from "../data";

/** A chain: a file by its name (.csv, .tsv, .jsonl, .parquet; else columns separated by blanks), columns by name, or a list of rows. */
export type ChainInput =
  | string
  | { readonly [column: string]: ArrayLike<number> }
  | readonly { readonly [column: string]: number }[];

/** The columns of a chain that were asked for, row for row as the chain has them. */
export interface LoadedChain {
  /** All columns that the chain has, read or not. */
  readonly names: readonly string[];
  readonly rows: number;
  readonly columns: ReadonlyMap<string, Float64Array>;
}

/**
 * Reads the columns of a chain.
 *
 * @param wanted which of its columns, by all their names
 * @param dropped rows at the beginning that are not looked at further: how many of all
 * @throws DataRowError with row and column for a cell that is no finite number; TableError for a file that cannot be read
 */
export async function loadChain(
  input: ChainInput,
  wanted: (names: readonly string[]) => readonly string[],
  where: string,
): Promise<LoadedChain> {
  if (typeof input === "string") return fromTable(await open(input), wanted, where);
  if (Array.isArray(input)) return fromRows(input, wanted, where);
  if (typeof input !== "object" || input === null) {
    throw new DomainError({
      where,
      argument: "chain",
      rule: "must be a file's name, columns, or a list of rows",
      value: input,
    });
  }
  return fromColumns(input as { readonly [column: string]: ArrayLike<number> }, wanted, where);
}

async function open(file: string): Promise<TableReader> {
  const ending = /\.([^./\\]+)$/.exec(file)?.[1]?.toLowerCase();
  if (ending === "parquet") return readParquet(file);
  const { bytes } = await openFile(file);
  if (ending === "csv" || ending === "tsv" || ending === "jsonl") return openTable(bytes, file, ending);
  return readSpaced(bytes, file);
}

/** The places of the wanted columns; refuses one that the chain does not have. */
function placesOf(names: readonly string[], wanted: readonly string[], where: string): number[] {
  return wanted.map((name) => {
    const place = names.indexOf(name);
    if (place < 0) throw new UnknownNameError({ where, kind: "column of the chain", given: name, known: names });
    return place;
  });
}

async function fromTable(
  table: TableReader,
  wanted: (names: readonly string[]) => readonly string[],
  where: string,
): Promise<LoadedChain> {
  const names = [...new Set(wanted(table.columns))];
  const places = placesOf(table.columns, names, where);
  let columns = names.map(() => new Float64Array(4096));
  let rows = 0;
  for await (const batch of table.batches()) {
    for (const row of batch) {
      if (row.problem !== undefined) {
        const { column, value, reason } = row.problem;
        // What stands in a column that nobody reads is nobody's fault.
        if (column === undefined || names.includes(column)) {
          throw new DataRowError({ where, row: row.number, column, value, reason });
        }
      }
      if (columns[0] !== undefined && rows === columns[0].length) columns = columns.map(grown);
      for (let k = 0; k < places.length; k++) {
        const cell = row.cells[places[k]!];
        const parsed = typeof cell === "string" ? parseNumber(cell) : { value: cell };
        const value = "value" in parsed ? parsed.value : undefined;
        if (typeof value !== "number" || !Number.isFinite(value)) {
          const reason = "reason" in parsed ? parsed.reason : "must be a finite number";
          throw new DataRowError({ where, row: row.number, column: names[k], value: cell, reason });
        }
        columns[k]![rows] = value;
      }
      rows++;
    }
  }
  return { names: table.columns, rows, columns: new Map(names.map((name, k) => [name, columns[k]!.slice(0, rows)])) };
}

function grown(column: Float64Array): Float64Array<ArrayBuffer> {
  const longer = new Float64Array(2 * column.length);
  longer.set(column);
  return longer;
}

function fromColumns(
  input: { readonly [column: string]: ArrayLike<number> },
  wanted: (names: readonly string[]) => readonly string[],
  where: string,
): LoadedChain {
  const names = Object.keys(input);
  let rows: number | undefined;
  let first = "";
  for (const name of names) {
    const length: unknown = (input[name] as ArrayLike<number> | undefined)?.length;
    if (typeof length !== "number" || typeof input[name] === "string") {
      throw new DomainError({
        where,
        argument: `column ${describeValue(name)}`,
        rule: "must be an array of numbers",
        value: input[name],
      });
    }
    if (rows === undefined) [rows, first] = [length, name];
    else if (length !== rows) {
      const rule = `must have as many rows as ${describeValue(first)}, ${rows}`;
      throw new DomainError({ where, argument: `column ${describeValue(name)}`, rule, value: length });
    }
  }
  const chosen = [...new Set(wanted(names))];
  placesOf(names, chosen, where);
  const columns = chosen.map((name) => numbers(name, rows ?? 0, (row) => input[name]![row], where));
  return { names, rows: rows ?? 0, columns: new Map(columns) };
}

function fromRows(
  input: readonly { readonly [column: string]: number }[],
  wanted: (names: readonly string[]) => readonly string[],
  where: string,
): LoadedChain {
  const [head] = input;
  if (typeof head !== "object" || head === null) {
    throw new DomainError({
      where,
      argument: "chain",
      rule: "must have at least one row, an object of numbers",
      value: head,
    });
  }
  const names = Object.keys(head);
  const chosen = [...new Set(wanted(names))];
  placesOf(names, chosen, where);
  const columns = chosen.map((name) => numbers(name, input.length, (row) => input[row]?.[name], where));
  return { names, rows: input.length, columns: new Map(columns) };
}

function numbers(name: string, rows: number, cell: (row: number) => unknown, where: string): [string, Float64Array] {
  const column = new Float64Array(rows);
  for (let row = 0; row < rows; row++) {
    const value = cell(row);
    if (typeof value !== "number" || !Number.isFinite(value)) {
      throw new DataRowError({ where, row: row + 1, column: name, value, reason: "must be a finite number" });
    }
    column[row] = value;
  }
  return [name, column];
}
