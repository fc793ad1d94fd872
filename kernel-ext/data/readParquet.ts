import { shownPiece, TableError } from "./tableError";
import type { CellValue, TableReader, TableRow } from "./tableReader";
import { fileReason } from "./wholeFile";

/** Rows that are given out at once. */
const batchRows = 4096;

/**
 * Reads a Parquet file, a row group at a time: memory holds one of them. Snappy, gzip and no compression are known.
 *
 * A 64-bit integer becomes a number where a double holds it, else text; dates and times become ISO 8601 text. A row with NaN or an
 * infinity is given with a problem.
 *
 * @throws TableError where the file is none, or cannot be read
 */
export async function readParquet(file: string): Promise<TableReader & { readonly rows: number }> {
  const { asyncBufferFromFile, parquetMetadataAsync, parquetScan, parquetSchema } = await import("hyparquet");
  const guarded = async <T>(work: () => Promise<T>, row?: number): Promise<T> => {
    try {
      return await work();
    } catch (error) {
      const known = (error as NodeJS.ErrnoException).code !== undefined;
      const reason = known
        ? `cannot be read: ${fileReason(error)}`
        : `is no Parquet file that can be read: ${(error as Error).message}`;
      throw new TableError({ file, row, reason });
    }
  };
  const source = await guarded(() => asyncBufferFromFile(file));
  const metadata = await guarded(() => parquetMetadataAsync(source));
  const columns = parquetSchema(metadata).children.map((child) => child.element.name);
  if (columns.length === 0) throw new TableError({ file, reason: "has no columns" });

  async function* batches(): AsyncGenerator<readonly TableRow[], void, undefined> {
    const scan = await guarded(() => parquetScan({ file: source, metadata }));
    let from = 0;
    for (const group of metadata.row_groups) {
      const to = from + Number(group.num_rows);
      if (to === from) continue;
      const data: ArrayLike<unknown>[] = [];
      for (const column of columns) {
        const values = await guarded(async () => scan.readColumn({ column, rowStart: from, rowEnd: to }), from + 1);
        if (values.length !== to - from)
          throw new TableError({ file, row: from + 1, reason: `column ${JSON.stringify(column)} ends early` });
        data.push(values);
      }
      for (let start = 0; start < to - from; start += batchRows) {
        const end = Math.min(start + batchRows, to - from);
        const rows: TableRow[] = [];
        for (let i = start; i < end; i++) rows.push(rowOf(columns, data, i, from + i + 1));
        yield rows;
      }
      from = to;
    }
  }
  return { columns, batches, rows: Number(metadata.num_rows) };
}

function rowOf(
  columns: readonly string[],
  data: readonly ArrayLike<unknown>[],
  index: number,
  number: number,
): TableRow {
  let problem: TableRow["problem"];
  const cells = data.map((values, k): CellValue => {
    const cell = cellOf(values[index]);
    if (typeof cell === "number" && !Number.isFinite(cell)) {
      problem ??= { row: number, column: columns[k]!, value: cell, reason: "must be a finite number" };
      return null;
    }
    return cell;
  });
  return problem === undefined ? { number, cells } : { number, cells, problem };
}

function cellOf(value: unknown): CellValue {
  if (value === null || value === undefined) return null;
  if (typeof value === "bigint") {
    const plain = Number(value);
    return Number.isSafeInteger(plain) ? plain : String(value);
  }
  if (value instanceof Date) return value.toISOString();
  if (value instanceof Uint8Array) return shownPiece(Buffer.from(value).toString("hex"));
  if (Array.isArray(value)) return value.map(cellOf);
  if (ArrayBuffer.isView(value)) return Array.from(value as unknown as ArrayLike<unknown>, cellOf);
  if (typeof value === "object") {
    return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, cellOf(inner)]));
  }
  return value as string | number | boolean;
}
