/** An error of a cell in the form of the Jupyter `error` message, with the user's lines and without the kernel's own. */
import { dirname, sep } from "node:path";
import { inspect } from "node:util";
import type { Diagnostic } from "tslab/dist/converter";
import type { CellSources, SourcePlace } from "./cellSources";

/** The content of an `error` message, and where in the cell it happened. */
export interface CellError {
  ename: string;
  evalue: string;
  traceback: string[];
  place?: SourcePlace;
}

const packageFolder = `${dirname(dirname(__dirname))}${sep}`;

/** Frames of Node, of tslab and of this package say nothing about the user's cell. */
function isInternal(file: string): boolean {
  return (
    file.startsWith("node:") ||
    file.startsWith(packageFolder) ||
    /[\\/]node_modules[\\/](@tslab|tslab|zeromq)[\\/]/.test(file) ||
    file === "<anonymous>"
  );
}

interface ErrorParts {
  name: string;
  message: string;
  stack: string;
  hint: string | undefined;
  cause: unknown;
}

function field(value: object, name: string): unknown {
  try {
    return (value as Record<string, unknown>)[name];
  } catch {
    return undefined;
  }
}

/** Reads an error from any realm; whatever else was thrown is shown as a value. */
function errorParts(thrown: unknown): ErrorParts {
  if (typeof thrown === "object" && thrown !== null) {
    const message = field(thrown, "message");
    const stack = field(thrown, "stack");
    if (typeof message === "string" && typeof stack === "string") {
      const name = field(thrown, "name");
      const hint = field(thrown, "hint");
      return {
        name: typeof name === "string" && name !== "" ? name : "Error",
        message,
        stack,
        hint: typeof hint === "string" && hint !== "" ? hint : undefined,
        cause: field(thrown, "cause"),
      };
    }
  }
  let shown: string;
  try {
    shown = typeof thrown === "string" ? thrown : inspect(thrown, { depth: 2 });
  } catch {
    shown = "a value that cannot be shown";
  }
  return { name: "ThrownValue", message: shown, stack: "", hint: undefined, cause: undefined };
}

const frame = /^\s+at (?:(.*?) \()?((?:[a-zA-Z]+:)?[^:]+):(\d+):(\d+)\)?$/;

interface UserFrame {
  what: string;
  place: SourcePlace;
  inCell: boolean;
}

function userFrames(stack: string, sources: CellSources): UserFrame[] {
  const frames: UserFrame[] = [];
  for (const line of stack.split("\n")) {
    const match = frame.exec(line);
    if (!match) continue;
    const file = match[2].replace(/^file:\/\//, "").replace(/^async /, "");
    const what = (match[1] ?? "").replace(/^(async )?(Object\.<anonymous>|<anonymous>|eval)$/, "$1").trim();
    const place = sources.locate(file, Number(match[3]), Number(match[4]));
    if (place === "hidden") continue;
    if (place) frames.push({ what, place, inCell: true });
    else if (!isInternal(file)) {
      frames.push({ what, place: { name: file, line: Number(match[3]), column: Number(match[4]) }, inCell: false });
    }
  }
  return frames;
}

function describePlace(place: SourcePlace): string {
  return `${place.name}, line ${place.line}, column ${place.column}`;
}

/** The error message for something that a cell threw. */
export function describeThrown(thrown: unknown, sources: CellSources, note?: string): CellError {
  const parts = errorParts(thrown);
  const traceback = `${parts.name}: ${parts.message}`.split("\n");
  if (parts.hint) traceback.push(`hint: ${parts.hint}`);
  if (note) traceback.push(note);
  const frames = userFrames(parts.stack, sources);
  const first = frames.find((one) => one.inCell);
  if (first) traceback.push("", describePlace(first.place), ...sources.excerpt(first.place));
  if (frames.length > 1 || (frames.length === 1 && !first)) {
    traceback.push("");
    const shown = frames.slice(0, 20);
    for (const one of shown) traceback.push(`    at ${one.what ? `${one.what}, ` : ""}${describePlace(one.place)}`);
    if (frames.length > shown.length) traceback.push(`    and ${frames.length - shown.length} more`);
  }
  let cause = parts.cause;
  for (let depth = 0; cause !== undefined && cause !== null && depth < 5; depth++) {
    const inner = errorParts(cause);
    traceback.push("", `caused by ${inner.name}: ${inner.message}`);
    if (inner.hint) traceback.push(`hint: ${inner.hint}`);
    cause = inner.cause;
  }
  const innerErrors = typeof thrown === "object" && thrown !== null ? field(thrown, "errors") : undefined;
  if (parts.name === "AggregateError" && Array.isArray(innerErrors)) {
    for (const inner of innerErrors.slice(0, 5).map(errorParts)) traceback.push("", `${inner.name}: ${inner.message}`);
  }
  const error: CellError = { ename: parts.name, evalue: parts.message, traceback };
  if (first) error.place = first.place;
  return error;
}

/** The error message for a cell that did not pass the type check: every diagnostic, with its line and a rule under it. */
export function describeDiagnostics(diagnostics: Diagnostic[], cell: string, sources: CellSources): CellError {
  // A chain of messages arrives as several diagnostics for the same span.
  const groups: Diagnostic[][] = [];
  for (const one of diagnostics) {
    const last = groups.at(-1)?.[0];
    const same = last && last.start.offset === one.start.offset && last.end.offset === one.end.offset;
    if (same) groups.at(-1)?.push(one);
    else groups.push([one]);
  }
  const traceback: string[] = [];
  let firstPlace: SourcePlace | undefined;
  for (const group of groups) {
    const { start, end, fileName, code } = group[0];
    const place = { name: fileName ?? cell, line: start.line + 1, column: start.character + 1 };
    firstPlace ??= place;
    if (traceback.length > 0) traceback.push("");
    traceback.push(`TypeCheckError: ${group[0].messageText} (TypeScript ${code})`);
    for (const detail of group.slice(1)) traceback.push(`  ${detail.messageText}`);
    traceback.push("", describePlace(place));
    if (!fileName) {
      const length = end.line === start.line ? end.character - start.character : 1;
      traceback.push(...sources.excerpt(place, length));
    }
  }
  const more = groups.length > 1 ? ` (and ${groups.length - 1} more)` : "";
  const evalue = `line ${firstPlace?.line}, column ${firstPlace?.column}: ${groups[0][0].messageText}${more}`;
  const error: CellError = { ename: "TypeCheckError", evalue, traceback };
  if (firstPlace) error.place = firstPlace;
  return error;
}
