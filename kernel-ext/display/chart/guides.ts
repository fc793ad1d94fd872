/**
 * Reference lines and bands with their names. Names of upright ones stand above the plot, in as many rows as it takes to
 * keep them apart; names of level ones inside it, at the right.
 */
import { symbolText } from "../symbol";
import { positionEncoding, type SettledAxis } from "./axis";
import { ink } from "./palette";
import { estimatedWidth } from "./textWidth";

/** A line across the plot at one value. */
export interface ChartRule {
  /** The axis on which the value lies. */
  readonly axis: "x" | "y";
  /** In the data's own values (a redshift where the axis shows 1+z). */
  readonly at: number;
  readonly label: string;
}

/** A band between two values. */
export interface ChartBand {
  readonly axis: "x" | "y";
  readonly from: number;
  readonly to: number;
  readonly label: string;
}

/** Where the plot is and how large. */
export interface PlotFrame {
  readonly caller: string;
  readonly x: SettledAxis;
  readonly y: SettledAxis;
  readonly width: number;
  readonly height: number;
  readonly xLabelled: boolean;
}

const rowHeight = 15;

/** The encodings that every layer of a plot names, so that all share one pair of axes. */
export function frameEncoding(frame: PlotFrame, xField = frame.x.field, yField = "y"): Record<string, unknown> {
  return { x: positionEncoding(frame.x, xField, frame.xLabelled), y: positionEncoding(frame.y, yField) };
}

function checkGuide(frame: PlotFrame, what: string, label: string, values: readonly number[], axis: SettledAxis): void {
  for (const value of values) {
    const scaled = axis.place(value);
    if (!(Number.isFinite(scaled) && (!axis.log || scaled > 0))) {
      throw new RangeError(`${frame.caller}: ${what} "${label}" must lie on its axis, got ${String(value)}`);
    }
  }
}

/** Layers for bands, to be drawn first, and for rules with all names, to be drawn last. */
export function guideLayers(
  frame: PlotFrame,
  rules: readonly ChartRule[],
  bands: readonly ChartBand[],
  named: boolean,
): { below: Record<string, unknown>[]; above: Record<string, unknown>[] } {
  const below: Record<string, unknown>[] = [];
  const above: Record<string, unknown>[] = [];
  const upright: { text: string; middle: number; rule: Record<string, unknown> | undefined }[] = [];
  const level: { text: string; down: number }[] = [];
  for (const { axis: side, from, to, label } of bands) {
    const axis = side === "x" ? frame.x : frame.y;
    checkGuide(frame, "band", label, [from, to], axis);
    const ends = [axis.place(from), axis.place(to)].map((end) => Math.min(axis.high, Math.max(axis.low, end)));
    const encoding =
      side === "x"
        ? { x: positionEncoding(axis, "from", frame.xLabelled), x2: { field: "to" } }
        : { y: positionEncoding(axis, "from"), y2: { field: "to" } };
    below.push({
      data: { values: [{ from: ends[0], to: ends[1] }] },
      mark: { type: "rect", color: ink, opacity: 0.22 },
      encoding,
    });
    const length = side === "x" ? frame.width : frame.height;
    const pixels = ends.map((end) => axis.pixel(end, length, side === "y"));
    const middle = ((pixels[0] as number) + (pixels[1] as number)) / 2;
    if (side === "x") upright.push({ text: symbolText(label), middle, rule: undefined });
    else level.push({ text: symbolText(label), down: Math.min(...pixels) + rowHeight });
  }
  for (const { axis: side, at, label } of rules) {
    const axis = side === "x" ? frame.x : frame.y;
    checkGuide(frame, "rule", label, [at], axis);
    const value = axis.place(at);
    if (value < axis.low || value > axis.high) continue;
    const mark = { type: "rule", color: ink, strokeWidth: 1.25 };
    if (side === "x") {
      const rule = {
        data: { values: [{ at: value }] },
        mark,
        encoding: { x: positionEncoding(axis, "at", frame.xLabelled) },
      };
      upright.push({ text: symbolText(label), middle: axis.pixel(value, frame.width, false), rule });
    } else {
      above.push({ data: { values: [{ at: value }] }, mark, encoding: { y: positionEncoding(axis, "at") } });
      level.push({ text: symbolText(label), down: axis.pixel(value, frame.height, true) });
    }
  }
  above.push(...uprightLayers(frame, upright, named));
  if (named) above.push(...levelLayers(frame, level));
  return { below, above };
}

/** Names above the plot: each in the lowest row where it touches no other. */
function uprightLayers(
  frame: PlotFrame,
  guides: { text: string; middle: number; rule: Record<string, unknown> | undefined }[],
  named: boolean,
): Record<string, unknown>[] {
  const rows: { from: number; to: number }[][] = [];
  return [...guides]
    .sort((one, other) => one.middle - other.middle)
    .flatMap(({ text, middle, rule }) => {
      const half = estimatedWidth(text, 12) / 2;
      const center = Math.min(Math.max(middle, half), Math.max(half, frame.width - half));
      const span = { from: center - half - 5, to: center + half + 5 };
      // A name may not lie on the line of another rule that runs up to a higher row.
      let row = rows.findIndex((taken) => taken.every((other) => span.to <= other.from || span.from >= other.to));
      if (row < 0) row = rows.push([]) - 1;
      if (!named) row = 0;
      (rows[row] as { from: number; to: number }[]).push(span);
      const top = named ? -4 - row * rowHeight : 0;
      const layers: Record<string, unknown>[] = [];
      if (rule !== undefined) {
        const encoding = { ...(rule["encoding"] as object), y: { value: top }, y2: { value: frame.height } };
        layers.push({ ...rule, encoding });
      }
      if (named) {
        layers.push({
          data: { values: [{ text }] },
          mark: { type: "text", align: "center", baseline: "bottom" },
          encoding: { x: { value: round(center) }, y: { value: top - 1 }, text: { field: "text" } },
        });
      }
      return layers;
    });
}

/** Names of level guides, at the right and above their line; at the left when the right is taken. */
function levelLayers(frame: PlotFrame, guides: readonly { text: string; down: number }[]): Record<string, unknown>[] {
  const taken: { down: number; side: string }[] = [];
  return guides.map(({ text, down }) => {
    const free = (side: string): boolean =>
      taken.every((other) => other.side !== side || Math.abs(other.down - down) >= rowHeight);
    const side = free("right") || !free("left") ? "right" : "left";
    taken.push({ down, side });
    return {
      data: { values: [{ text }] },
      mark: { type: "text", align: side, baseline: "bottom" },
      encoding: {
        x: { value: side === "right" ? frame.width - 4 : 4 },
        y: { value: round(down < rowHeight ? down + rowHeight : down - 3) },
        text: { field: "text" },
      },
    };
  });
}

function round(pixels: number): number {
  return Math.round(pixels * 100) / 100;
}
