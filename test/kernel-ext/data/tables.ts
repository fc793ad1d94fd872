import { type CellValue, openTable, type TableFormat, type TableReader, type TableRow } from "../../../kernel-ext/data";

/** Bytes of a text in pieces of so many bytes. */
export async function* bytesOf(content: string | Uint8Array, piece = 1 << 16): AsyncGenerator<Uint8Array> {
  const bytes = typeof content === "string" ? new TextEncoder().encode(content) : content;
  for (let start = 0; start < bytes.length; start += piece) yield bytes.subarray(start, start + piece);
}

export function open(content: string | Uint8Array, format: TableFormat = "csv", piece?: number): Promise<TableReader> {
  return openTable(bytesOf(content, piece), `invented.${format}`, format);
}

export async function allRows(table: TableReader): Promise<TableRow[]> {
  const rows: TableRow[] = [];
  for await (const batch of table.batches()) rows.push(...batch);
  return rows;
}

export async function cellsOf(content: string, format: TableFormat = "csv", piece?: number): Promise<CellValue[][]> {
  return (await allRows(await open(content, format, piece))).map((row) => [...row.cells]);
}
