/**
 * Tables of a cell's output: the same rows as HTML for a notebook and as aligned plain text for everything else.
 */
import { alignOnPoint, formatNumber, formatWithError, missingMark, type NumberFormat } from "./digits";
import { escapeHtml, escapeMarkdown, visibleText } from "./escape";
import { type Displayable, displaySymbol, type MimeBundle } from "./sink";
import { quantityText, symbolHtml, symbolText } from "./symbol";
import { outputStyle } from "./tableStyle";

/** What a table cell may hold; null and undefined are shown as missing, a pair as value \u00b1 error. */
export type TableValue =
  | string
  | number
  | boolean
  | null
  | undefined
  | { readonly value: number; readonly error: number };

/** One row: values by column key. */
export type TableRow = { readonly [key: string]: TableValue };

/** One column of a table. */
export interface TableColumn {
  /** The field of the row. */
  readonly key: string;
  readonly label: string;
  /** Symbol in the trade's plain text, such as `theta_*`; shown after the label. */
  readonly symbol?: string | undefined;
  /** Shown in brackets in the head. */
  readonly unit?: string | undefined;
  /** Default: numbers on their decimal point, text at the left. */
  readonly align?: "left" | "right" | "center" | "point" | undefined;
  /** Significant digits of numbers, see `formatNumber`. */
  readonly digits?: NumberFormat["digits"] | undefined;
  /** The texts of this column are symbols or units: Greek letters and, in HTML, true sub- and superscripts. */
  readonly symbols?: boolean | undefined;
  /** Writes the value instead; what it returns is escaped like everything else. */
  readonly format?: ((value: TableValue, row: TableRow) => string) | undefined;
}

/** What a table is made from. */
export interface TableOptions {
  readonly title: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly TableRow[];
  /** Sentences beneath the table. */
  readonly notes?: readonly string[] | undefined;
  /** More rows than this are cut in the middle, with a line that says so. Default 60. */
  readonly maxRows?: number | undefined;
}

/** A table ready to be shown. */
export interface Table extends Displayable {
  readonly title: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly TableRow[];
  readonly notes: readonly string[];
  /** The table without its style sheet, for use inside a larger output. */
  toHtmlBody(): string;
  /** A fragment that stands alone, style sheet included. */
  toHtml(): string;
  toText(): string;
  toMarkdown(): string;
  bundle(): MimeBundle;
}

/** The formatted cells of one column and how they stand. */
interface FormattedColumn {
  readonly column: TableColumn;
  readonly cells: readonly string[];
  readonly align: "left" | "right" | "center" | "point";
}

function isPair(value: TableValue): value is { readonly value: number; readonly error: number } {
  return typeof value === "object" && value !== null;
}

function formatCell(title: string, column: TableColumn, row: TableRow, index: number): string {
  const value = row[column.key];
  const where = `table "${title}": column "${column.label}", row ${index + 1}`;
  try {
    for (const part of isPair(value) ? [value.value, value.error] : [value]) {
      if (typeof part === "number" && Number.isNaN(part)) throw new RangeError("value must be a number, got NaN");
    }
    if (column.format !== undefined) return visibleText(column.format(value, row));
    if (value === null || value === undefined) return missingMark;
    if (isPair(value)) return formatWithError(value.value, value.error);
    if (typeof value === "boolean") return value ? "yes" : "no";
    if (typeof value === "number")
      return formatNumber(value, column.digits === undefined ? {} : { digits: column.digits });
    if (typeof value === "string") return value === "" ? missingMark : visibleText(value);
    throw new TypeError(`value must be text, a number, yes or no, got ${typeof value}`);
  } catch (error) {
    throw new RangeError(`${where}: ${error instanceof Error ? error.message : String(error)}`);
  }
}

function alignmentOf(column: TableColumn, rows: readonly TableRow[]): FormattedColumn["align"] {
  if (column.align !== undefined) return column.align;
  const present = rows.map((row) => row[column.key]).filter((value) => value !== null && value !== undefined);
  const numeric = present.length > 0 && present.every((value) => typeof value === "number" || isPair(value));
  return numeric ? "point" : "left";
}

/** Characters as wide as a digit and as a full stop; they fill a column up to its decimal point. */
const figureSpace = "\u2007";
const pointSpace = "\u2008";

function fill(count: number, withPoint: boolean): string {
  if (count <= 0) return "";
  return withPoint ? pointSpace + figureSpace.repeat(count - 1) : figureSpace.repeat(count);
}

/** Cells of a column as HTML text, the decimal points lined up by invisible fill. */
function htmlCells({ column, cells, align }: FormattedColumn): string[] {
  if (column.symbols === true) return cells.map(symbolHtml);
  if (align !== "point") return cells.map(escapeHtml);
  return alignOnPoint(cells).map(({ text, after }) => {
    if (text === missingMark) return text;
    const bare = !text.includes(".") && !text.includes("\u00b1");
    return escapeHtml(text) + fill(after, bare);
  });
}

/** Cells of a column as text of one width. */
function textCells({ column, cells: written, align }: FormattedColumn, head: string): string[] {
  const cells = column.symbols === true ? written.map(symbolText) : written;
  const lined =
    align === "point"
      ? alignOnPoint(cells).map(({ text, before, after }) => {
          const width = before + textWidth(text) + after;
          return text === missingMark ? padTo(text, width, "center") : " ".repeat(before) + text + " ".repeat(after);
        })
      : [...cells];
  const width = Math.max(textWidth(head), ...lined.map(textWidth));
  const side = align === "point" || align === "right" ? "right" : align;
  return [head, ...lined].map((text) => padTo(text, width, side));
}

/** Length in characters as a reader counts them: code points, combining marks apart. */
export function textWidth(text: string): number {
  return [...text.replace(/\p{M}/gu, "")].length;
}

function padTo(text: string, width: number, align: "left" | "right" | "center"): string {
  const missing = Math.max(0, width - textWidth(text));
  if (align === "right") return " ".repeat(missing) + text;
  if (align === "left") return text + " ".repeat(missing);
  const before = Math.floor(missing / 2);
  return " ".repeat(before) + text + " ".repeat(missing - before);
}

function checkOptions({ title, columns, rows }: TableOptions): void {
  if (typeof title !== "string" || title === "")
    throw new RangeError(`table: title must be text, got ${String(title)}`);
  if (!(columns.length > 0)) throw new RangeError(`table "${title}": columns must name at least one column, got none`);
  const keys = columns.map((column) => column.key);
  const twice = keys.find((key, index) => keys.indexOf(key) !== index);
  if (twice !== undefined)
    throw new RangeError(`table "${title}": columns must have different keys, got "${twice}" twice`);
  if (!Array.isArray(rows)) throw new RangeError(`table "${title}": rows must be a list`);
}

/**
 * Makes a table.
 *
 * Every string is escaped. A missing value is shown as a dash; NaN throws and names the column and the row. In the text
 * and the HTML the decimal points of numeric columns stand under each other. The first column heads its row.
 *
 * @param options title, columns and rows
 * @returns the table, which shows itself when it is the last expression of a cell
 * @throws RangeError for a NaN, a column without rows' values of a known kind, doubled keys
 * @example table({ title: "Bins", columns: [{ key: "z", label: "redshift", symbol: "z", digits: 2 }], rows: [{ z: 0.5 }] })
 */
export function table(options: TableOptions): Table {
  checkOptions(options);
  const { title, columns, rows } = options;
  const notes = [...(options.notes ?? [])];
  const maxRows = options.maxRows ?? 60;
  if (!(maxRows >= 2)) throw new RangeError(`table "${title}": maxRows must be at least 2, got ${String(maxRows)}`);
  const cut = rows.length > maxRows ? rows.length - maxRows : 0;
  const headCount = Math.ceil(maxRows / 2);
  const numbered = rows.map((row, index) => ({ row, index }));
  const shown = cut === 0 ? numbered : [...numbered.slice(0, headCount), ...numbered.slice(headCount + cut)];
  const cutLine = `${formatNumber(cut, { digits: "all" })} more rows are not shown`;
  const formatted: FormattedColumn[] = columns.map((column) => ({
    column,
    cells: shown.map(({ row, index }) => formatCell(title, column, row, index)),
    align: alignmentOf(column, rows),
  }));

  const toHtmlBody = (): string => {
    const cells = formatted.map(htmlCells);
    const head = formatted
      .map(({ column, align }) => {
        const words = [
          column.label === "" ? "" : escapeHtml(column.label),
          column.symbol ? `<span class="cell-symbol">${symbolHtml(column.symbol)}</span>` : "",
          column.unit ? `<span class="cell-unit">[${symbolHtml(column.unit)}]</span>` : "",
        ];
        return `<th scope="col" class="cell-${align}">${words.filter((word) => word !== "").join(" ")}</th>`;
      })
      .join("");
    const body = shown.map((_, position) => {
      const line = formatted
        .map(({ align: side, cells: plain }, number) => {
          const content = cells[number]?.[position] ?? "";
          const align = side === "point" && plain[position] === missingMark ? "center" : side;
          return number === 0
            ? `<th scope="row" class="cell-${align}">${content}</th>`
            : `<td class="cell-${align}">${content}</td>`;
        })
        .join("");
      const gap =
        cut > 0 && position === headCount
          ? `<tr><td class="cell-left" colspan="${columns.length}">\u22ee ${escapeHtml(cutLine)}</td></tr>\n`
          : "";
      return `${gap}<tr>${line}</tr>`;
    });
    const empty = `<tr><td class="cell-left" colspan="${columns.length}">no rows</td></tr>`;
    const below =
      notes.length === 0
        ? ""
        : `<ul class="cell-notes">${notes.map((note) => `<li>${escapeHtml(note)}</li>`).join("")}</ul>\n`;
    return `<div class="cell-scroll" tabindex="0" role="group" aria-label="${escapeHtml(title)}">
<table class="cell-table">
<caption>${escapeHtml(title)}</caption>
<thead><tr>${head}</tr></thead>
<tbody>
${body.length === 0 ? empty : body.join("\n")}
</tbody>
</table>
</div>
${below}`;
  };

  const heads = columns.map((column) => quantityText(column.label, column.symbol, column.unit));

  const toText = (): string => {
    const grid = formatted.map((column, number) => textCells(column, heads[number] as string));
    const line = (position: number): string =>
      grid
        .map((cells) => cells[position] as string)
        .join("  ")
        .trimEnd();
    const rule = grid.map((cells) => "-".repeat(textWidth(cells[0] as string))).join("  ");
    const body = shown.map((_, position) => line(position + 1));
    if (cut > 0) body.splice(headCount, 0, `\u22ee ${cutLine}`);
    if (body.length === 0) body.push("no rows");
    return [visibleText(title), "", line(0), rule, ...body, ...notes.map((note) => `* ${visibleText(note)}`)].join(
      "\n",
    );
  };

  const toMarkdown = (): string => {
    const shownCell = ({ column, cells }: FormattedColumn, position: number): string =>
      column.symbols === true ? symbolText(cells[position] as string) : (cells[position] as string);
    const row = (cells: readonly string[]): string => `| ${cells.map(escapeMarkdown).join(" | ")} |`;
    const marks = formatted.map(({ align }) => (align === "left" ? ":---" : align === "center" ? ":---:" : "---:"));
    const body = shown.map((_, position) => row(formatted.map((column) => shownCell(column, position))));
    if (cut > 0) body.splice(headCount, 0, row([`\u22ee ${cutLine}`, ...columns.slice(1).map(() => "")]));
    const below = notes.length === 0 ? [] : ["", ...notes.map((note) => `- ${escapeMarkdown(note)}`)];
    return [`**${escapeMarkdown(title)}**`, "", row(heads), `| ${marks.join(" | ")} |`, ...body, ...below].join("\n");
  };

  const toHtml = (): string => `<div class="cell-output">\n${outputStyle}\n${toHtmlBody()}</div>`;
  const bundle = (): MimeBundle => ({ "text/html": toHtml(), "text/plain": toText() });
  const result: Table = {
    title,
    columns,
    rows,
    notes,
    toHtmlBody,
    toHtml,
    toText,
    toMarkdown,
    bundle,
    [displaySymbol]: bundle,
  };
  Object.defineProperty(result, Symbol.for("nodejs.util.inspect.custom"), { value: toText, enumerable: false });
  return result;
}
