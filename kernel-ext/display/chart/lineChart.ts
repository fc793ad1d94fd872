/**
 * Curves, and points with error bars, over one axis; a second panel beneath it when wanted.
 */
import { formatNumber } from "../digits";
import { visibleText } from "../escape";
import { type ChartAxis, type SettledAxis, settleAxis } from "./axis";
import { type Chart, checkWords, makeChart } from "./chart";
import { type ChartBand, type ChartRule, guideLayers, type PlotFrame } from "./guides";
import { type KeyEntry, keyView } from "./key";
import { curveLayer, type LineSeries, markerLayer, type PointSeries, pointLayers } from "./lineLayers";
import { type SeriesLook, seriesLook, seriesLooks } from "./palette";

/** What one panel shows. */
export interface ChartPanel {
  readonly y: ChartAxis;
  readonly series?: readonly LineSeries[] | undefined;
  readonly points?: readonly PointSeries[] | undefined;
  readonly rules?: readonly ChartRule[] | undefined;
  readonly bands?: readonly ChartBand[] | undefined;
  /** Height of the plot in pixels. */
  readonly height?: number | undefined;
}

/** What a line chart is made from. */
export interface LineChartOptions extends ChartPanel {
  readonly title: string;
  /** A sentence that says what is to be seen. */
  readonly description: string;
  readonly x: ChartAxis;
  /** Width of the plot in pixels. */
  readonly width?: number | undefined;
  /** A second panel under the first, with the same x axis; its series of the same name look the same. */
  readonly below?: ChartPanel | undefined;
}

const caller = "lineChart";
/**
 * A line chart.
 *
 * Each series has its own colour, dash and point shape, named in a key above the plot. Names of upright rules and bands
 * stand above the plot, out of each other's way. Rules beyond the ends of an axis are left out; curves are cut there.
 *
 * @param options title, description, axes, series; redshifts as they are (the axis turns them into 1+z)
 * @returns the chart; see `Chart`
 * @throws RangeError when a value is not finite, x and y differ in length, or a value has no place on a logarithmic axis
 * @example lineChart({ title: "Distance", description: "D_C rises.", x: { label: "redshift", symbol: "z" },
 *   y: { label: "", symbol: "D_C", unit: "Mpc" }, series: [{ label: "base", x: [0, 1, 2], y: [0, 3400, 5300] }] })
 */
export function lineChart(options: LineChartOptions): Chart {
  checkWords(caller, options);
  const width = options.width ?? 520;
  const panels: ChartPanel[] = options.below === undefined ? [options] : [options, options.below];
  for (const panel of panels) checkPanel(panel, options.x, panel.y);
  const looks = looksOf(panels);
  const xValues = panels.flatMap((panel) => allSeries(panel).map((series) => series.x));
  const x = settleAxis(caller, "x", options.x, valuesOf(xValues), false, 8);
  const frames = panels.map((panel, index) => frameOf(panel, x, width, index, panels.length));
  const shared = (options.rules ?? []).filter((rule) => rule.axis === "x");
  const views = panels.map((panel, index) =>
    panelView(panel, frames[index] as PlotFrame, looks, index === 0 ? [] : shared),
  );
  const lines = panels.flatMap((panel) => panelLines(panel, options.x));
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width,
    views: [...keyView(keyEntries(panels, looks), width), ...views],
    lines,
  });
}

function allSeries(panel: ChartPanel): readonly PointSeries[] {
  return [...(panel.series ?? []), ...(panel.points ?? [])];
}

function* valuesOf(lists: readonly ArrayLike<number>[]): Iterable<number> {
  for (const list of lists) for (let index = 0; index < list.length; index++) yield list[index] as number;
}

function checkPanel(panel: ChartPanel, xAxis: ChartAxis, yAxis: ChartAxis): void {
  const list = allSeries(panel);
  if (list.length === 0) throw new RangeError(`${caller}: there must be at least one series, got none`);
  for (const { label, x, y, error } of list) {
    const name = `series "${label}"`;
    if (x.length !== y.length) {
      throw new RangeError(`${caller}: ${name} must have as many y as x, got ${y.length} and ${x.length}`);
    }
    if (error !== undefined && error.length !== x.length) {
      throw new RangeError(`${caller}: ${name} must have as many errors as x, got ${error.length} and ${x.length}`);
    }
    for (let index = 0; index < x.length; index++) {
      checkValue(`${name}, x[${index}]`, x[index] as number, xAxis);
      checkValue(`${name}, y[${index}]`, y[index] as number, yAxis);
      const bar = error?.[index];
      if (bar !== undefined && !(bar >= 0 && bar < Number.POSITIVE_INFINITY)) {
        throw new RangeError(`${caller}: ${name}, error[${index}] must be finite and not negative, got ${bar}`);
      }
    }
  }
}

function checkValue(name: string, value: number, axis: ChartAxis): void {
  if (!Number.isFinite(value)) throw new RangeError(`${caller}: ${name} must be finite, got ${String(value)}`);
  if (axis.scale === "log" && !(value > 0)) {
    throw new RangeError(`${caller}: ${name} must be positive on a logarithmic axis, got ${value}`);
  }
  if (axis.scale === "onePlusRedshift" && !(value > -1)) {
    throw new RangeError(`${caller}: ${name} must be a redshift above -1, got ${value}`);
  }
}

function looksOf(panels: readonly ChartPanel[]): Map<string, SeriesLook> {
  const labels = new Set(panels.flatMap((panel) => allSeries(panel).map((series) => series.label)));
  if (labels.size > seriesLooks.length) {
    throw new RangeError(`${caller}: at most ${seriesLooks.length} series can be told apart, got ${labels.size}`);
  }
  return new Map([...labels].map((label, index) => [label, seriesLook(index)]));
}

/** The names for the key; none where each panel has one series, which its axis names. */
function keyEntries(panels: readonly ChartPanel[], looks: ReadonlyMap<string, SeriesLook>): KeyEntry[] {
  if (panels.every((panel) => allSeries(panel).length === 1)) return [];
  const lines = new Set(panels.flatMap((panel) => (panel.series ?? []).map((series) => series.label)));
  return [...looks].map(([label, look]) => ({ label, look, line: lines.has(label), filled: lines.has(label) }));
}

function frameOf(panel: ChartPanel, x: SettledAxis, width: number, index: number, count: number): PlotFrame {
  const height = panel.height ?? (index === 0 ? 300 : 130);
  const lists = (panel.series ?? []).map((series) => series.y);
  const values = function* (): Iterable<number> {
    yield* valuesOf(lists);
    for (const { y, error } of panel.points ?? []) {
      for (let at = 0; at < y.length; at++) {
        const value = y[at] as number;
        const bar = error?.[at] ?? 0;
        yield value + bar;
        yield panel.y.scale === "log" && value - bar <= 0 ? value : value - bar;
      }
    }
    for (const rule of panel.rules ?? []) if (rule.axis === "y") yield rule.at;
  };
  const y = settleAxis(caller, "y", panel.y, values(), true, Math.max(3, Math.round(height / 45)));
  return { caller, x, y, width, height, xLabelled: index === count - 1 };
}

/** The points of a panel that have the name of a curve, and so its look. */
function sameName(panel: ChartPanel, curve: LineSeries): PointSeries[] {
  return (panel.points ?? []).filter(({ label }) => label === curve.label);
}

function panelView(
  panel: ChartPanel,
  frame: PlotFrame,
  looks: ReadonlyMap<string, SeriesLook>,
  sharedRules: readonly ChartRule[],
): Record<string, unknown> {
  const own = guideLayers(frame, panel.rules ?? [], panel.bands ?? [], true);
  const shared = guideLayers(frame, sharedRules, [], false);
  const curves = (panel.series ?? []).map((series) => ({ series, look: looks.get(series.label) as SeriesLook }));
  const layer = [
    ...own.below,
    ...curves.map(({ series, look }) => curveLayer(frame, series, look)),
    ...curves.map(({ series, look }, index) =>
      markerLayer(frame, series, look, (index + 0.5) / curves.length, sameName(panel, series)),
    ),
    ...(panel.points ?? []).flatMap((series) => pointLayers(frame, series, looks.get(series.label) as SeriesLook)),
    ...shared.above,
    ...own.above,
  ];
  return { width: frame.width, height: frame.height, layer };
}

/** The ends of each series and the rules, in words. */
function panelLines(panel: ChartPanel, xAxis: ChartAxis): string[] {
  const unit = (axis: ChartAxis): string => (axis.unit ? ` ${visibleText(axis.unit)}` : "");
  const text = (value: number, axis: ChartAxis): string => `${formatNumber(value)}${unit(axis)}`;
  const xName = visibleText(xAxis.symbol ?? xAxis.label);
  const lines = allSeries(panel).map(({ label, x, y }) => {
    const last = x.length - 1;
    if (last < 0) return `  ${visibleText(label)}: no points`;
    const ends = [0, last].map((i) => `${text(y[i] as number, panel.y)} at ${xName} = ${text(x[i] as number, xAxis)}`);
    return `  ${visibleText(label)}: ${last === 0 ? ends[0] : `from ${ends[0]} to ${ends[1]}`}`;
  });
  for (const { axis, at, label } of panel.rules ?? []) {
    lines.push(`  ${visibleText(label)}: ${text(at, axis === "x" ? xAxis : panel.y)}`);
  }
  for (const { axis, from, to, label } of panel.bands ?? []) {
    const along = axis === "x" ? xAxis : panel.y;
    lines.push(`  ${visibleText(label)}: ${text(from, along)} to ${text(to, along)}`);
  }
  return lines;
}
