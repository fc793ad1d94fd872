/** The sources of the cells that ran, to show errors at the lines that the user wrote. */
import type { CompiledFile } from "./compiler";

/** Where something is, lines and columns counted from one. */
export interface SourcePlace {
  /** "cell [3]", by its execution count, or the name of a file. */
  name: string;
  line: number;
  column: number;
}

interface KnownSource {
  name: string;
  /** The text of a cell; undefined for files, which are not quoted. */
  text: string[] | undefined;
  /** Lines that the converter puts before the source. */
  lead: number;
  locate: CompiledFile["locate"] | undefined;
  outputLines: number;
}

/** The converter puts one line, `export {};`, before the text of a cell. */
const cellLead = 1;

export class CellSources {
  private readonly known = new Map<string, KnownSource>();

  constructor(private readonly workingDirectory: string) {}

  /**
   * Remembers a cell before it is compiled.
   *
   * @param file the name under which the virtual machine runs it
   * @param name what the user knows it by
   */
  addCell(file: string, name: string, text: string): void {
    this.known.set(file, { name, text: text.split("\n"), lead: cellLead, locate: undefined, outputLines: 0 });
  }

  /** Adds what the compiler made of a cell. */
  setCompiled(file: string, compiled: CompiledFile): void {
    const source = this.known.get(file);
    if (!source) return;
    source.locate = compiled.locate;
    source.outputLines = compiled.output.split("\n").length;
  }

  /** Remembers a compiled file beside the notebook, or a module that a cell defined. */
  addFile(path: string, compiled: CompiledFile, text: string | undefined): void {
    this.known.set(path, {
      name: this.shortName(path).replace(/\.js$/, ".ts"),
      text: text?.split("\n"),
      lead: text === undefined ? 0 : cellLead,
      locate: compiled.locate,
      outputLines: compiled.output.split("\n").length,
    });
  }

  private shortName(path: string): string {
    const base = `${this.workingDirectory}/`;
    return path.startsWith(base) ? path.slice(base.length) : path;
  }

  /**
   * The place in the user's source of a position in executed code.
   *
   * @returns the place; "hidden" for code that the converter added; undefined for a file that is not the user's cell
   */
  locate(file: string, line: number, column: number): SourcePlace | "hidden" | undefined {
    const source = this.known.get(file);
    if (!source) return undefined;
    if (!source.locate || line > source.outputLines) return "hidden";
    const place = source.locate(line - 1, column - 1);
    if (!place || place.line < source.lead) return "hidden";
    return { name: source.name, line: place.line - source.lead + 1, column: place.column + 1 };
  }

  /** The lines of a cell around a place, with a caret (or a rule of `length` characters) under it. */
  excerpt(place: SourcePlace, length = 1): string[] {
    const text = [...this.known.values()].find((source) => source.name === place.name)?.text;
    if (!text || place.line > text.length) return [];
    const width = String(place.line + 1).length;
    const lines: string[] = [];
    for (let number = Math.max(1, place.line - 1); number <= Math.min(text.length, place.line + 1); number++) {
      const here = number === place.line;
      const quoted = text[number - 1].replace(/\r$/, "");
      lines.push(`${here ? ">" : " "} ${String(number).padStart(width)} | ${shorten(quoted)}`.trimEnd());
      if (!here || place.column > longestLine) continue;
      // Tabs stay tabs so that the caret stands under its character however wide they are shown.
      const indent = quoted.slice(0, place.column - 1).replace(/[^\t]/g, " ");
      const rule = length > 1 ? "~".repeat(Math.min(length, quoted.length - place.column + 1)) : "^";
      lines.push(`  ${" ".repeat(width)} | ${indent}${rule || "^"}`);
    }
    return lines;
  }
}

const longestLine = 200;

function shorten(line: string): string {
  return line.length > longestLine ? `${line.slice(0, longestLine)} ...` : line;
}
