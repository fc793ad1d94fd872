/**
 * The source of a code cell as HTML, with comments, strings, numbers and keywords told apart.
 */
import { escapeHtml } from "../../display/escape";

const keywords = new Set(
  (
    "abstract as async await break case catch class const continue declare default delete do else enum export extends " +
    "false finally for from function get if implements import in infer instanceof interface is keyof let namespace new " +
    "null of private protected public readonly return satisfies set static super switch this throw true try type typeof " +
    "undefined var void while yield"
  ).split(" "),
);

/** Comment, string (a template as a whole), number, word; everything else passes as it is. */
const token =
  /(\/\/[^\n]*|\/\*[\s\S]*?(?:\*\/|$))|("(?:[^"\\\n]|\\.)*"?|'(?:[^'\\\n]|\\.)*'?|`(?:[^`\\]|\\[\s\S])*`?)|(\b\d[\w.]*)|([A-Za-z_$][\w$]*)/g;

function escapeLines(text: string): string {
  return text
    .split(/\r\n|\r|\n/)
    .map((line) => escapeHtml(line.replaceAll("\t", "  ")))
    .join("\n");
}

/** TypeScript source as the content of a `code` element. */
export function codeHtml(source: string): string {
  let html = "";
  let last = 0;
  for (const match of source.matchAll(token)) {
    const [text, comment, quoted, number, word] = match;
    html += escapeLines(source.slice(last, match.index));
    last = match.index + text.length;
    const kind =
      comment !== undefined
        ? "comment"
        : quoted !== undefined
          ? "string"
          : number !== undefined
            ? "number"
            : word !== undefined && keywords.has(word)
              ? "keyword"
              : "";
    html += kind === "" ? escapeLines(text) : `<span class="code-${kind}">${escapeLines(text)}</span>`;
  }
  return html + escapeLines(source.slice(last));
}
