/**
 * Reference lines and bands with their names. Names of upright ones stand above the plot like flags at their poles, kept
 * apart from each other; names of level ones at its right.
 */
import { symbolText } from "../symbol";
import { positionEncoding, type SettledAxis } from "./axis";
import { type LabelPlace, placeLabels } from "./labelPlaces";
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

/** A name above the plot, with its rule, or without one for a band. */
interface UprightGuide {
  readonly text: string;
  /** Pixels from the left of the plot. */
  readonly middle: number;
  readonly rule: Record<string, unknown> | undefined;
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
  const upright: UprightGuide[] = [];
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
    else level.push({ text: symbolText(label), down: middle });
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

/** Rules with their names above the plot, and names of bands. */
function uprightLayers(frame: PlotFrame, guides: readonly UprightGuide[], named: boolean): Record<string, unknown>[] {
  const labels = guides.map(({ text, middle, rule }) => ({
    width: estimatedWidth(text, 12),
    at: middle,
    pole: rule !== undefined,
  }));
  const places = placeLabels(labels, frame.width);
  return guides.flatMap(({ text, rule }, index) => {
    const { from, row } = places[index] as LabelPlace;
    const top = named ? -4 - row * rowHeight : 0;
    const layers: Record<string, unknown>[] = [];
    if (rule !== undefined) {
      const pole = named ? top - rowHeight + 2 : 0;
      const encoding = { ...(rule["encoding"] as object), y: { value: pole }, y2: { value: frame.height } };
      layers.push({ ...rule, encoding });
    }
    if (named) {
      layers.push({
        data: { values: [{ text }] },
        mark: { type: "text", align: "left", baseline: "bottom" },
        encoding: { x: { value: round(from) }, y: { value: top }, text: { field: "text" } },
      });
    }
    return layers;
  });
}

/** Names of level guides, at the right of the plot beside their line, pushed apart where they would touch. */
function levelLayers(frame: PlotFrame, guides: readonly { text: string; down: number }[]): Record<string, unknown>[] {
  let last = Number.NEGATIVE_INFINITY;
  return [...guides]
    .sort((one, other) => one.down - other.down)
    .map(({ text, down }) => {
      last = Math.max(down, last + rowHeight);
      return {
        data: { values: [{ text }] },
        mark: { type: "text", align: "left", baseline: "middle" },
        encoding: { x: { value: frame.width + 6 }, y: { value: round(last) }, text: { field: "text" } },
      };
    });
}

function round(pixels: number): number {
  return Math.round(pixels * 100) / 100;
}
