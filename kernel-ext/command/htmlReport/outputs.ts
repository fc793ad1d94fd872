/**
 * What a cell put out, as HTML. Every output is taken for hostile: only text, allowed HTML and pictures as data get in.
 */
import { ink } from "../../display/chart/palette";
import { formatNumber } from "../../display/digits";
import { escapeHtml, visibleLines } from "../../display/escape";
import type { NotebookOutput } from "../notebookFile";
import { allowedHtml } from "./foreignHtml";
import { pictureData, renderMarkdown } from "./markdown";
import { formulaHtml } from "./math";

/** Sizes up to which outputs are shown, in characters. */
export interface OutputLimits {
  /** One text. */
  readonly text: number;
  /** One HTML output. */
  readonly html: number;
  /** One picture. */
  readonly picture: number;
  /** All outputs of the report together. */
  readonly total: number;
  /** Outputs of one cell. */
  readonly count: number;
}

/** The limits of a report. */
export const outputLimits: OutputLimits = {
  text: 100_000,
  html: 1_000_000,
  picture: 6_000_000,
  total: 60_000_000,
  count: 200,
};

/** How much room is left in the report. */
export interface OutputBudget {
  left: number;
}

/** Text of a bundle's entry, whichever way nbformat stored it; undefined when it is no text. */
function textOf(value: unknown): string | undefined {
  if (typeof value === "string") return value;
  if (Array.isArray(value) && value.every((line) => typeof line === "string")) return value.join("");
  return undefined;
}

function leftOut(what: string): string {
  return `<p class="left-out">${escapeHtml(what)}</p>`;
}

function count(value: number): string {
  return formatNumber(value, { digits: "all" });
}

/** Terminal text as a person sees it: no color codes, and of a line that was overwritten only its last state. */
function terminalText(text: string): string {
  const bare = text
    // biome-ignore lint/suspicious/noControlCharactersInRegex: terminal color codes start with this one
    .replace(/\u001b\[[0-9;?]*[A-Za-z]/g, "")
    .replace(/\r\n/g, "\n")
    .split("\n")
    .map((line) => line.replace(/\r+$/, "").replace(/^.*\r/s, ""))
    .join("\n");
  return visibleLines(bare.replaceAll("\t", "    "));
}

function preformatted(text: string, kind: string): string {
  const cut = text.length > outputLimits.text;
  const shown = terminalText(cut ? text.slice(0, outputLimits.text) : text).replace(/\n+$/, "");
  const lines = shown.split("\n").map(escapeHtml).join("\n");
  const note = cut ? leftOut(`${count(text.length - outputLimits.text)} more characters are not shown.`) : "";
  return `<pre class="${kind}" tabindex="0">${lines}</pre>${note}`;
}

/** A picture of this program's charts in stronger ink, for the report decides itself when its page is dark. */
function inkedSvg(svg: string): string {
  const rules = (color: string): string => `[fill="${ink}"]{fill:${color}}[stroke="${ink}"]{stroke:${color}}`;
  const style = `<style>${rules("#4d5560")}@media (prefers-color-scheme:dark){${rules("#b9c0c9")}}</style>`;
  return svg.includes(`"${ink}"`) ? svg.replace(/<svg[^>]*>/, (tag) => tag + style) : svg;
}

function picture(source: string, words: string): string {
  if (source.length > outputLimits.picture) {
    return leftOut(`A picture of ${count(source.length)} characters is not shown: ${words}`);
  }
  return `<img class="cell-chart" src="${source}" alt="${escapeHtml(words)}">`;
}

/** The alternative text of a picture: the first lines of its plain text. */
function wordsOf(data: Readonly<Record<string, unknown>>): string {
  const plain = textOf(data["text/plain"]) ?? "";
  const lines = plain.split("\n").filter((line) => line.trim() !== "" && !/^\s/.test(line));
  const words = lines.slice(0, 2).join(" ").slice(0, 600);
  return words === "" ? "Picture without a description" : words;
}

function bundleHtml(data: Readonly<Record<string, unknown>>, idPrefix: string): string {
  const html = textOf(data["text/html"]);
  const plain = textOf(data["text/plain"]);
  if (html !== undefined && html.length <= outputLimits.html) {
    const kept = allowedHtml(html);
    if (kept.trim() !== "") return kept;
  }
  const svg = textOf(data["image/svg+xml"]);
  if (svg !== undefined) {
    const source = `data:image/svg+xml;base64,${Buffer.from(inkedSvg(svg), "utf8").toString("base64")}`;
    return picture(source, wordsOf(data));
  }
  for (const type of ["image/png", "image/jpeg", "image/gif", "image/webp"]) {
    const content = textOf(data[type]);
    if (content === undefined) continue;
    const source = `data:${type};base64,${content.replace(/\s/g, "")}`;
    return pictureData.test(source) ? picture(source, wordsOf(data)) : leftOut("A picture that cannot be read.");
  }
  const markdown = textOf(data["text/markdown"]);
  if (markdown !== undefined && markdown.length <= outputLimits.text) {
    return renderMarkdown(markdown, { idPrefix, shift: 3, attachments: new Map() }).html;
  }
  const latex = textOf(data["text/latex"]);
  if (latex !== undefined && latex.length <= 10_000)
    return formulaHtml(latex.trim().replace(/^\${1,2}|\${1,2}$/g, ""), true);
  if (plain !== undefined) return preformatted(plain, "plain");
  const types = Object.keys(data);
  return types.length === 0 ? "" : leftOut(`Not shown here: ${types.slice(0, 5).join(", ")}`);
}

function outputHtml(output: NotebookOutput, idPrefix: string): string {
  switch (output.output_type) {
    case "stream":
      return preformatted(textOf(output.text) ?? "", output.name === "stderr" ? "stream stream-error" : "stream");
    case "display_data":
    case "execute_result":
      return typeof output.data === "object" && output.data !== null ? bundleHtml(output.data, idPrefix) : "";
    case "error": {
      const trace = textOf(output.traceback) ?? "";
      const joined = Array.isArray(output.traceback) ? output.traceback.map(String).join("\n") : trace;
      const head = `${String(output.ename)}: ${String(output.evalue)}`;
      return `<div class="error" role="group" aria-label="Error"><p class="error-head">${escapeHtml(head)}</p>${
        joined.trim() === "" ? "" : preformatted(joined, "trace")
      }</div>`;
    }
    default:
      return leftOut("An output of a kind that is not known is not shown.");
  }
}

/** All outputs of a cell. */
export function outputsHtml(outputs: readonly NotebookOutput[], idPrefix: string, budget: OutputBudget): string {
  const parts: string[] = [];
  for (const [index, output] of outputs.entries()) {
    if (index >= outputLimits.count) {
      parts.push(leftOut(`${count(outputs.length - index)} more outputs of this cell are not shown.`));
      break;
    }
    if (typeof output !== "object" || output === null) continue;
    const html = outputHtml(output, `${idPrefix}-o${index + 1}`);
    if (html.length > budget.left) {
      parts.push(leftOut("This output is not shown: the report has reached its largest size."));
      continue;
    }
    budget.left -= html.length;
    if (html !== "") parts.push(`<div class="output">${html}</div>`);
  }
  return parts.length === 0 ? "" : `<div class="outputs">\n${parts.join("\n")}\n</div>`;
}
