/**
 * The one place where text from data is made safe for the place it is shown in: HTML, Markdown, a terminal.
 */

/** Control characters and the marks that reverse the direction of text: invisible, and able to forge what is shown. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are exactly what must be found
const invisible = /[\u0000-\u001f\u007f-\u009f\u061c\u200b\u200e\u200f\u2028-\u202e\u2060-\u2069\ufeff]/g;

/**
 * Makes invisible characters visible, on one line: white space becomes a space, other control characters their control
 * picture (ESC becomes U+241B), direction marks and zero-width characters U+FFFD.
 *
 * @param text any text
 * @returns one line without control characters, safe to write to a terminal
 */
export function visibleText(text: string): string {
  return text.replace(/\r\n|[\n\r\t\v\f\u2028\u2029]/g, " ").replace(invisible, (character) => {
    const code = character.charCodeAt(0);
    if (code < 0x20) return String.fromCharCode(0x2400 + code);
    return code === 0x7f ? "\u2421" : "\ufffd";
  });
}

const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/**
 * Text for an HTML element or a quoted attribute.
 *
 * @param text any text
 * @returns the text with `& < > " '` as entities and invisible characters made visible
 * @example escapeHtml('<b a="1">') // "&lt;b a=&quot;1&quot;&gt;"
 */
export function escapeHtml(text: string): string {
  return visibleText(text).replace(/[&<>"']/g, (character) => entities[character] as string);
}

/**
 * Text for a Markdown paragraph or table cell: nothing in it starts markup, HTML, a link or a formula.
 *
 * @param text any text
 * @returns the text with a backslash before every ASCII punctuation character that Markdown (CommonMark 0.31, section
 * 2.4) or its tables and formulas give a meaning
 * @example escapeMarkdown("z_* | r_s") // "z\\_\\* \\| r\\_s"
 */
export function escapeMarkdown(text: string): string {
  return (
    visibleText(text)
      .replace(/[\\`*_{}[\]()#+!|<>&$~^:"']/g, "\\$&")
      // Only at the start of a line do these mean a list or a heading.
      .replace(/^(\s*)([-=])/, "$1\\$2")
      .replace(/^(\s*\d+)\.(?=\s|$)/, "$1\\.")
  );
}

/** Several lines of text with control characters made visible, line ends kept. */
export function visibleLines(text: string): string {
  return text
    .split(/\r\n|\r|\n/)
    .map(visibleText)
    .join("\n");
}
