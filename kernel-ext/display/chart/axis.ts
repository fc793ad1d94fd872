/**
 * Axes: what they measure, the range they cover, and how a value becomes a place on the page. The same arithmetic gives
 * the Vega-Lite scale and the pixels by which labels are kept apart.
 */
import { quantityText, symbolText } from "../symbol";
import { labelExpression, linearTicks, logTicks, type Ticks, tickStep } from "./ticks";

/** What an axis measures. */
export interface ChartAxis {
  /** Name of the quantity in words; may be empty when the symbol says enough. */
  readonly label: string;
  /** Symbol in the trade's plain text, such as `r_s` or `theta_*`. */
  readonly symbol?: string | undefined;
  readonly unit?: string | undefined;
  /**
   * `log` needs positive values. `onePlusRedshift` takes redshifts (above -1), is logarithmic in 1+z and labelled in
   * 1+z. Default `linear`.
   */
  readonly scale?: "linear" | "log" | "onePlusRedshift" | undefined;
  /** Ends of the axis in the data's own values; default: the data's range, widened to round numbers on a y axis. */
  readonly domain?: readonly [number, number] | undefined;
  /** Runs from high to low. */
  readonly reverse?: boolean | undefined;
}

/** An axis with its range settled. */
export interface SettledAxis {
  readonly title: string;
  /** The field's name in the chart's data. */
  readonly field: string;
  readonly log: boolean;
  /** Ends on the scale, low first. */
  readonly low: number;
  readonly high: number;
  readonly reverse: boolean;
  readonly ticks: Ticks;
  /** From the data's own value to the value on the scale: z to 1+z, else unchanged. */
  readonly place: (value: number) => number;
  /** From a value on the scale to pixels along the axis, 0 at the left or at the top. */
  readonly pixel: (scaled: number, length: number, vertical: boolean) => number;
}

function titleOf(axis: ChartAxis): string {
  if (axis.scale === "onePlusRedshift") return `1 + ${symbolText(axis.symbol ?? "z")}`;
  return quantityText(axis.label, axis.symbol, axis.unit);
}

/** The range of an axis from its data, or from its domain. */
function rangeOf(caller: string, name: string, axis: ChartAxis, values: Iterable<number>): [number, number] {
  const shift = axis.scale === "onePlusRedshift" ? 1 : 0;
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  if (axis.domain !== undefined) {
    [low, high] = [Math.min(...axis.domain) + shift, Math.max(...axis.domain) + shift];
    if (!(high > low)) {
      throw new RangeError(`${caller}: ${name}.domain must be two different numbers, got ${axis.domain.join(", ")}`);
    }
  } else {
    for (const value of values) {
      if (value + shift < low) low = value + shift;
      if (value + shift > high) high = value + shift;
    }
    if (!(high >= low)) throw new RangeError(`${caller}: there must be at least one value along ${name}`);
  }
  if ((axis.scale ?? "linear") !== "linear" && !(low > 0)) {
    const rule = shift === 1 ? "redshifts above -1" : "positive values";
    throw new RangeError(`${caller}: a logarithmic ${name} needs ${rule}, got ${low - shift}`);
  }
  return [low, high];
}

/** Widens a range to round numbers, as a y axis wants it, and gives a single value some room. */
function widened([low, high]: [number, number], log: boolean, round: boolean): [number, number] {
  if (log) {
    if (high / low < 1 + 1e-9) return [low / 1.5, high * 1.5];
    if (!round) return [low, high];
    if (high / low >= 30) {
      return [10 ** Math.floor(Math.log10(low) + 1e-9), 10 ** Math.ceil(Math.log10(high) - 1e-9)].map((value) =>
        Number(value.toPrecision(12)),
      ) as [number, number];
    }
  }
  if (!(high - low > Math.abs(high) * 1e-12)) {
    const room = Math.abs(high) * 0.1 || 1;
    return [low - room, high + room];
  }
  if (!round) return [low, high];
  const step = tickStep(low, high, 6);
  const from = Number((Math.floor(low / step + 1e-9) * step).toPrecision(12));
  const to = Number((Math.ceil(high / step - 1e-9) * step).toPrecision(12));
  return [log && from <= 0 ? low : from, to];
}

/**
 * Settles the range and the ticks of an axis.
 *
 * @param caller the chart function, for errors
 * @param name what the axis is called in errors, such as "x"
 * @param axis what it measures
 * @param values all data along it, in the data's own values
 * @param round whether to widen the range to round numbers
 * @param tickCount about how many ticks there is room for
 */
export function settleAxis(
  caller: string,
  name: string,
  axis: ChartAxis,
  values: Iterable<number>,
  round: boolean,
  tickCount: number,
): SettledAxis {
  const scale = axis.scale ?? "linear";
  const log = scale !== "linear";
  const [low, high] = widened(rangeOf(caller, name, axis, values), log, round && axis.domain === undefined);
  const reverse = axis.reverse === true;
  const ticks = log ? logTicks(low, high, tickCount) : linearTicks(low, high, tickCount);
  const along = log ? Math.log : (value: number): number => value;
  return {
    title: titleOf(axis),
    field: scale === "onePlusRedshift" ? "onePlusZ" : name.slice(-1),
    log,
    low,
    high,
    reverse,
    ticks,
    place: scale === "onePlusRedshift" ? (value) => value + 1 : (value) => value,
    pixel: (scaled, length, vertical) => {
      const part = (along(scaled) - along(low)) / (along(high) - along(low));
      return (vertical !== reverse ? 1 - part : part) * length;
    },
  };
}

/** The Vega-Lite encoding of a field on a settled axis; every layer names the same axis, so that they become one. */
export function positionEncoding(axis: SettledAxis, field: string, labelled = true): Record<string, unknown> {
  return {
    field,
    type: "quantitative",
    scale: {
      type: axis.log ? "log" : "linear",
      domain: [axis.low, axis.high],
      nice: false,
      ...(axis.log ? {} : { zero: false }),
      ...(axis.reverse ? { reverse: true } : {}),
    },
    axis: {
      title: labelled ? axis.title : null,
      values: axis.ticks.values,
      labelExpr: labelExpression(axis.ticks),
      ...(labelled ? {} : { labels: false }),
    },
  };
}
