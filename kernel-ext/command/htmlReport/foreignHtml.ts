/**
 * HTML from a notebook's outputs, which may come from anywhere: only what tables and text need is kept, by a list of what
 * is allowed. No scripts, no style, no ids, no forms, no frames, no address is fetched.
 */
import sanitizeHtml from "sanitize-html";
import { pictureData } from "./markdown";

/** Classes that this program's own outputs use; the report's style sheet knows them, all others are dropped. */
const ownClasses = [
  "cell-output",
  "cell-scroll",
  "cell-table",
  "cell-heading",
  "cell-summary",
  "cell-label",
  "cell-notes",
  "cell-sources",
  "cell-symbol",
  "cell-unit",
  "cell-chart",
  "cell-progress",
  "cell-left",
  "cell-right",
  "cell-center",
  "cell-point",
];

const allowedTags = (
  "div p span br hr table caption thead tbody tfoot tr th td ul ol li dl dt dd h1 h2 h3 h4 h5 h6 " +
  "b strong i em u s small sub sup code pre blockquote figure figcaption details summary progress img a"
).split(" ");

/** The allowed part of an HTML text. */
export function allowedHtml(html: string): string {
  return sanitizeHtml(html, {
    allowedTags,
    nonTextTags: ["script", "style", "textarea", "option", "noscript", "title", "template", "iframe", "svg", "math"],
    allowedAttributes: {
      th: ["scope", "colspan", "rowspan", "class"],
      td: ["colspan", "rowspan", "class"],
      ol: ["start", "class"],
      progress: ["max", "value", "aria-label"],
      img: ["src", "alt", "class"],
      a: ["href", "rel"],
      div: ["class", "role", "aria-label", "tabindex"],
      table: ["class"],
      ul: ["class"],
      p: ["class"],
      span: ["class"],
      details: ["open"],
    },
    allowedClasses: { "*": ownClasses },
    allowedSchemes: ["http", "https", "mailto"],
    allowedSchemesByTag: { img: ["data"] },
    allowProtocolRelative: false,
    nestingLimit: 60,
    transformTags: {
      a: (tagName, attributes) => ({ tagName, attribs: { ...attributes, rel: "noopener noreferrer" } }),
      div: (tagName, attributes) => {
        const kept = { ...attributes };
        // Only a scrolling table is worth a stop of the keyboard, and only as what it is.
        if (kept["class"] !== "cell-scroll" || kept["tabindex"] !== "0" || kept["role"] !== "group") {
          delete kept["tabindex"];
          delete kept["role"];
        }
        return { tagName, attribs: kept };
      },
      // Headings inside an output must not take part in the order of the page's own.
      ...Object.fromEntries(
        ["h1", "h2", "h3", "h4", "h5", "h6"].map((tag) => [tag, sanitizeHtml.simpleTransform("p", {}, false)]),
      ),
    },
    exclusiveFilter: (frame) => frame.tag === "img" && !pictureData.test(frame.attribs["src"] ?? ""),
  });
}
