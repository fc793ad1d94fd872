/** A matrix of correlations: a colored cell a pair, the number written in it. */
import { symbolText } from "../symbol";
import { Canvas } from "./canvas";
import { type Chart, checkWords, makeChart } from "./chart";
import { seriesLook } from "./palette";
import { estimatedWidth } from "./textWidth";

/** What a chart of correlations is made from. */
export interface CorrelationChartOptions {
  readonly title: string;
  readonly description: string;
  /** Symbols or names, one a row and column. */
  readonly names: readonly string[];
  /** Between -1 and 1. */
  readonly matrix: readonly (readonly number[])[];
}

const caller = "correlationChart";
const cell = { width: 48, height: 26 };

/**
 * A chart of correlations, the half below the diagonal: one color for above 0, another for below, the stronger the darker; the numbers say the
 * same without color.
 *
 * @throws RangeError when the matrix is not square, has no two names or more than 24, or holds a number outside -1 to 1
 */
export function correlationChart(options: CorrelationChartOptions): Chart {
  checkWords(caller, options);
  const { matrix } = options;
  const names = options.names.map(symbolText);
  const count = names.length;
  if (!(count >= 2 && count <= 24)) throw new RangeError(`${caller}: there must be 2 to 24 names, got ${count}`);
  if (matrix.length !== count || matrix.some((row) => row.length !== count)) {
    throw new RangeError(`${caller}: matrix must have a row and a column a name, ${count}`);
  }
  const left = Math.ceil(Math.max(...names.map((name) => estimatedWidth(name, 12)))) + 16;
  const below = Math.ceil(Math.max(...names.map((name) => estimatedWidth(name, 12))) * 0.7) + 16;
  const canvas = new Canvas(left + (count - 1) * cell.width + 20, (count - 1) * cell.height + below);
  for (let i = 1; i < count; i++) {
    const top = (i - 1) * cell.height;
    canvas.text(names[i] as string, [left - 8, top + cell.height / 2], { align: "right", size: 12 });
    for (let j = 0; j < i; j++) {
      const value = matrix[i]?.[j] as number;
      if (!(value >= -1 && value <= 1)) {
        throw new RangeError(`${caller}: correlations must be between -1 and 1, got ${value}`);
      }
      const start = [left + j * cell.width, top] as const;
      const end = [start[0] + cell.width - 2, top + cell.height - 2] as const;
      // A ground of its own, so that the number can be read on a dark page too.
      canvas.rectangle(start, end, { color: "#ffffff" });
      const strength = Math.round(Math.abs(value) * 10) / 10;
      if (strength > 0) {
        const { color } = seriesLook(value > 0 ? 0 : 1);
        canvas.rectangle(start, end, { color, opacity: Math.round(70 * strength) / 100 });
      }
      const words = value.toFixed(2).replace("-0.00", "0.00").replace("-", "\u2212");
      canvas.text(words, [start[0] + cell.width / 2 - 1, top + cell.height / 2 - 1], {
        align: "center",
        size: 11,
        color: "#1a1a1a",
      });
    }
  }
  for (let j = 0; j + 1 < count; j++) {
    const place = [left + (j + 0.5) * cell.width, (count - 1) * cell.height + 10] as const;
    canvas.text(names[j] as string, place, { align: "right", size: 12, angle: -40 });
  }
  return makeChart({
    caller,
    title: options.title,
    description: options.description,
    width: canvas.width,
    views: [canvas.view()],
    lines: strongest(names, matrix),
  });
}

/** The pairs with the strongest correlations, in words. */
function strongest(names: readonly string[], matrix: readonly (readonly number[])[]): string[] {
  const pairs = names.flatMap((name, i) =>
    names.slice(0, i).map((other, j) => ({ pair: `${other} and ${name}`, value: matrix[i]?.[j] as number })),
  );
  return pairs
    .sort((a, b) => Math.abs(b.value) - Math.abs(a.value))
    .slice(0, 8)
    .map(({ pair, value }) => `  ${pair}: ${value.toFixed(2).replace("-", "\u2212")}`);
}
