/**
 * Where an axis has its ticks and what they say: steps of 1, 2 or 5 times a power of ten on a linear axis, decades (with
 * 2 and 5 between them when there is room) on a logarithmic one.
 */
import { superscript } from "../digits";

/** Ticks of an axis with their labels. */
export interface Ticks {
  readonly values: readonly number[];
  readonly labels: readonly string[];
}

/** The step of 1, 2 or 5 times a power of ten that cuts a range into at most `count` parts. */
export function tickStep(low: number, high: number, count: number): number {
  const raw = (high - low) / count;
  const power = Math.floor(Math.log10(raw) + 1e-9);
  const unit = 10 ** power;
  const factor = [1, 2, 5, 10].find((candidate) => candidate * unit >= raw * (1 - 1e-9)) ?? 10;
  return factor * unit;
}

/** The multiple of a step, free of the rounding of the multiplication. */
function multiple(index: number, step: number): number {
  return Number((index * step).toPrecision(12));
}

/** Ticks of a linear axis. */
export function linearTicks(low: number, high: number, count = 6): Ticks {
  const step = tickStep(low, high, count);
  const values: number[] = [];
  const slack = step * 1e-9;
  for (let index = Math.ceil((low - slack) / step); index * step <= high + slack; index++)
    values.push(multiple(index, step));
  const largest = Math.max(...values.map(Math.abs), Number.MIN_VALUE);
  const power = Math.floor(Math.log10(largest));
  if (power >= 6 || power < -3) {
    const decimals = Math.max(0, power - Math.floor(Math.log10(step) + 1e-9));
    const unit = 10 ** power;
    return { values, labels: values.map((value) => powerLabel((value / unit).toFixed(decimals), power, value === 0)) };
  }
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  return { values, labels: values.map((value) => (value === 0 ? "0" : grouped(value.toFixed(decimals)))) };
}

/** Ticks of a logarithmic axis; `high > low > 0`. */
export function logTicks(low: number, high: number, count = 8): Ticks {
  const decades = Math.log10(high / low);
  if (decades < 0.6) return linearTicks(low, high, count);
  const first = Math.floor(Math.log10(low) + 1e-12);
  const last = Math.ceil(Math.log10(high) - 1e-12);
  const factors = decades * 3 <= count + 1 ? [1, 2, 5] : [1];
  const stride = Math.max(1, Math.ceil(decades / count));
  const values: number[] = [];
  for (let power = first; power <= last; power++) {
    if (power % stride !== 0) continue;
    for (const factor of factors) {
      const value = Number(`${factor}e${power}`);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) values.push(value);
    }
  }
  const plain = values.every((value) => value > 0.9e-3 && value < 1.1e4);
  return { values, labels: values.map((value) => logLabel(value, plain)) };
}

/** A tick of a logarithmic axis: plain where all are handy, otherwise powers of ten but for 0.1 to 100. */
function logLabel(value: number, plain: boolean): string {
  const power = Math.floor(Math.log10(value) + 1e-9);
  if (plain || (power >= -1 && power <= 2)) return grouped(String(value));
  return powerLabel(String(Math.round(value / 10 ** power)), power, false);
}

function powerLabel(mantissa: string, power: number, zero: boolean): string {
  if (zero) return "0";
  const tens = `10${superscript(power)}`;
  return Number(mantissa) === 1 ? tens : `${mantissa.replace("-", "\u2212")}\u00d7${tens}`;
}

function grouped(plain: string): string {
  const [whole, fraction] = plain.replace("-", "\u2212").split(".") as [string, string?];
  const spaced = whole.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/g, "\u202f");
  return fraction === undefined ? spaced : `${spaced}.${fraction}`;
}

/** The Vega expression that gives a tick value its label. */
export function labelExpression({ values, labels }: Ticks): string {
  const map = Object.fromEntries(values.map((value, index) => [String(value), labels[index]]));
  return `(${JSON.stringify(map)})[datum.value]`;
}
