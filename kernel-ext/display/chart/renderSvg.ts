/**
 * The picture of a Vega-Lite specification, drawn on this machine without a browser.
 */
import { createHash } from "node:crypto";
import { escapeHtml } from "../escape";
import { estimatedWidth } from "./textWidth";

/** How a picture is drawn. */
export interface RenderOptions {
  /** Takes each warning that Vega or Vega-Lite logs. Without it a warning is an error. */
  readonly onWarning?: ((warning: string) => void) | undefined;
}

function refuse(uri: unknown): Promise<never> {
  return Promise.reject(new Error(`a chart may not load anything, but asks for ${JSON.stringify(uri)}`));
}

/** A Vega loader that loads nothing: neither files nor addresses, nor images or links in a picture. */
const closedLoader = { load: refuse, sanitize: refuse, http: refuse, file: refuse };

/** A logger that keeps what it is told. */
function listeningLogger(warnings: string[]) {
  const logger = {
    level: () => logger,
    error: (...parts: readonly unknown[]) => {
      warnings.push(parts.map(String).join(" "));
      return logger;
    },
    warn: (...parts: readonly unknown[]) => {
      warnings.push(parts.map(String).join(" "));
      return logger;
    },
    info: () => logger,
    debug: () => logger,
  };
  return logger;
}

/** Loads the libraries; they are ES modules with top-level await, so that `require` cannot. */
async function libraries() {
  const [vega, vegaLite] = await Promise.all([import("vega"), import("vega-lite")]);
  // Without a canvas Vega takes every letter for 0.8 em wide, and leaves broad empty margins.
  const { textMetrics } = vega as unknown as { textMetrics: { width: (item: TextItem, text: unknown) => number } };
  textMetrics.width = (item, text) =>
    Math.ceil(estimatedWidth(String(text ?? ""), item.fontSize ?? 11, isBold(item.fontWeight)));
  return { vega, vegaLite };
}

interface TextItem {
  readonly fontSize?: number;
  readonly fontWeight?: string | number;
}

function isBold(weight: string | number | undefined): boolean {
  return weight === "bold" || Number(weight) >= 600;
}

/** The words of a specification: its title and its description. */
function wordsOf(spec: { readonly [property: string]: unknown }): { title: string; description: string } {
  const title = spec["title"];
  const text = typeof title === "object" && title !== null ? (title as { text?: unknown }).text : title;
  return {
    title: Array.isArray(text) ? text.join(" ") : String(text ?? ""),
    description: String(spec["description"] ?? ""),
  };
}

/**
 * Draws a specification as SVG.
 *
 * The result is the same for the same specification: coordinates rounded to hundredths of a pixel, ids renumbered under
 * a name made from the content, so that two pictures in one page do not use each other's. It has `role="img"`, a title
 * and a description; it refers to nothing outside.
 *
 * @param spec a Vega-Lite specification with its data inside
 * @param options what happens with warnings
 * @returns the SVG element as text
 * @throws Error when the specification asks to load something, or (without `onWarning`) when a warning is logged
 */
export async function renderSvg(
  spec: { readonly [property: string]: unknown },
  options: RenderOptions = {},
): Promise<string> {
  const { vega, vegaLite } = await libraries();
  const warnings: string[] = [];
  const logger = listeningLogger(warnings);
  const compiled = vegaLite.compile(spec as never, { logger: logger as never }).spec;
  const view = new vega.View(vega.parse(compiled), {
    renderer: "none",
    loader: closedLoader as never,
    logger: logger as never,
  });
  let raw: string;
  try {
    raw = await view.toSVG();
  } finally {
    view.finalize();
  }
  for (const warning of warnings) {
    if (options.onWarning === undefined) {
      throw new Error(`the chart "${wordsOf(spec).title}" was drawn with warnings: ${warnings.join("; ")}`);
    }
    options.onWarning(warning);
  }
  // Named after what is drawn, digits rounded: data that differ in the last bit give the same picture and the same names.
  const drawn = settled(raw, "", wordsOf(spec));
  const name = createHash("sha256").update(drawn).digest("hex").slice(0, 8);
  return settled(raw, name, wordsOf(spec));
}

/** Rounds, renumbers and names. */
function settled(raw: string, name: string, { title, description }: { title: string; description: string }): string {
  const ids = new Map<string, string>();
  for (const [, id] of raw.matchAll(/\sid="([^"]*)"/g)) ids.set(id as string, `chart-${name}-${ids.size}`);
  const body = raw.replace(/<([a-zA-Z]+)((?:\s+[\w:-]+="[^"]*")*)/g, (_, tag: string, attributes: string) => {
    const kept = attributes.replace(/\s+([\w:-]+)="([^"]*)"/g, (_whole, key: string, value: string) => {
      if (key === "class" || /^aria-|^role$/.test(key)) return "";
      if (key === "id") return ` id="${ids.get(value)}"`;
      if (value.includes("url(#")) {
        return ` ${key}="${value.replace(/url\(#([^)]*)\)/g, (_url, id: string) => `url(#${ids.get(id) ?? id})`)}"`;
      }
      return ` ${key}="${key.startsWith("font") ? value : roundedDigits(value)}"`;
    });
    return `<${tag}${kept}`;
  });
  const label = escapeHtml(title);
  const words = `<title>${label}</title><desc>${escapeHtml(description)}</desc>`;
  return body.replace(/^<svg([^>]*)>/, `<svg$1 role="img" aria-label="${label}. ${escapeHtml(description)}">${words}`);
}

/** Numbers with more than two decimals, in an attribute, to hundredths. */
function roundedDigits(value: string): string {
  return value.replace(/-?\d*\.\d{3,}(?:e[-+]?\d+)?/gi, (digits) => String(Number(Number(digits).toFixed(2)) + 0));
}
