/**
 * The key of a chart: above the plot, in as many rows as the names need, each name after a piece of its line with its
 * point. Vega's own legends cannot show dash and shape in one sample.
 */
import { symbolText } from "../symbol";
import type { SeriesLook } from "./palette";
import { estimatedWidth } from "./textWidth";

/** One name in the key. */
export interface KeyEntry {
  readonly label: string;
  readonly look: SeriesLook;
  /** Whether the series is drawn with a line, as points, or both. */
  readonly line: boolean;
  readonly filled: boolean;
}

const rowHeight = 18;
const sampleWidth = 34;

/** The view that shows the key, or nothing when there is nothing to tell apart. */
export function keyView(entries: readonly KeyEntry[], width: number): Record<string, unknown>[] {
  if (entries.length < 2) return [];
  let left = 0;
  let row = 0;
  const placed = entries.map((entry) => {
    const text = symbolText(entry.label);
    const needed = Math.ceil(sampleWidth + 8 + estimatedWidth(text, 12));
    if (left > 0 && left + needed > width) {
      left = 0;
      row += 1;
    }
    const place = { entry, text, left, row };
    left += needed + 20;
    return place;
  });
  const height = (row + 1) * rowHeight;
  const at = (field: string, size: number) => ({
    field,
    type: "quantitative",
    scale: { domain: [0, size], nice: false, zero: false },
    axis: null,
  });
  const y = { ...at("down", height), scale: { domain: [height, 0], nice: false, zero: false } };
  const layer = placed.flatMap(({ entry, text, left: from, row: line }) => {
    const { look } = entry;
    const down = (line + 0.5) * rowHeight;
    const sample = entry.line
      ? [
          {
            data: { values: [{ from, to: from + sampleWidth, down }] },
            mark: { type: "rule", color: look.color, strokeWidth: 2, strokeDash: look.dash },
            encoding: { x: at("from", width), x2: { field: "to" }, y },
          },
        ]
      : [];
    return [
      ...sample,
      {
        data: { values: [{ middle: from + sampleWidth / 2, down }] },
        mark: pointMark(look, entry.filled),
        encoding: { x: at("middle", width), y },
      },
      {
        data: { values: [{ start: from + sampleWidth + 8, down, text }] },
        mark: { type: "text", align: "left", baseline: "middle" },
        encoding: { x: at("start", width), y, text: { field: "text" } },
      },
    ];
  });
  return [{ width, height, view: { stroke: null }, layer }];
}

/** The mark of a point in the look of its series. */
export function pointMark(look: SeriesLook, filled: boolean): Record<string, unknown> {
  return {
    type: "point",
    shape: look.shape,
    filled,
    color: look.color,
    size: filled ? 60 : 75,
    opacity: 1,
    strokeWidth: 2,
  };
}
