/**
 * A notebook on disk: the part of the nbformat 4 layout that is used here, read with clear errors and written so that a
 * crash leaves either the old file or the new one.
 */
import { randomUUID } from "node:crypto";
import { mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";

/** Text as nbformat stores it: one string, or lines that keep their line ends. */
export type MultilineText = string | string[];

/** A MIME bundle of an output: text as string or lines, JSON media types as plain values. */
export interface OutputBundle {
  [mediaType: string]: unknown;
}

/** Text that a cell wrote to standard output or standard error. */
export interface StreamOutput {
  output_type: "stream";
  name: string;
  text: MultilineText;
}

/** Something that a cell displayed. */
export interface DisplayOutput {
  output_type: "display_data";
  data: OutputBundle;
  metadata: Record<string, unknown>;
}

/** The value of a cell's last expression. */
export interface ResultOutput {
  output_type: "execute_result";
  execution_count: number | null;
  data: OutputBundle;
  metadata: Record<string, unknown>;
}

/** The error that ended a cell. */
export interface ErrorOutput {
  output_type: "error";
  ename: string;
  evalue: string;
  traceback: string[];
}

export type NotebookOutput = StreamOutput | DisplayOutput | ResultOutput | ErrorOutput;

export interface CodeCell {
  cell_type: "code";
  id?: string;
  metadata: Record<string, unknown>;
  source: MultilineText;
  execution_count: number | null;
  outputs: NotebookOutput[];
}

export interface MarkdownCell {
  cell_type: "markdown";
  id?: string;
  metadata: Record<string, unknown>;
  source: MultilineText;
  attachments?: Record<string, OutputBundle>;
}

export interface RawCell {
  cell_type: "raw";
  id?: string;
  metadata: Record<string, unknown>;
  source: MultilineText;
  attachments?: Record<string, OutputBundle>;
}

export type NotebookCell = CodeCell | MarkdownCell | RawCell;

/** A whole notebook, nbformat 4. */
export interface NotebookFile {
  nbformat: number;
  nbformat_minor: number;
  metadata: Record<string, unknown>;
  cells: NotebookCell[];
}

/** A file that is not a notebook which can be run; the message says what is wrong with it. */
export class NotebookFileError extends Error {
  override name = "NotebookFileError";
}

/** The text of a source or of a text output, whichever way nbformat stored it. */
export function plainText(text: MultilineText): string {
  return Array.isArray(text) ? text.join("") : text;
}

/** Text as a list of lines that keep their line ends, the form in which notebooks are usually kept. */
export function textLines(text: string): string[] {
  return text === "" ? [] : text.split(/(?<=\n)/);
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

function isText(value: unknown): value is MultilineText {
  return typeof value === "string" || (Array.isArray(value) && value.every((line) => typeof line === "string"));
}

/**
 * Reads the text of a notebook file.
 *
 * @param text the content of the file
 * @param name what to call the file in an error
 * @returns the notebook, brought to nbformat 4.5: every cell has an id
 * @throws NotebookFileError when the text is not JSON, not nbformat 4, or a cell is malformed
 */
export function parseNotebook(text: string, name: string): NotebookFile {
  const fail = (what: string): never => {
    throw new NotebookFileError(`${name}: ${what}`);
  };
  let value: unknown;
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ""));
  } catch (error) {
    fail(`is not a notebook: not valid JSON (${(error as Error).message})`);
  }
  if (!isRecord(value)) return fail("is not a notebook: the file must hold one JSON object");
  if (value.nbformat !== 4) {
    fail(`is not a notebook of format 4: the field "nbformat" must be 4, got ${JSON.stringify(value.nbformat)}`);
  }
  if (!Array.isArray(value.cells)) return fail('is not a notebook: the field "cells" must be a list');
  const ids = new Set<string>();
  const cells = value.cells.map((cell: unknown, index: number): NotebookCell => {
    const where = `cell ${index + 1}`;
    if (!isRecord(cell)) return fail(`${where} must be an object`);
    const { cell_type: type, source } = cell;
    if (type !== "code" && type !== "markdown" && type !== "raw") {
      return fail(`${where}: "cell_type" must be code, markdown or raw, got ${JSON.stringify(type)}`);
    }
    if (!isText(source)) return fail(`${where}: "source" must be text or a list of lines`);
    const metadata = isRecord(cell.metadata) ? cell.metadata : {};
    let id = typeof cell.id === "string" && /^[a-zA-Z0-9_-]{1,64}$/.test(cell.id) ? cell.id : "";
    if (id === "" || ids.has(id)) id = randomUUID();
    ids.add(id);
    if (type !== "code") return { ...(cell as unknown as MarkdownCell | RawCell), id, metadata, source };
    return {
      cell_type: "code",
      id,
      metadata,
      source,
      execution_count: typeof cell.execution_count === "number" ? cell.execution_count : null,
      outputs: Array.isArray(cell.outputs) ? (cell.outputs as NotebookOutput[]) : [],
    };
  });
  return { nbformat: 4, nbformat_minor: 5, metadata: isRecord(value.metadata) ? value.metadata : {}, cells };
}

/** Reads a notebook from a file; see {@link parseNotebook} for what is refused. */
export function readNotebook(path: string): NotebookFile {
  let text: string;
  try {
    text = readFileSync(path, "utf8");
  } catch (error) {
    const code = (error as NodeJS.ErrnoException).code;
    throw new NotebookFileError(`${path}: ${code === "ENOENT" ? "there is no such file" : `cannot be read (${code})`}`);
  }
  return parseNotebook(text, path);
}

/** Writes a file under a temporary name beside its place, then renames it, so that nobody ever sees half of it. */
export function writeWhole(path: string, content: string): void {
  mkdirSync(dirname(path), { recursive: true });
  const temporary = join(dirname(path), `.${randomUUID()}.tmp`);
  try {
    writeFileSync(temporary, content, { flag: "wx" });
    renameSync(temporary, path);
  } catch (error) {
    rmSync(temporary, { force: true });
    throw error;
  }
}

/** Writes a notebook, whole or not at all. */
export function writeNotebook(path: string, notebook: NotebookFile): void {
  writeWhole(path, `${JSON.stringify(notebook, null, 1)}\n`);
}
