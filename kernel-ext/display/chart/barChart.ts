/**
 * Bars from zero, one row a name: how strongly, and in which direction, several things act on one or more others.
 */
import { formatNumber } from "../digits";
import { visibleText } from "../escape";
import { quantityText, symbolText } from "../symbol";
import { type ChartAxis, positionEncoding, type SettledAxis, settleAxis } from "./axis";
import { type Chart, checkWords, makeChart } from "./chart";
import { keyView, pointMark } from "./key";
import { ink, type SeriesLook, seriesLook, seriesLooks } from "./palette";
import { estimatedWidth } from "./textWidth";
import { chartDigits } from "./thin";

/** One bar. */
export interface ChartBar {
  /** The group whose look the bar has, named in the key. */
  readonly group: string;
  readonly value: number;
  /** How the value is written at the right; default: three digits. */
  readonly text?: string | undefined;
}

/** The bars that stand beside one name. */
export interface BarRow {
  readonly label: string;
  readonly bars: readonly ChartBar[];
}

/** Rows on one axis, which must be linear. */
export interface BarPanel {
  readonly axis: ChartAxis;
  readonly rows: readonly BarRow[];
}

/** What a bar chart is made from. */
export interface BarChartOptions {
  readonly title: string;
  readonly description: string;
  /** One panel a unit, each with an axis of its own. */
  readonly panels: readonly BarPanel[];
  readonly width?: number | undefined;
}

const caller = "barChart";
const barHeight = 17;
const rowGap = 9;

/**
 * A chart of horizontal bars that start at zero, the figures written at the right.
 *
 * Each group has its own colour, dash and, at the end of the bar, point shape.
 *
 * @param options title, description, panels
 * @returns the chart; see `Chart`
 * @throws RangeError when a value is not finite, an axis is not linear, or a panel or a row is empty
 * @example barChart({ title: "Effect", description: "One up, one down.", panels: [{ axis: { label: "slope" }, rows: [
 *   { label: "first", bars: [{ group: "a", value: 0.2 }] }, { label: "second", bars: [{ group: "a", value: -0.1 }] }] }] })
 */
export function barChart(options: BarChartOptions): Chart {
  checkWords(caller, options);
  const { panels } = options;
  const width = options.width ?? 380;
  if (!(panels.length > 0)) throw new RangeError(`${caller}: there must be at least one panel, got none`);
  for (const panel of panels) checkPanel(panel);
  const groups = [...new Set(panels.flatMap(({ rows }) => rows.flatMap(({ bars }) => bars.map(({ group }) => group))))];
  if (groups.length > seriesLooks.length) {
    throw new RangeError(`${caller}: at most ${seriesLooks.length} groups can be told apart, got ${groups.length}`);
  }
  const looks = new Map(groups.map((group, index) => [group, seriesLook(index)]));
  const entries = groups.map((label, index) => ({ label, look: seriesLook(index), line: true, filled: true }));
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width: width + 240,
    views: [...keyView(entries, width), ...panels.map((panel) => panelView(panel, looks, width))],
    lines: panels.flatMap(({ axis, rows }) => [
      `  ${quantityText(axis.label, axis.symbol, axis.unit)}`,
      ...rows.flatMap(({ label, bars }) =>
        bars.map((bar) => `    ${visibleText(label)}: ${textOf(bar)} (${visibleText(bar.group)})`),
      ),
    ]),
  });
}

function checkPanel({ axis, rows }: BarPanel): void {
  const panel = `panel "${quantityText(axis.label, axis.symbol)}"`;
  if ((axis.scale ?? "linear") !== "linear") {
    throw new RangeError(`${caller}: ${panel} must have a linear axis, for bars start at zero, got ${axis.scale}`);
  }
  if (!(rows.length > 0)) throw new RangeError(`${caller}: ${panel} must have at least one row, got none`);
  for (const { label, bars } of rows) {
    if (!(bars.length > 0)) throw new RangeError(`${caller}: ${panel}, row "${label}" must have a bar, got none`);
    for (const { value } of bars) {
      if (!Number.isFinite(value)) {
        throw new RangeError(`${caller}: ${panel}, row "${label}": value must be finite, got ${String(value)}`);
      }
    }
  }
}

function textOf({ value, text }: ChartBar): string {
  return text === undefined ? formatNumber(value, { digits: 3 }) : visibleText(text);
}

/** From zero to the longest bars, with room at the ends that bars reach. */
function rangeOf(rows: readonly BarRow[]): [number, number] {
  const values = rows.flatMap(({ bars }) => bars.map(({ value }) => value));
  const low = Math.min(0, ...values);
  const high = Math.max(0, ...values);
  const room = (high - low) * 0.06 || 1;
  return [low < 0 ? low - room : -room, high > 0 ? high + room : room];
}

function panelView(
  { axis, rows }: BarPanel,
  looks: ReadonlyMap<string, SeriesLook>,
  width: number,
): Record<string, unknown> {
  const x = settleAxis(caller, "x", { ...axis, domain: axis.domain ?? rangeOf(rows) }, [], false, 6);
  let top = rowGap / 2;
  const layer = rows.flatMap(({ label, bars }) => {
    const middle = top + (bars.length * barHeight) / 2;
    const drawn = bars.flatMap((bar, index) => {
      const y = { value: top + (index + 0.5) * barHeight };
      return [...barLayers(x, bar, looks.get(bar.group) as SeriesLook, y), words(textOf(bar), width + 10, "left", y)];
    });
    top += bars.length * barHeight + rowGap;
    return [...drawn, words(symbolText(label), -10, "right", { value: middle })];
  });
  const height = top - rowGap / 2;
  const zero = {
    data: { values: [{ x: 0 }] },
    mark: { type: "rule", color: ink, strokeWidth: 1.25 },
    encoding: { x: positionEncoding(x, "x"), y: { value: 0 }, y2: { value: height } },
  };
  return { width, height, layer: [...layer, zero] };
}

function barLayers(
  x: SettledAxis,
  { value }: ChartBar,
  look: SeriesLook,
  y: { value: number },
): Record<string, unknown>[] {
  const end = chartDigits(value);
  return [
    {
      data: { values: [{ from: 0, to: end }] },
      mark: { type: "rule", color: look.color, strokeWidth: 5, strokeDash: look.dash },
      encoding: { x: positionEncoding(x, "from"), x2: { field: "to" }, y },
    },
    {
      data: { values: [{ x: end }] },
      mark: pointMark(look, true),
      encoding: { x: positionEncoding(x, "x"), y },
    },
  ];
}

function words(text: string, x: number, align: "left" | "right", y: { value: number }): Record<string, unknown> {
  return {
    data: { values: [{ text }] },
    mark: { type: "text", align, baseline: "middle", limit: Math.ceil(estimatedWidth(text, 12)) + 10 },
    encoding: { x: { value: x }, y, text: { field: "text" } },
  };
}
