/** Distributions of several quantities, a small plot each. */
import { formatNumber } from "../digits";
import { visibleText } from "../escape";
import { quantityText, symbolText } from "../symbol";
import type { ChartAxis } from "./axis";
import { type Box, Canvas, plotAxis } from "./canvas";
import { type Chart, checkWords, makeChart } from "./chart";
import { ink, seriesLook } from "./palette";

/** One distribution in bins. */
export interface HistogramPanel {
  readonly axis: ChartAxis;
  /** Ends of the bins' range, the bins equally wide. */
  readonly range: readonly [number, number];
  /** Heights of the bins, the highest 1. */
  readonly heights: ArrayLike<number>;
  /** Drawn as a line. */
  readonly middle: number;
  /** Bins inside are drawn darker. */
  readonly interval: readonly [number, number];
}

/** What a chart of distributions is made from. */
export interface HistogramChartOptions {
  readonly title: string;
  readonly description: string;
  readonly panels: readonly HistogramPanel[];
}

const caller = "histogramChart";
const across = 3;
const panelSize = { width: 168, height: 90 };
const gap = { x: 20, y: 54 };

/**
 * A chart of distributions: bars, darker inside an interval, with a line at the middle.
 *
 * @throws RangeError when there is no panel, a panel has no bins, or a height is not finite and at least 0
 */
export function histogramChart(options: HistogramChartOptions): Chart {
  checkWords(caller, options);
  const { panels } = options;
  if (!(panels.length > 0)) throw new RangeError(`${caller}: there must be at least one panel, got none`);
  const columns = Math.min(across, panels.length);
  const rows = Math.ceil(panels.length / across);
  const canvas = new Canvas(columns * (panelSize.width + gap.x), rows * (panelSize.height + gap.y));
  panels.forEach((panel, index) => {
    const left = (index % across) * (panelSize.width + gap.x) + gap.x / 2;
    const top = Math.floor(index / across) * (panelSize.height + gap.y) + 6;
    const box = { left, top, ...panelSize };
    const x = drawBars(canvas, box, panel);
    canvas.frame(box, x, undefined);
    const title = quantityText("", panel.axis.symbol ?? panel.axis.label, panel.axis.unit);
    canvas.text(title, [left + panelSize.width / 2, top + panelSize.height + 28], { align: "center", bold: true });
  });
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width: canvas.width,
    views: [canvas.view()],
    lines: panels.map((panel) => {
      const name = symbolText(panel.axis.symbol ?? panel.axis.label);
      const unit = panel.axis.unit ? ` ${visibleText(panel.axis.unit)}` : "";
      const [low, high] = panel.interval;
      return `  ${name}: ${formatNumber(panel.middle)}, from ${formatNumber(low)} to ${formatNumber(high)}${unit}`;
    }),
  });
}

/** The bars of a distribution in a box, with the middle; returns the axis. */
export function drawBars(canvas: Canvas, box: Box, panel: HistogramPanel): ReturnType<typeof plotAxis> {
  const { heights, range, interval, middle } = panel;
  const count = heights.length;
  if (!(count > 0)) throw new RangeError(`${caller}: a panel must have at least one bin, got none`);
  const axis = plotAxis(caller, panel.axis, range, 4);
  const bin = (range[1] - range[0]) / count;
  const bottom = box.top + box.height;
  for (let k = 0; k < count; k++) {
    const height = heights[k] as number;
    if (!(height >= 0 && height < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`${caller}: heights must be finite and not negative, got ${height}`);
    }
    if (height === 0) continue;
    const center = range[0] + (k + 0.5) * bin;
    const inside = center >= interval[0] && center <= interval[1];
    const left = box.left + (k / count) * box.width;
    canvas.rectangle([left, bottom - 0.96 * height * box.height], [left + box.width / count, bottom], {
      color: seriesLook(0).color,
      opacity: inside ? 0.85 : 0.4,
    });
  }
  const place = box.left + ((middle - range[0]) / (range[1] - range[0])) * box.width;
  canvas.rule([place, box.top], [place, bottom], { color: ink, strokeWidth: 1.5, dash: [4, 2] });
  return axis;
}
