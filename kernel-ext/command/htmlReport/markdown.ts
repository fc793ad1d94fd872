/**
 * Markdown cells as HTML: raw HTML in them stays text, links lead only to the web or within the page, and pictures that
 * would have to be fetched become a line that names them.
 */
import MarkdownIt from "markdown-it";
import { escapeHtml } from "../../display/escape";
import { formulas } from "./math";

/** A heading as the table of contents needs it. */
export interface Heading {
  readonly id: string;
  readonly level: number;
  readonly text: string;
}

/** What a Markdown text becomes. */
export interface RenderedMarkdown {
  readonly html: string;
  readonly headings: readonly Heading[];
}

/** Where a Markdown text stands. */
export interface MarkdownPlace {
  /** Start of the ids of its headings. */
  readonly idPrefix: string;
  /** How many levels its headings go down. */
  readonly shift: number;
  /** Pictures that the cell carries: name to data URL. */
  readonly attachments: ReadonlyMap<string, string>;
}

/** Pictures that may stand in the page as data. */
export const pictureData = /^data:image\/(?:png|jpeg|gif|webp|svg\+xml);base64,[A-Za-z0-9+/=\s]*$/;

/** Renders one Markdown text. */
export function renderMarkdown(source: string, place: MarkdownPlace): RenderedMarkdown {
  const markdown = new MarkdownIt({ html: false, linkify: false, typographer: false });
  markdown.use(formulas);
  const headings: Heading[] = [];
  markdown.validateLink = (url) => /^(?:https?:|mailto:|#|attachment:|data:image\/)/i.test(url.trim());
  markdown.core.ruler.push("headings", (state) => {
    for (const [index, token] of state.tokens.entries()) {
      if (token.type !== "heading_open" && token.type !== "heading_close") continue;
      const level = Math.min(6, Number(token.tag.slice(1)) + place.shift);
      token.tag = `h${level}`;
      if (token.type === "heading_close") continue;
      const id = `${place.idPrefix}-${headings.length + 1}`;
      token.attrSet("id", id);
      headings.push({ id, level, text: plainHeading(state.tokens[index + 1]?.children ?? []) });
    }
  });
  markdown.renderer.rules["link_open"] = (tokens, index) => {
    const href = tokens[index]?.attrGet("href") ?? "";
    if (!/^(?:https?:|mailto:|#)/i.test(href)) return "<a>";
    return `<a href="${escapeHtml(href)}" rel="noopener noreferrer">`;
  };
  markdown.renderer.rules["image"] = (tokens, index) => {
    const token = tokens[index];
    const source = token?.attrGet("src") ?? "";
    const words = token?.content ?? "";
    const name = /^attachment:(.*)$/i.exec(source)?.[1];
    const data = name === undefined ? source : (place.attachments.get(decoded(name)) ?? "");
    if (pictureData.test(data)) return `<img src="${escapeHtml(data)}" alt="${escapeHtml(words)}">`;
    return `<span class="left-out">[picture not included: ${escapeHtml(words || source)}]</span>`;
  };
  return { html: markdown.render(source), headings };
}

function decoded(name: string): string {
  try {
    return decodeURIComponent(name);
  } catch {
    return name;
  }
}

function plainHeading(children: readonly { readonly type: string; readonly content: string }[]): string {
  return children.map((child) => (child.type === "softbreak" ? " " : child.content)).join("");
}
