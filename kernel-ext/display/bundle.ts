/**
 * The output of a cell: tables, charts, notes and sources around plain values.
 *
 * How it is shown. Every front end picks one media type of a bundle, each by its own order: Notebook 6 and nbconvert
 * prefer HTML to SVG, JupyterLab and VS Code may prefer Vega-Lite to HTML. A single bundle with all of them would lose
 * the tables in some and the charts in others. Therefore each chart is a display of its own (Vega-Lite 5, SVG, plain
 * text; no HTML), sent before the cell's result, and the result carries tables, notes and sources as HTML and plain text
 * (no SVG, no Vega-Lite). Without a kernel that takes displays, the charts stand inside the HTML as pictures. The plain
 * text says everything by itself, the charts in words.
 */
import type { Chart } from "./chart/chart";
import { escapeHtml, visibleText } from "./escape";
import { type Displayable, displaySink, displaySymbol, type MimeBundle } from "./sink";
import type { Table } from "./table";
import { outputStyle } from "./tableStyle";

/** A source that an output names. */
export interface SourceLine {
  readonly key: string;
  /** Author, year, title or equation, as a reader would look it up. */
  readonly citation: string;
}

/** What an output is made from. */
export interface CellOutputOptions<V = undefined> {
  readonly title: string;
  /** The headline in a sentence or two. */
  readonly summary?: string | undefined;
  readonly tables?: readonly Table[] | undefined;
  readonly charts?: readonly Chart[] | undefined;
  readonly notes?: readonly string[] | undefined;
  readonly sources?: readonly SourceLine[] | undefined;
  /** What the next cell uses. */
  readonly values: V;
}

/**
 * What a cell helper returns: values to go on with, and the output that shows them.
 *
 * It shows itself when it is the last expression of a cell; `show()` does so in the middle of one.
 */
export class CellResult<V = undefined> implements Displayable {
  /** Plain values for the next cell. */
  readonly values: V;
  readonly title: string;
  readonly summary: string;
  readonly tables: readonly Table[];
  readonly charts: readonly Chart[];
  readonly notes: readonly string[];
  readonly sources: readonly SourceLine[];

  constructor(options: CellOutputOptions<V>) {
    if (typeof options.title !== "string" || options.title === "") {
      throw new RangeError(`cellOutput: title must be text that is not empty, got ${String(options.title)}`);
    }
    this.values = options.values;
    this.title = options.title;
    this.summary = options.summary ?? "";
    this.tables = [...(options.tables ?? [])];
    this.charts = [...(options.charts ?? [])];
    this.notes = [...new Set(options.notes ?? [])];
    const seen = new Set<string>();
    this.sources = (options.sources ?? []).filter(({ key }) => !seen.has(key) && seen.add(key));
  }

  /** The whole output as plain text. */
  toText(): string {
    const title = visibleText(this.title);
    const parts = [`${title}\n${"=".repeat([...title].length)}`];
    if (this.summary !== "") parts.push(visibleText(this.summary));
    for (const chart of this.charts) parts.push(`Chart: ${chart.toText()}`);
    for (const table of this.tables) parts.push(table.toText());
    if (this.notes.length > 0) parts.push(`Notes\n${this.notes.map((note) => `* ${visibleText(note)}`).join("\n")}`);
    if (this.sources.length > 0) {
      const lines = this.sources.map(({ key, citation }) => `[${visibleText(key)}] ${visibleText(citation)}`);
      parts.push(`Sources\n${lines.join("\n")}`);
    }
    return parts.join("\n\n");
  }

  /**
   * The output as an HTML fragment, without the charts unless pictures of them are handed in.
   *
   * @param pictures one SVG a chart, put in as data inside `img` elements, where no script runs and no id clashes
   */
  toHtml(pictures: readonly string[] = []): string {
    const parts = [`<p class="cell-heading">${escapeHtml(this.title)}</p>`];
    if (this.summary !== "") parts.push(`<p class="cell-summary">${escapeHtml(this.summary)}</p>`);
    for (const [index, svg] of pictures.entries()) {
      const chart = this.charts[index];
      const words = escapeHtml(chart === undefined ? "" : `${chart.title}. ${chart.description}`);
      const data = Buffer.from(svg, "utf8").toString("base64");
      parts.push(`<img class="cell-chart" alt="${words}" src="data:image/svg+xml;base64,${data}">`);
    }
    for (const table of this.tables) parts.push(table.toHtmlBody());
    if (this.notes.length > 0) {
      parts.push('<p class="cell-label">Notes</p>');
      parts.push(`<ul class="cell-notes">${this.notes.map((note) => `<li>${escapeHtml(note)}</li>`).join("")}</ul>`);
    }
    if (this.sources.length > 0) {
      const lines = this.sources.map(
        ({ key, citation }) => `<li><code>${escapeHtml(key)}</code> ${escapeHtml(citation)}</li>`,
      );
      parts.push('<p class="cell-label">Sources</p>');
      parts.push(`<ul class="cell-sources">${lines.join("")}</ul>`);
    }
    return `<div class="cell-output">\n${outputStyle}\n${parts.join("\n")}\n</div>`;
  }

  /** Sends the charts to the sink and gives the bundle of everything else. */
  async [displaySymbol](): Promise<MimeBundle> {
    const sink = displaySink();
    if (sink === undefined) {
      const pictures = await Promise.all(this.charts.map((chart) => chart.toSvg()));
      return { "text/html": this.toHtml(pictures), "text/plain": this.toText() };
    }
    for (const chart of this.charts) sink.show(await chart.bundle());
    return { "text/html": this.toHtml(), "text/plain": this.toText() };
  }

  /** Shows the output now, in the middle of a cell; without a kernel it is written to the console as plain text. */
  async show(): Promise<this> {
    const sink = displaySink();
    const bundle = await this[displaySymbol]();
    if (sink === undefined) console.log(bundle["text/plain"]);
    else sink.show(bundle);
    return this;
  }

  /** What a console prints. */
  [Symbol.for("nodejs.util.inspect.custom")](): string {
    return this.toText();
  }
}

/**
 * Puts an output together.
 *
 * @param options title, tables, charts, notes, sources, and the values that the next cell uses
 * @returns a value that shows itself
 * @example cellOutput({ title: "Distances", tables: [bins], charts: [curve], values: { distance } })
 */
export function cellOutput<V>(options: CellOutputOptions<V>): CellResult<V> {
  return new CellResult(options);
}
