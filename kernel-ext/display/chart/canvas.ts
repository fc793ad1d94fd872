/**
 * A drawing in pixels, for charts of many small plots: marks of one kind share a layer, and each plot brings its own axes. Vega-Lite's own grids
 * of plots would repeat scales and axes for each.
 */
import { formatNumber } from "../digits";
import { type ChartAxis, settleAxis } from "./axis";
import { ink } from "./palette";

/** The ends of a plot in pixels from the upper left corner of the drawing. */
export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** A look that many marks share. */
interface MarkLook {
  readonly color: string;
  readonly opacity?: number;
  readonly dash?: readonly number[];
  readonly strokeWidth?: number;
}

/** What a text mark needs beyond its place. */
interface TextLook {
  readonly align: "left" | "right" | "center";
  readonly size?: number;
  readonly bold?: boolean;
  readonly color?: string;
  readonly angle?: number;
}

const order = ["rect", "line", "rule", "text"];

const tenth = (value: number): number => Math.round(value * 10) / 10;

/** Collects marks and gives them as one view. */
export class Canvas {
  private readonly layers = new Map<string, { mark: Record<string, unknown>; values: Record<string, unknown>[] }>();
  private lines = 0;

  constructor(
    readonly width: number,
    readonly height: number,
  ) {}

  rectangle(from: readonly [number, number], to: readonly [number, number], look: MarkLook): void {
    const mark = { type: "rect", color: look.color, opacity: look.opacity ?? 1 };
    this.add(mark, { x: tenth(from[0]), y: tenth(from[1]), x2: tenth(to[0]), y2: tenth(to[1]) });
  }

  rule(from: readonly [number, number], to: readonly [number, number], look: MarkLook): void {
    const mark = { type: "rule", color: look.color, strokeWidth: look.strokeWidth ?? 1, strokeDash: look.dash ?? [] };
    this.add(mark, { x: tenth(from[0]), y: tenth(from[1]), x2: tenth(to[0]), y2: tenth(to[1]) });
  }

  /** A line through points, in their order. */
  line(points: readonly (readonly [number, number])[], look: MarkLook): void {
    const mark = {
      type: "line",
      color: look.color,
      strokeWidth: look.strokeWidth ?? 1.5,
      strokeDash: look.dash ?? [],
    };
    const line = this.lines++;
    points.forEach(([x, y], at) => {
      this.add(mark, { x: tenth(x), y: tenth(y), line, at });
    });
  }

  text(text: string, [x, y]: readonly [number, number], look: TextLook): void {
    const mark = {
      type: "text",
      align: look.align,
      baseline: "middle",
      fontSize: look.size ?? 11,
      ...(look.bold === true ? { fontWeight: 600 } : {}),
      ...(look.color === undefined ? {} : { color: look.color }),
      ...(look.angle === undefined ? {} : { angle: look.angle }),
    };
    this.add(mark, { x: tenth(x), y: tenth(y), text });
  }

  /** The frame of a plot, with ticks and numbers under it where an axis is given for them. */
  frame(box: Box, x: PlotAxis | undefined, y: PlotAxis | undefined): void {
    const { left, top, width, height } = box;
    const [right, bottom] = [left + width, top + height];
    const look = { color: ink, strokeWidth: 0.75 };
    this.rule([left, bottom], [right, bottom], look);
    this.rule([left, top], [left, bottom], look);
    for (const { place, label } of x?.ticks ?? []) {
      const at = left + place * width;
      this.rule([at, bottom], [at, bottom + 4], look);
      this.text(label, [at, bottom + 12], { align: "center", size: 10 });
    }
    for (const { place, label } of y?.ticks ?? []) {
      const at = bottom - place * height;
      this.rule([left - 4, at], [left, at], look);
      this.text(label, [left - 7, at], { align: "right", size: 10 });
    }
  }

  /** The drawing as a view of a chart. */
  view(): Record<string, unknown> {
    const scale = (end: readonly [number, number]) => ({ domain: end, nice: false, zero: false });
    const position = (field: string, end: readonly [number, number]) => ({
      field,
      type: "quantitative",
      scale: scale(end),
      axis: null,
    });
    const x = position("x", [0, this.width]);
    const y = position("y", [this.height, 0]);
    // Areas below, words above, whatever came first.
    const height = ({ mark }: { mark: Record<string, unknown> }) => order.indexOf(mark["type"] as string);
    const sorted = [...this.layers.values()].sort((a, b) => height(a) - height(b));
    const layer = sorted.map(({ mark, values }) => {
      const type = mark["type"];
      const encoding =
        type === "text"
          ? { x, y, text: { field: "text" } }
          : type === "line"
            ? { x, y, detail: { field: "line" }, order: { field: "at" } }
            : { x, y, x2: { field: "x2" }, y2: { field: "y2" } };
      return { data: { values }, mark, encoding };
    });
    return { width: this.width, height: this.height, layer };
  }

  private add(mark: Record<string, unknown>, value: Record<string, unknown>): void {
    const key = JSON.stringify(mark);
    let layer = this.layers.get(key);
    if (layer === undefined) {
      layer = { mark, values: [] };
      this.layers.set(key, layer);
    }
    layer.values.push(value);
  }
}

/** An axis of a small plot: its ends and a few ticks, places from 0 to 1. */
export interface PlotAxis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly { readonly place: number; readonly label: string }[];
}

/** Settles the axis of a small plot; what lies at its very ends has no tick, where it would touch its neighbour's. */
export function plotAxis(caller: string, axis: ChartAxis, range: readonly [number, number], count: number): PlotAxis {
  const settled = settleAxis(caller, "x", { ...axis, domain: range }, [], false, count);
  const { low, high, ticks } = settled;
  const placed = ticks.values.map((value, index) => ({
    place: (value - low) / (high - low),
    label: ticks.labels[index] ?? formatNumber(value),
  }));
  return { low, high, ticks: placed.filter(({ place }) => place > 0.06 && place < 0.94) };
}
