/**
 * The marks of a line chart: lines thinned to what can be seen, markers along them, points with error bars.
 */
import { frameEncoding, type PlotFrame } from "./guides";
import { pointMark } from "./key";
import type { SeriesLook } from "./palette";
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

/** Points that a curve keeps at most; the picture is the same (see thin.ts). */
const mostPoints = 400;
/** Points that a cloud keeps at most. */
const mostScattered = 2500;
/** Pixels between the markers of a curve and points of the same look. */
const clearOfPoints = 14;

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

/** The line of a curve. */
export function curveLayer(frame: PlotFrame, series: LineSeries, look: SeriesLook): Record<string, unknown> {
  const { across, down } = pixelsOf(frame, series);
  return {
    data: { values: rowsOf(frame, series, thinned(across, down, mostPoints)) },
    mark: { type: "line", color: look.color, strokeDash: look.dash, strokeWidth: 2, clip: true, interpolate: "linear" },
    encoding: frameEncoding(frame),
  };
}

/** Whether a place in pixels lies in the plot. */
function isInside(frame: PlotFrame, across: number, down: number): boolean {
  return across >= -0.5 && across <= frame.width + 0.5 && down >= -0.5 && down <= frame.height + 0.5;
}

/**
 * A few points of the series' shape along its curve, at other places than those of the other series and clear of the
 * points that are shown in the same look.
 */
export function markerLayer(
  frame: PlotFrame,
  series: LineSeries,
  look: SeriesLook,
  offset: number,
  others: readonly LineSeries[],
): Record<string, unknown> {
  const { across, down } = pixelsOf(frame, series);
  const taken = others.flatMap((other) => [...pixelsOf(frame, other).across]);
  const inside = (index: number): boolean =>
    isInside(frame, across[index] as number, down[index] as number) &&
    taken.every((place) => Math.abs(place - (across[index] as number)) >= clearOfPoints);
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

/**
 * Of many points those that cover the same area of the plot: one for each square of a grid, whose squares grow from one
 * pixel until few enough are left. A point is about nine pixels wide, so that little changes to the eye.
 */
function spread(indices: readonly number[], across: Float64Array, down: Float64Array): readonly number[] {
  let kept = indices;
  for (let size = 1; kept.length > mostScattered; size *= 1.25) {
    const squares = new Map<string, number>();
    for (const index of indices) {
      const square = `${Math.round((across[index] as number) / size)},${Math.round((down[index] as number) / size)}`;
      if (!squares.has(square)) squares.set(square, index);
    }
    kept = [...squares.values()];
  }
  return kept;
}

/** Points and their error bars. */
export function pointLayers(frame: PlotFrame, series: PointSeries, look: SeriesLook): Record<string, unknown>[] {
  const { across, down } = pixelsOf(frame, series);
  // Points outside are left out rather than cut, for cutting would also halve those on the edge.
  const visible = Array.from(across.keys()).filter((i) => isInside(frame, across[i] as number, down[i] as number));
  const indices = spread(visible, across, down);
  const rows = rowsOf(frame, series, indices);
  const layers: Record<string, unknown>[] = [];
  if (series.error !== undefined) {
    const bars = rows.map((row, position) => {
      const index = indices[position] as number;
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
    mark: pointMark(look, false),
    encoding: { ...frameEncoding(frame), tooltip: tooltip(frame) },
  });
  return layers;
}
