/**
 * Values with their errors beside each other: what was computed against what is printed.
 */
import { formatNumber, formatWithError } from "../digits";
import { visibleText } from "../escape";
import { quantityText } from "../symbol";
import { type ChartAxis, positionEncoding, settleAxis } from "./axis";
import { type Chart, checkWords, makeChart } from "./chart";
import { keyView, pointMark } from "./key";
import { type SeriesLook, seriesLook, seriesLooks } from "./palette";
import { estimatedWidth } from "./textWidth";
import { chartDigits } from "./thin";

/** One value with its error. */
export interface IntervalRow {
  /** What stands at the left of the row. */
  readonly label: string;
  readonly value: number;
  /** Half length of the bar; without it the value stands alone. */
  readonly error?: number | undefined;
  /** The group whose look the row has, named in the key: "computed", "printed". */
  readonly group: string;
  /** How the value is written at the right; default: value \u00b1 error, or the value at six digits. */
  readonly text?: string | undefined;
}

/** Rows on one axis. */
export interface IntervalPanel {
  readonly axis: ChartAxis;
  readonly rows: readonly IntervalRow[];
}

/** What an interval chart is made from. */
export interface IntervalChartOptions {
  readonly title: string;
  readonly description: string;
  /** One panel a quantity, each with an axis of its own. */
  readonly panels: readonly IntervalPanel[];
  readonly width?: number | undefined;
}

const caller = "intervalChart";
const rowHeight = 26;

/**
 * A chart of values with error bars, one row each, the figures written at the right.
 *
 * @param options title, description, panels
 * @returns the chart; see `Chart`
 * @throws RangeError when a value is not finite, an error is negative or not finite, or a panel is empty
 * @example intervalChart({ title: "Angle", description: "They agree.", panels: [{ axis: { label: "", symbol: "theta" },
 *   rows: [{ label: "this model", value: 1.2, group: "computed" }, { label: "table", value: 1.3, error: 0.2, group: "printed" }] }] })
 */
export function intervalChart(options: IntervalChartOptions): Chart {
  checkWords(caller, options);
  const { panels } = options;
  const width = options.width ?? 380;
  if (!(panels.length > 0)) throw new RangeError(`${caller}: there must be at least one panel, got none`);
  for (const panel of panels) checkRows(panel);
  const groups = [...new Set(panels.flatMap((panel) => panel.rows.map((row) => row.group)))];
  if (groups.length > seriesLooks.length) {
    throw new RangeError(`${caller}: at most ${seriesLooks.length} groups can be told apart, got ${groups.length}`);
  }
  const looks = new Map(groups.map((group, index) => [group, seriesLook(index)]));
  const entries = groups.map((label, index) => ({ label, look: seriesLook(index), line: false, filled: index === 0 }));
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width: width + 240,
    views: [...keyView(entries, width), ...panels.map((panel) => panelView(panel, looks, width, groups[0] as string))],
    lines: panels.flatMap((panel) => [
      `  ${quantityText(panel.axis.label, panel.axis.symbol, panel.axis.unit)}`,
      ...panel.rows.map((row) => `    ${visibleText(row.label)}: ${textOf(row)} (${visibleText(row.group)})`),
    ]),
  });
}

function checkRows({ axis, rows }: IntervalPanel): void {
  const panel = `panel "${quantityText(axis.label, axis.symbol)}"`;
  if (!(rows.length > 0)) throw new RangeError(`${caller}: ${panel} must have at least one row, got none`);
  for (const { label, value, error } of rows) {
    if (!Number.isFinite(value)) {
      throw new RangeError(`${caller}: ${panel}, row "${label}": value must be finite, got ${String(value)}`);
    }
    if (error !== undefined && !(error >= 0 && error < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`${caller}: ${panel}, row "${label}": error must be finite and not negative, got ${error}`);
    }
  }
}

function textOf({ value, error, text }: IntervalRow): string {
  if (text !== undefined) return visibleText(text);
  return error === undefined ? formatNumber(value, { digits: 6 }) : formatWithError(value, error);
}

function panelView(
  { axis, rows }: IntervalPanel,
  looks: ReadonlyMap<string, SeriesLook>,
  width: number,
  firstGroup: string,
): Record<string, unknown> {
  const height = rows.length * rowHeight;
  const ends = rows.flatMap(({ value, error }) => [value - (error ?? 0), value + (error ?? 0)]);
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const room = (high - low) * 0.08 || Math.abs(high) * 0.05 || 1;
  const domain = axis.domain ?? ([low - room, high + room] as const);
  const x = settleAxis(caller, "x", { ...axis, domain }, ends, false, 6);
  const down = (index: number): number => (index + 0.5) * rowHeight;
  const layer = rows.flatMap((row, index) => {
    const look = looks.get(row.group) as SeriesLook;
    const y = { value: down(index) };
    const bar =
      row.error === undefined || row.error === 0
        ? []
        : [
            {
              data: { values: [{ from: chartDigits(row.value - row.error), to: chartDigits(row.value + row.error) }] },
              mark: { type: "rule", color: look.color, strokeWidth: 2 },
              encoding: { x: positionEncoding(x, "from"), x2: { field: "to" }, y },
            },
          ];
    return [
      ...bar,
      {
        data: { values: [{ x: chartDigits(row.value) }] },
        mark: pointMark(look, row.group === firstGroup),
        encoding: { x: positionEncoding(x, "x"), y },
      },
      words(visibleText(row.label), -10, "right", y),
      words(textOf(row), width + 10, "left", y),
    ];
  });
  return { width, height, layer };
}

function words(text: string, x: number, align: "left" | "right", y: { value: number }): Record<string, unknown> {
  return {
    data: { values: [{ text }] },
    mark: { type: "text", align, baseline: "middle", limit: Math.ceil(estimatedWidth(text, 12)) + 10 },
    encoding: { x: { value: x }, y, text: { field: "text" } },
  };
}
