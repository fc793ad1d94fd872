/**
 * A chart: a Vega-Lite specification, the picture made from it, and words for those who see neither.
 */
import { visibleText } from "../escape";
import { type Displayable, displaySymbol, type MimeBundle } from "../sink";
import { ink } from "./palette";
import { renderSvg } from "./renderSvg";
import { wrapText } from "./textWidth";

/** A Vega-Lite specification as plain data. */
export interface VegaLiteSpec {
  readonly $schema: string;
  readonly [property: string]: unknown;
}

/** A chart that can be shown. */
export interface Chart extends Displayable {
  readonly title: string;
  /** What the chart shows, in a sentence: the alternative text of the picture. */
  readonly description: string;
  readonly spec: VegaLiteSpec;
  /** Title, description and the ends of each series, as plain text. */
  toText(): string;
  toSvg(): Promise<string>;
  /** `application/vnd.vegalite.v5+json`, `image/svg+xml` and `text/plain`; no HTML, which would win over the picture. */
  bundle(): Promise<MimeBundle>;
}

/** The media type that JupyterLab 4 and VS Code draw themselves; they know Vega-Lite up to version 5. */
export const vegaLiteMediaType = "application/vnd.vegalite.v5+json";

const schema = "https://vega.github.io/schema/vega-lite/v5.json";
const font = "Helvetica, Arial, 'Liberation Sans', 'DejaVu Sans', sans-serif";

/** The look that all charts share; transparent, with ink that can be read on white and on dark. */
const config = {
  font,
  aria: false,
  axis: {
    labelColor: ink,
    titleColor: ink,
    tickColor: ink,
    domainColor: ink,
    gridColor: ink,
    gridOpacity: 0.2,
    labelFontSize: 12,
    titleFontSize: 13,
    titleFontWeight: 600,
    titlePadding: 8,
    labelOverlap: "greedy",
    tickSize: 4,
  },
  title: { color: ink, fontSize: 15, fontWeight: 600, anchor: "start", offset: 10, lineHeight: 19 },
  text: { color: ink, fontSize: 12 },
  view: { stroke: null },
};

/** What a chart function hands over: its views and the words that go with them. */
export interface ChartParts {
  readonly caller: string;
  readonly title: string;
  readonly description: string;
  readonly width: number;
  readonly views: readonly Record<string, unknown>[];
  readonly lines: readonly string[];
}

/** Fails when a chart lacks the words that it must have. */
export function checkWords(caller: string, words: { readonly title: string; readonly description: string }): void {
  for (const name of ["title", "description"] as const) {
    if (typeof words[name] !== "string" || words[name].trim() === "") {
      throw new RangeError(`${caller}: ${name} must be text that is not empty, got ${JSON.stringify(words[name])}`);
    }
  }
}

/** Puts views one under the other under a title. */
export function makeChart({ caller, title, description, width, views, lines }: ChartParts): Chart {
  checkWords(caller, { title, description });
  const spec: VegaLiteSpec = {
    $schema: schema,
    title: { text: wrapText(visibleText(title), width, config.title.fontSize, true) },
    description: visibleText(description),
    background: "transparent",
    padding: 6,
    config,
    spacing: 14,
    vconcat: views,
  };
  const toText = (): string => [visibleText(title), visibleText(description), ...lines].join("\n");
  let drawn: Promise<string> | undefined;
  const toSvg = (): Promise<string> => {
    drawn ??= renderSvg(spec);
    return drawn;
  };
  const bundle = async (): Promise<MimeBundle> => ({
    [vegaLiteMediaType]: spec,
    "image/svg+xml": await toSvg(),
    "text/plain": toText(),
  });
  const chart: Chart = { title, description, spec, toText, toSvg, bundle, [displaySymbol]: bundle };
  Object.defineProperty(chart, Symbol.for("nodejs.util.inspect.custom"), { value: toText, enumerable: false });
  return chart;
}
