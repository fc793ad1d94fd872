import { decodeText } from "./decodeText";
import { shownPiece, TableError } from "./tableError";
import { type CellValue, longestRow, type TableReader, type TableRow } from "./tableReader";

/**
 * Reads one JSON object a line; blank lines are skipped. The first object names the columns; a later row may leave some out.
 *
 * A line that is no JSON object, names a field twice, or has a field that the first one lacks is given with a problem.
 */
export async function readJsonLines(bytes: AsyncIterable<Uint8Array>, file: string): Promise<TableReader> {
  const pieces = linesOf(bytes, file);
  const first = await pieces.next();
  if (first.done) throw new TableError({ file, reason: "is empty: there is no first row to name the columns" });
  let rest = first.value;
  const opening = parseLine(rest[0]!);
  if ("reason" in opening) {
    throw new TableError({
      file,
      row: 1,
      reason: `${opening.reason}, got ${shownPiece(rest[0]!)}`,
      hint: "each line must be one JSON object",
    });
  }
  const columns = Object.keys(opening.object);
  const known = new Set(columns);

  async function* batches(): AsyncGenerator<readonly TableRow[], void, undefined> {
    let count = 0;
    const toRow = (line: string): TableRow => jsonRow(line, columns, known, ++count);
    if (rest.length > 0) yield rest.map(toRow);
    rest = [];
    for await (const lines of pieces) yield lines.map(toRow);
  }
  return { columns, batches };
}

async function* linesOf(bytes: AsyncIterable<Uint8Array>, file: string): AsyncGenerator<string[], void, undefined> {
  let open = "";
  let before = 0;
  for await (const text of decodeText(bytes, file)) {
    const lines = (open + text).split("\n");
    open = lines.pop()!;
    const filled = lines.map((line) => line.trim()).filter((line) => line !== "");
    before += filled.length;
    if (open.length > longestRow) {
      throw new TableError({ file, row: before + 1, reason: `takes more than ${longestRow} characters` });
    }
    if (filled.length > 0) yield filled;
  }
  if (open.trim() !== "") yield [open.trim()];
}

type JsonObject = { readonly [field: string]: CellValue };

function parseLine(line: string): { object: JsonObject } | { reason: string } {
  let value: unknown;
  try {
    value = JSON.parse(line);
  } catch (error) {
    return { reason: `is not valid JSON (${(error as Error).message})` };
  }
  if (typeof value !== "object" || value === null || Array.isArray(value)) return { reason: "must be a JSON object" };
  // JSON.parse keeps the last of two fields with one name and says nothing.
  if (countFields(value) !== countColons(line)) return { reason: "names a field twice" };
  return { object: value as JsonObject };
}

function countFields(value: unknown): number {
  if (typeof value !== "object" || value === null) return 0;
  const inner = Object.values(value);
  const own = Array.isArray(value) ? 0 : inner.length;
  return inner.reduce((sum: number, each) => sum + countFields(each), own);
}

/** Colons outside of strings: one a field, in text that is known to be valid JSON. */
function countColons(line: string): number {
  let count = 0;
  let inside = false;
  for (let index = 0; index < line.length; index++) {
    const code = line.charCodeAt(index);
    if (inside && code === 0x5c) index++;
    else if (code === 0x22) inside = !inside;
    else if (code === 0x3a && !inside) count++;
  }
  return count;
}

function jsonRow(line: string, columns: readonly string[], known: ReadonlySet<string>, number: number): TableRow {
  const parsed = parseLine(line);
  if ("reason" in parsed) {
    const cells = columns.map(() => undefined);
    return { number, cells, problem: { row: number, value: line, reason: parsed.reason } };
  }
  const { object } = parsed;
  const cells = columns.map((name) => (Object.hasOwn(object, name) ? object[name] : undefined));
  const stranger = Object.keys(object).find((name) => !known.has(name));
  if (stranger === undefined) return { number, cells, line };
  const reason = "is a field that the first row does not have";
  return { number, cells, line, problem: { row: number, column: stranger, value: object[stranger], reason } };
}
