/**
 * Formulas in Markdown: `$...$` within a line, `$$...$$` and `\begin{...}` on lines of their own, set as MathML, which
 * browsers draw without fonts or scripts of the page.
 */
import katex from "katex";
import type MarkdownIt from "markdown-it";
import { escapeHtml } from "../../display/escape";

/** A formula in TeX as MathML; one that TeX would refuse is shown as it was written. */
export function formulaHtml(tex: string, display: boolean): string {
  try {
    return katex.renderToString(tex, {
      output: "mathml",
      displayMode: display,
      throwOnError: true,
      strict: "ignore",
      trust: false,
      maxExpand: 500,
      maxSize: 20,
    });
  } catch {
    const fence = display ? "$$" : "$";
    return `<code class="formula-refused">${escapeHtml(`${fence}${tex}${fence}`)}</code>`;
  }
}

/**
 * Teaches a Markdown reader formulas. A dollar sign opens a formula only before a character that is not a space, and
 * closes one only after such a character and not before a digit, so that prices stay prices.
 */
export function formulas(markdown: MarkdownIt): void {
  markdown.inline.ruler.before("escape", "formula", (state, silent) => {
    const { src, pos: start, posMax } = state;
    if (src[start] !== "$") return false;
    const fence = src.startsWith("$$", start) ? "$$" : "$";
    const from = start + fence.length;
    if (from >= posMax || (fence === "$" && /\s/.test(src[from] as string))) return false;
    let end = src.indexOf(fence, from);
    while (end >= 0 && (src[end - 1] === "\\" || (fence === "$" && /\s/.test(src[end - 1] as string)))) {
      end = src.indexOf(fence, end + 1);
    }
    if (end < 0 || end === from || end + fence.length > posMax) return false;
    if (fence === "$" && /\d/.test(src[end + 1] ?? "")) return false;
    if (!silent) {
      const token = state.push("formula", "math", 0);
      token.content = src.slice(from, end);
      token.meta = { display: fence === "$$" };
    }
    state.pos = end + fence.length;
    return true;
  });
  markdown.block.ruler.before(
    "fence",
    "formula_block",
    (state, startLine, endLine, silent) => {
      const lineText = (line: number): string =>
        state.src.slice((state.bMarks[line] as number) + (state.tShift[line] as number), state.eMarks[line]);
      const first = lineText(startLine);
      const environment = /^\\begin\{([a-zA-Z]+\*?)\}/.exec(first)?.[1];
      const closing = environment === undefined ? "$$" : `\\end{${environment}}`;
      if (environment === undefined && !first.startsWith("$$")) return false;
      let text = "";
      for (let line = startLine; line < endLine; line++) {
        text += line === startLine ? lineText(line) : `\n${lineText(line)}`;
        const body = environment === undefined ? text.slice(2) : text;
        const end = body.indexOf(closing);
        if (end < 0) continue;
        if (body.slice(end + closing.length).trim() !== "") return false;
        if (silent) return true;
        const token = state.push("formula_block", "math", 0);
        token.block = true;
        token.content = environment === undefined ? body.slice(0, end) : body.slice(0, end + closing.length);
        token.map = [startLine, line + 1];
        state.line = line + 1;
        return true;
      }
      return false;
    },
    { alt: ["paragraph", "reference", "blockquote", "list"] },
  );
  markdown.renderer.rules["formula"] = (tokens, index) => {
    const token = tokens[index];
    return formulaHtml(token?.content ?? "", (token?.meta as { display: boolean } | null)?.display === true);
  };
  markdown.renderer.rules["formula_block"] = (tokens, index) =>
    `<p class="formula">${formulaHtml(tokens[index]?.content ?? "", true)}</p>\n`;
}
