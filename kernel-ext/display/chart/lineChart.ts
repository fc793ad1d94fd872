/**
 * Curves, and points with error bars, over one axis; a second panel beneath it when wanted.
 */
import { formatNumber } from "../digits";
import { visibleText } from "../escape";
import { type ChartAxis, type SettledAxis, settleAxis } from "./axis";
import { type Chart, checkWords, makeChart } from "./chart";
import { type ChartBand, type ChartRule, frameEncoding, guideLayers, type PlotFrame } from "./guides";
import { type KeyEntry, keyView, pointMark } from "./key";
import { type SeriesLook, seriesLook, seriesLooks } from "./palette";
import { chartDigits, thinned } from "./thin";

/** A curve. */
export interface LineSeries {
  readonly label: string;
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
}

/** Points, with symmetric error bars where errors are given. */
export interface PointSeries extends LineSeries {
  readonly error?: ArrayLike<number> | undefined;
}

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
/** Points that a curve keeps at most; the picture is the same (see thin.ts). */
const mostPoints = 400;

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
    ...curves.map(({ series, look }, index) => markerLayer(frame, series, look, (index + 0.5) / curves.length)),
    ...(panel.points ?? []).flatMap((series) => pointLayers(frame, series, looks.get(series.label) as SeriesLook)),
    ...shared.above,
    ...own.above,
  ];
  return { width: frame.width, height: frame.height, layer };
}

/** Pixels of a series, not cut at the ends of the axes. */
function pixelsOf(
  { x, y, width, height }: PlotFrame,
  series: LineSeries,
): { across: Float64Array; down: Float64Array } {
  const across = new Float64Array(series.x.length);
  const down = new Float64Array(series.x.length);
  for (let index = 0; index < across.length; index++) {
    across[index] = x.pixel(x.place(series.x[index] as number), width, false);
    down[index] = y.pixel(y.place(series.y[index] as number), height, true);
  }
  return { across, down };
}

function rowsOf(frame: PlotFrame, series: LineSeries, indices: readonly number[]): Record<string, unknown>[] {
  return indices.map((index) => ({
    [frame.x.field]: chartDigits(frame.x.place(series.x[index] as number)),
    y: chartDigits(frame.y.place(series.y[index] as number)),
  }));
}

function tooltip(frame: PlotFrame): Record<string, unknown>[] {
  return [
    { field: frame.x.field, type: "quantitative", title: frame.x.title, format: ".6~g" },
    { field: "y", type: "quantitative", title: frame.y.title, format: ".6~g" },
  ];
}

function curveLayer(frame: PlotFrame, series: LineSeries, look: SeriesLook): Record<string, unknown> {
  const { across, down } = pixelsOf(frame, series);
  return {
    data: { values: rowsOf(frame, series, thinned(across, down, mostPoints)) },
    mark: { type: "line", color: look.color, strokeDash: look.dash, strokeWidth: 2, clip: true, interpolate: "linear" },
    encoding: frameEncoding(frame),
  };
}

/** A few points of the series' shape along its curve, at other places than those of the other series. */
function markerLayer(frame: PlotFrame, series: LineSeries, look: SeriesLook, offset: number): Record<string, unknown> {
  const { across, down } = pixelsOf(frame, series);
  const inside = (index: number): boolean =>
    (across[index] as number) >= -0.5 &&
    (across[index] as number) <= frame.width + 0.5 &&
    (down[index] as number) >= -0.5 &&
    (down[index] as number) <= frame.height + 0.5;
  const visible = Array.from(across.keys()).filter(inside);
  const count = 6;
  const chosen = new Set<number>();
  if (visible.length <= 2 * count) for (const index of visible) chosen.add(index);
  else {
    for (let step = 0; step < count; step++) {
      const wanted = ((step + offset) / count) * frame.width;
      let nearest = visible[0] as number;
      for (const index of visible) {
        if (Math.abs((across[index] as number) - wanted) < Math.abs((across[nearest] as number) - wanted))
          nearest = index;
      }
      if (Math.abs((across[nearest] as number) - wanted) < frame.width / count) chosen.add(nearest);
    }
  }
  return {
    data: {
      values: rowsOf(
        frame,
        series,
        [...chosen].sort((one, other) => one - other),
      ),
    },
    mark: pointMark(look, true),
    encoding: { ...frameEncoding(frame), tooltip: tooltip(frame) },
  };
}

function pointLayers(frame: PlotFrame, series: PointSeries, look: SeriesLook): Record<string, unknown>[] {
  const indices = Array.from({ length: series.x.length }, (_, index) => index);
  const rows = rowsOf(frame, series, indices);
  const layers: Record<string, unknown>[] = [];
  if (series.error !== undefined) {
    const bars = rows.map((row, index) => {
      const value = series.y[index] as number;
      const bar = series.error?.[index] ?? 0;
      const low = frame.y.place(value - bar);
      return {
        [frame.x.field]: row[frame.x.field],
        low: chartDigits(Math.max(frame.y.low, low)),
        high: chartDigits(Math.min(frame.y.high, frame.y.place(value + bar))),
      };
    });
    layers.push({
      data: { values: bars },
      mark: { type: "rule", color: look.color, strokeWidth: 1.5 },
      encoding: { ...frameEncoding(frame, frame.x.field, "low"), y2: { field: "high" } },
    });
  }
  layers.push({
    data: { values: rows },
    mark: { ...pointMark(look, false), clip: true },
    encoding: { ...frameEncoding(frame), tooltip: tooltip(frame) },
  });
  return layers;
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
