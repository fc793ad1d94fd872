import type { ColumnSource, Writer } from "hyparquet-writer/src/types.js" with { "resolution-mode": "import" };
import { parseNumber } from "./parseNumber";
import { shownPiece, TableError } from "./tableError";
import type { TableOutput, TableOutputOptions } from "./tableOutput";
import type { CellValue } from "./tableReader";

/** Rows of a row group: what is held in memory. */
const groupRows = 32_768;

type Kind = "number" | "boolean" | "text";

/** The byte writer of hyparquet-writer, whose buffer may be emptied between row groups. */
type OpenWriter = Writer & { index: number };

/**
 * Writes rows as Parquet (snappy compression), a row group at a time; memory holds one of them.
 *
 * Numbers become DOUBLE, true and false BOOLEAN, everything else UTF-8 text (lists and objects as JSON); every column may have missing
 * values. Text files do not say what a column holds: it is a column of numbers when all its cells in the first row group are plain
 * numbers without leading zeros.
 *
 * @throws TableError where a later cell does not fit its column
 */
export async function parquetOutput({ columns, added, sink, textColumns }: TableOutputOptions): Promise<TableOutput> {
  const { ByteWriter, ParquetWriter } = await import("hyparquet-writer");
  const names = [...columns, ...added];
  const bytes = new ByteWriter() as OpenWriter;
  let writer: InstanceType<typeof ParquetWriter> | undefined;
  let kinds: Kind[] = [];
  let gathered: CellValue[][] = names.map(() => []);
  let rowsBefore = 0;

  const send = async (): Promise<void> => {
    if (bytes.index === 0) return;
    const piece = bytes.getBytes().slice();
    bytes.index = 0;
    await sink.write(piece);
  };
  const group = async (): Promise<void> => {
    if (writer === undefined) {
      kinds = names.map((name, k) => (textColumns.has(name) ? "text" : kindOf(gathered[k]!)));
      const schema = [
        { name: "table", num_children: names.length, repetition_type: "REQUIRED" as const },
        ...names.map((name, k) => ({ name, repetition_type: "OPTIONAL" as const, ...typeOf[kinds[k]!] })),
      ];
      writer = new ParquetWriter({ writer: bytes, schema, createdBy: "cosmology-cells" });
    }
    const rows = gathered[0]!.length;
    if (rows === 0) return;
    const columnData: ColumnSource[] = names.map((name, k) => ({
      name,
      data: gathered[k]!.map((cell, i) => converted(cell, kinds[k]!, name, rowsBefore + i + 1)),
    }));
    await writer.write({ columnData, rowGroupSize: groupRows });
    rowsBefore += rows;
    gathered = names.map(() => []);
    await send();
  };
  return {
    row(row, more) {
      for (let k = 0; k < columns.length; k++) gathered[k]!.push(row.cells[k]);
      for (let k = 0; k < added.length; k++) gathered[columns.length + k]!.push(more[k]);
    },
    async flush() {
      if (gathered[0]!.length >= groupRows) await group();
    },
    async end() {
      await group();
      await writer!.finish();
      await send();
    },
  };
}

const typeOf = {
  number: { type: "DOUBLE" },
  boolean: { type: "BOOLEAN" },
  text: { type: "BYTE_ARRAY", converted_type: "UTF8" },
} as const;

/** A number as text writes it, so that "00123" and "1e3" stay what they are: only the former is not one. */
function plainNumber(text: string): number | undefined {
  if (/^[+-]?0\d/.test(text.trim())) return undefined;
  const parsed = parseNumber(text);
  return "value" in parsed ? parsed.value : undefined;
}

function kindOf(cells: readonly CellValue[]): Kind {
  let kind: Kind | undefined;
  for (const cell of cells) {
    if (cell === null || cell === undefined) continue;
    const own: Kind =
      typeof cell === "number" || (typeof cell === "string" && plainNumber(cell) !== undefined)
        ? "number"
        : typeof cell === "boolean"
          ? "boolean"
          : "text";
    if (kind !== undefined && own !== kind) return "text";
    kind = own;
  }
  return kind ?? "text";
}

function converted(cell: CellValue, kind: Kind, column: string, row: number): number | boolean | string | null {
  if (cell === null || cell === undefined) return null;
  if (kind === "text") return typeof cell === "object" ? JSON.stringify(cell) : String(cell);
  if (kind === "boolean" && typeof cell === "boolean") return cell;
  const value = typeof cell === "string" ? plainNumber(cell) : cell;
  if (kind === "number" && typeof value === "number" && Number.isFinite(value)) return value;
  const wanted = kind === "number" ? "a finite number" : "true or false";
  throw new TableError({
    file: "the Parquet output",
    row,
    reason: `column ${JSON.stringify(column)} must hold ${wanted}, as in the first rows, got ${shownPiece(String(cell))}`,
    hint: "write csv or jsonl instead, whose columns may mix",
  });
}
