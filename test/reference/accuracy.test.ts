import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { accuracyMarkdown, measureAccuracy } from "./accuracyTable";

/**
 * The accuracies that the register states, against the references. Rounding, and what the references themselves know, end what
 * can be measured: below 1e-15 nothing is called too loose.
 */
const measurable = 1e-15;

const rows = measureAccuracy();

/** The generated table that the README points to. */
const tableFile = join(__dirname, "ACCURACY.md");

describe("the accuracy table", () => {
  it("lists every measured quantity with the bound it states now; `npm run accuracy` writes it anew", () => {
    // Measured figures differ a little between machines; names, bounds and counts do not.
    const fixed = (text: string) => text.replace(/\d\.\de[+-]\d+ \| \d\.\de[+-]\d+/g, "measured");
    const now = accuracyMarkdown(rows);
    if (process.env["WRITE_ACCURACY"] === "1") writeFileSync(tableFile, now);
    expect(fixed(readFileSync(tableFile, "utf8"))).toBe(fixed(now));
  });
});

describe("stated accuracy", () => {
  for (const row of rows) {
    it(`${row.quantity} keeps its bound ${row.stated.toExponential(0)} and is not stated 100 times too loose`, () => {
      expect(row.maximum).toBeLessThanOrEqual(row.stated);
      expect(row.stated).toBeLessThanOrEqual(100 * Math.max(row.maximum, measurable));
    });
  }
});

describe("error estimates", () => {
  const total = rows.reduce((sum, row) => sum + row.rows, 0);

  it("cover the true error in 99.5% of the evaluations", () => {
    expect(total).toBeGreaterThan(1000);
    const covered = rows.reduce((sum, row) => sum + row.covered * row.rows, 0) / total;
    expect(covered).toBeGreaterThan(0.995);
  });

  it("are below 100 times the true error, or below 1e-12 or a tenth of the stated bound, in 90%", () => {
    const sharp = rows.reduce((sum, row) => sum + row.sharp * row.rows, 0) / total;
    expect(sharp).toBeGreaterThan(0.9);
  });

  it("hold for every quantity by itself in 95% of its evaluations", () => {
    for (const row of rows) expect(row.covered, row.quantity).toBeGreaterThanOrEqual(0.95);
  });
});
