/** Regions of pairs of quantities in a triangle of small plots, their distributions on the diagonal. */
import { formatNumber } from "../digits";
import { visibleText } from "../escape";
import { quantityText, symbolText } from "../symbol";
import type { ChartAxis } from "./axis";
import { type Box, Canvas, plotAxis } from "./canvas";
import { type Chart, checkWords, makeChart } from "./chart";
import { contourLines } from "./contourLines";
import { drawBars, type HistogramPanel } from "./histogramChart";
import { keyView } from "./key";
import { seriesLook } from "./palette";
import { thinned } from "./thin";

/** The density of a pair on a grid, and where its regions end. */
export interface RegionPair {
  /** Which panel is along x, which along y. */
  readonly x: number;
  readonly y: number;
  /** Cells along each side. */
  readonly bins: number;
  /** Row by row from below, over the ranges of the two panels. */
  readonly cells: ArrayLike<number>;
  /** Heights of the density at the edges of the inner and the outer region. */
  readonly levels: readonly [inner: number, outer: number];
}

/** What a chart of regions is made from. */
export interface RegionChartOptions {
  readonly title: string;
  readonly description: string;
  /** The quantities, two to six. */
  readonly panels: readonly HistogramPanel[];
  readonly pairs: readonly RegionPair[];
  /** What the two regions are called: "68%", "95%". */
  readonly names: readonly [inner: string, outer: string];
  /** A line of words a pair, for those who do not see it. */
  readonly words: readonly string[];
}

const caller = "regionChart";
const margin = { left: 78, bottom: 50 };
const gap = 10;
/** Points that an edge keeps at most. */
const mostPoints = 60;
const dashed = [5, 3];

/**
 * A triangle of plots: below the diagonal the regions of each pair, filled, the inner one darker with a solid edge, the outer one with a dashed edge.
 *
 * @throws RangeError when there are not two to six panels, or a pair names none of them
 */
export function regionChart(options: RegionChartOptions): Chart {
  checkWords(caller, options);
  const { panels, pairs } = options;
  const count = panels.length;
  if (!(count >= 2 && count <= 6)) throw new RangeError(`${caller}: there must be two to six panels, got ${count}`);
  // Whole pixels a cell, so that no seams show.
  const bins = pairs[0]?.bins ?? 50;
  const size = bins * Math.max(2, Math.floor((count <= 3 ? 170 : 112) / bins));
  const total = count * size + (count - 1) * gap;
  const canvas = new Canvas(margin.left + total + 10, total + margin.bottom);
  const box = (column: number, row: number): Box => ({
    left: margin.left + column * (size + gap),
    top: row * (size + gap),
    width: size,
    height: size,
  });
  const axisOf = (panel: HistogramPanel) => plotAxis(caller, panel.axis, panel.range, 4);
  for (const pair of pairs) {
    if (!(pair.x >= 0 && pair.x < pair.y && pair.y < count)) {
      throw new RangeError(`${caller}: a pair must name two panels, x before y, got ${pair.x} and ${pair.y}`);
    }
    drawRegions(canvas, box(pair.x, pair.y), pair);
  }
  for (let row = 0; row < count; row++) {
    for (let column = 0; column <= row; column++) {
      const place = box(column, row);
      const [x, y] = [panels[column] as HistogramPanel, panels[row] as HistogramPanel];
      if (row === column) drawBars(canvas, place, x);
      canvas.frame(place, row === count - 1 ? axisOf(x) : undefined, column === 0 && row > 0 ? axisOf(y) : undefined);
      if (row === count - 1) {
        const at = [place.left + size / 2, place.top + size + 30] as const;
        canvas.text(axisTitle(x.axis), at, { align: "center", bold: true });
      }
      if (column === 0 && row > 0) {
        const at = [margin.left - 62, place.top + size / 2] as const;
        canvas.text(axisTitle(y.axis), at, { align: "center", bold: true, angle: 270 });
      }
    }
  }
  const look = seriesLook(0);
  const key = options.names.map((label, index) => ({
    label,
    look: { ...look, dash: index === 0 ? [] : dashed, shape: "square" },
    line: true,
    filled: index === 0,
  }));
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width: canvas.width,
    views: [...keyView(key, canvas.width), canvas.view()],
    lines: [
      ...panels.map(({ axis, middle, interval: [low, high] }) => {
        const unit = axis.unit ? ` ${visibleText(axis.unit)}` : "";
        return `  ${symbolText(axis.symbol ?? axis.label)}: ${formatNumber(middle)}, from ${formatNumber(low)} to ${formatNumber(high)}${unit}`;
      }),
      ...options.words.map((line) => `  ${visibleText(line)}`),
    ],
  });
}

function axisTitle(axis: ChartAxis): string {
  return quantityText("", axis.symbol ?? axis.label, axis.unit);
}

function drawRegions(canvas: Canvas, box: Box, { bins, cells, levels }: RegionPair): void {
  const { color } = seriesLook(0);
  const cell = box.width / bins;
  const bottom = box.top + box.height;
  const fill = (level: number, opacity: number): void => {
    for (let j = 0; j < bins; j++) {
      for (let i = 0; i < bins; ) {
        const from = i;
        while (i < bins && (cells[j * bins + i] as number) >= level) i++;
        if (i > from) {
          const start = [box.left + from * cell, bottom - (j + 1) * cell] as const;
          canvas.rectangle(start, [box.left + i * cell, bottom - j * cell], { color, opacity });
        } else i++;
      }
    }
  };
  fill(levels[1], 0.25);
  fill(levels[0], 0.45);
  const edge = (level: number, dash: readonly number[]): void => {
    for (const line of contourLines(cells, bins, level)) {
      const x = line.map(([i]) => Math.min(box.left + box.width, Math.max(box.left, box.left + (i + 0.5) * cell)));
      const y = line.map(([, j]) => Math.min(bottom, Math.max(box.top, bottom - (j + 0.5) * cell)));
      const half = Math.floor(line.length / 2);
      if (half < 3) continue;
      // A closed line has no far ends to begin with: its halves are thinned one by one.
      const first = thinned(x.slice(0, half + 1), y.slice(0, half + 1), mostPoints / 2);
      const second = thinned(x.slice(half), y.slice(half), mostPoints / 2).map((k) => k + half);
      const kept = [...first, ...second.slice(1)];
      canvas.line(
        kept.map((k) => [x[k] as number, y[k] as number] as const),
        { color, dash, strokeWidth: 1.5 },
      );
    }
  };
  edge(levels[1], dashed);
  edge(levels[0], []);
}
