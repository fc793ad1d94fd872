/**
 * Executed notebooks as one HTML page that stands alone: it fetches nothing and runs nothing.
 *
 * The notebooks are taken for hostile, for they may come from anywhere: Markdown is read without raw HTML, HTML outputs
 * pass a list of what is allowed, SVG becomes a picture in which no script runs, and a policy in the page forbids
 * everything else.
 */
import { escapeHtml } from "../display/escape";
import { codeHtml } from "./htmlReport/code";
import { type Heading, renderMarkdown } from "./htmlReport/markdown";
import { type OutputBudget, outputLimits, outputsHtml } from "./htmlReport/outputs";
import { page } from "./htmlReport/page";
import { type MultilineText, type NotebookCell, type NotebookFile, plainText } from "./notebookFile";

/** How a report is made. */
export interface HtmlReportOptions {
  /** Title of the page; default: the first heading of the notebook, or the names of the notebooks. */
  readonly title?: string | undefined;
}

/** A notebook with the name it has in the report. */
export interface NamedNotebook {
  readonly name: string;
  readonly notebook: NotebookFile;
}

interface Article {
  readonly html: string;
  readonly headings: readonly Heading[];
}

/** Sources longer than this are cut; nobody reads them in a report. */
const longestSource = 200_000;

function sourceOf(source: MultilineText): string {
  const text = plainText(source);
  if (text.length <= longestSource) return text;
  return `${text.slice(0, longestSource)}\n// ${text.length - longestSource} more characters are not shown`;
}

/** Pictures that a Markdown cell carries, as data URLs. */
function attachmentsOf(cell: NotebookCell): Map<string, string> {
  const result = new Map<string, string>();
  if (cell.cell_type === "code" || typeof cell.attachments !== "object" || cell.attachments === null) return result;
  for (const [name, bundle] of Object.entries(cell.attachments)) {
    for (const [type, content] of Object.entries(bundle ?? {})) {
      if (typeof content !== "string" || !/^image\/(png|jpeg|gif|webp)$/.test(type)) continue;
      if (content.length <= outputLimits.picture) result.set(name, `data:${type};base64,${content.replace(/\s/g, "")}`);
    }
  }
  return result;
}

function articleOf(notebook: NotebookFile, id: string, shift: number, budget: OutputBudget): Article {
  const headings: Heading[] = [];
  const parts = notebook.cells.map((cell, index) => {
    const cellId = `${id}-c${index + 1}`;
    if (cell.cell_type === "markdown") {
      const place = { idPrefix: cellId, shift, attachments: attachmentsOf(cell) };
      const rendered = renderMarkdown(sourceOf(cell.source), place);
      headings.push(...rendered.headings);
      return `<div class="cell prose">\n${rendered.html}</div>`;
    }
    if (cell.cell_type === "raw") {
      const text = sourceOf(cell.source).split("\n").map(escapeHtml).join("\n");
      return `<div class="cell"><pre class="plain" tabindex="0">${text}</pre></div>`;
    }
    const number = Number.isInteger(cell.execution_count) ? `[${cell.execution_count}]` : "not run";
    const source = sourceOf(cell.source);
    const code =
      source.trim() === ""
        ? ""
        : `<pre class="source" tabindex="0" aria-label="Code of cell ${index + 1}"><code>${codeHtml(source)}</code></pre>\n`;
    const outputs = outputsHtml(cell.outputs, cellId, budget);
    if (code === "" && outputs === "") return "";
    return `<div class="cell cell-code">\n<p class="count">${number}</p>\n${code}${outputs}\n</div>`;
  });
  return { html: parts.filter((part) => part !== "").join("\n"), headings };
}

function headingHtml(title: string): string {
  return `<h1>${escapeHtml(title)}</h1>`;
}

function contents(entries: readonly Heading[]): string {
  if (entries.length < 2) return "";
  const lines = entries.map(({ id, text }) => `<li><a href="#${escapeHtml(id)}">${escapeHtml(text)}</a></li>`);
  return `<nav aria-label="Contents">\n<p class="nav-title">Contents</p>\n<ul>\n${lines.join("\n")}\n</ul>\n</nav>\n`;
}

/**
 * One notebook as a page.
 *
 * @param notebook the executed notebook
 * @param options the title
 * @returns a whole HTML document; outputs beyond the limits of `outputLimits` are cut with a line that says so
 */
export function notebookToHtml(notebook: NotebookFile, options: HtmlReportOptions = {}): string {
  const budget = { left: outputLimits.total };
  const own = articleOf(notebook, "n1", 0, budget);
  const first = own.headings.find((heading) => heading.level === 1);
  const title = options.title ?? first?.text ?? "Notebook";
  // A page has one main heading: the notebook's own where it has one and no other title was asked for.
  const needsHeading = first === undefined || (options.title !== undefined && options.title !== first.text);
  const shift = needsHeading && first !== undefined ? 1 : 0;
  const article = shift === 0 ? own : articleOf(notebook, "n1", shift, { left: outputLimits.total });
  // A heading that opens the notebook moves up into the page's head, before the table of contents.
  const opening = needsHeading ? undefined : /^<div class="cell prose">\n(<h1 [^>]*>.*?<\/h1>)\n/.exec(article.html);
  const body = opening ? `<div class="cell prose">\n${article.html.slice(opening[0].length)}` : article.html;
  return page({
    title,
    heading: needsHeading ? headingHtml(title) : (opening?.[1] ?? ""),
    navigation: contents(article.headings.filter((heading) => heading.level === 2)),
    content: `<article>\n${body}\n</article>`,
  });
}

/**
 * Several notebooks as one page, in the order given.
 *
 * @param notebooks name and content of each
 * @param options the title
 * @returns a whole HTML document
 */
export function notebooksToHtml(notebooks: readonly NamedNotebook[], options: HtmlReportOptions = {}): string {
  const only = notebooks[0];
  if (notebooks.length === 1 && only !== undefined) {
    return notebookToHtml(only.notebook, { title: options.title ?? undefined });
  }
  const budget = { left: outputLimits.total };
  const title = options.title ?? (notebooks.map(({ name }) => name).join(", ") || "No notebooks");
  const entries: Heading[] = [];
  const articles = notebooks.map(({ name, notebook }, index) => {
    const id = `n${index + 1}`;
    const article = articleOf(notebook, id, 1, budget);
    const titled = article.headings.some((heading) => heading.level === 2);
    const main = article.headings.find((heading) => heading.level === 2);
    entries.push({ id: titled && main !== undefined ? main.id : id, level: 2, text: main?.text ?? name });
    const head = titled ? "" : `<h2 id="${id}">${escapeHtml(name)}</h2>\n`;
    return `<article aria-label="${escapeHtml(name)}">\n${head}${article.html}\n</article>`;
  });
  return page({ title, heading: headingHtml(title), navigation: contents(entries), content: articles.join("\n") });
}
