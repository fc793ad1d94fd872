import { quantityRegister } from "../../cosmo/quantities";
import { ReferenceModels, readReferences } from "./readReferences";

/** What the references say of one quantity's accuracy. */
export interface AccuracyRow {
  readonly quantity: string;
  /** The bound that the register states, relative. */
  readonly stated: number;
  /** Largest and median relative difference to the references, all tiers and arguments. */
  readonly maximum: number;
  readonly median: number;
  readonly rows: number;
  /** Share of rows in which the stated error covers the true one. */
  readonly covered: number;
  /** Share of rows in which the stated error is no more than it should be (see the test). */
  readonly sharp: number;
}

/** The reference's own two tolerances, as its error: nothing can be measured below it. */
const referenceError = 1e-14;

/** Measures every quantity that has references. */
export function measureAccuracy(): AccuracyRow[] {
  const models = new ReferenceModels();
  const collected = new Map<string, { differences: number[]; covered: number; sharp: number }>();
  for (const file of readReferences()) {
    const entry = collected.get(file.quantity) ?? { differences: [], covered: 0, sharp: 0 };
    collected.set(file.quantity, entry);
    for (const row of file.rows) {
      const quantity = models.numbers(row.model, file.tier).quantity(file.quantity, ...row.arguments);
      const miss = Math.abs(quantity.value - row.value);
      const scale = Math.abs(row.value) || 1;
      entry.differences.push(miss / scale);
      const stated = quantityRegister.get(file.quantity)!.accuracy;
      if (miss <= quantity.error + referenceError * scale) entry.covered++;
      if (quantity.error <= Math.max(100 * miss, 1e-12 * scale, 0.1 * stated * scale)) entry.sharp++;
    }
  }
  return [...collected].map(([quantity, { differences, covered, sharp }]) => {
    const sorted = [...differences].sort((a, b) => a - b);
    return {
      quantity,
      stated: quantityRegister.get(quantity)!.accuracy,
      maximum: sorted[sorted.length - 1]!,
      median: sorted[Math.floor(sorted.length / 2)]!,
      rows: sorted.length,
      covered: covered / sorted.length,
      sharp: sharp / sorted.length,
    };
  });
}

/** The table as Markdown, for the README and the reference pages. */
export function accuracyMarkdown(rows: readonly AccuracyRow[]): string {
  const lines = rows.map(
    (row) =>
      `| ${row.quantity} | ${row.stated.toExponential(0)} | ${row.maximum.toExponential(1)} | ${row.median.toExponential(1)} | ${row.rows} |`,
  );
  return [
    "# Accuracy",
    "",
    "Made by `npm run accuracy`. Relative differences to the references of `values/` (48 models, generators beside them), the bound",
    "that the register states, and how many values were compared. A test fails when a bound is exceeded or 100 times too loose.",
    "",
    "| quantity | stated | measured, largest | measured, median | values |",
    "|---|---|---|---|---|",
    ...lines,
    "",
  ].join("\n");
}
