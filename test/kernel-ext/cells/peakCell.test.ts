import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { peakCell } from "../../../kernel-ext/cells";
import { expectCell } from "./expectCell";
import { refusal } from "./refusal";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const numbers = evaluateModel(base);
const cell = peakCell(base);

describe("peakCell", () => {
  it("shows positions, spacing, heights, conventions and sources", async () => {
    await expectCell("peakCell", cell);
  });

  it("gives the register's digits", () => {
    const { peakMultipole, peakSpacing, peakHeightRatio, acousticMultipole } = cell.values;
    expect(peakMultipole).toEqual([1, 2, 3].map((m) => numbers.value("peakMultipole", m)));
    expect(peakHeightRatio).toEqual([2, 3].map((m) => numbers.value("peakHeightRatio", m)));
    expect(peakSpacing).toBe(numbers.value("peakSpacing"));
    expect(acousticMultipole).toBe(numbers.value("acousticMultipole"));
  });

  it("the peaks lie within 2% of the measured ones (Planck 2018 I, table of peaks and troughs; memory)", () => {
    // Measured 0.1%, 0.4% and 0.6%.
    for (const [i, measured] of [220.6, 538.1, 809.8].entries()) {
      expect(Math.abs(cell.values.peakMultipole[i]! / measured - 1)).toBeLessThan(0.02);
    }
  });

  it("shows the measured digits with their errors as printed (Planck 2018 I; memory)", () => {
    const text = cell.toText();
    for (const printed of ["220.6 ± 0.6", "538.1 ± 1.3", "809.8 ± 1.0"]) expect(text).toContain(printed);
  });

  it("says that these are fits and names their accuracy", () => {
    const notes = cell.notes.join("\n");
    expect(notes).toContain("the peaks come from fitting formulas; the spectrum itself is not computed");
    expect(notes).toContain("Doran & Lilley 2002");
    expect(notes).toContain("0.6% from the measured peaks near Planck's parameters");
    expect(notes).toContain("3% from the measured heights near Planck's parameters");
  });

  it("a closed geometry brings the peaks closer together, an open one spreads them (common practice, no source)", () => {
    const closed = peakCell({ ...base, curvature: -0.02 }).values;
    const open = peakCell({ ...base, curvature: 0.02 }).values;
    expect(closed.peakSpacing).toBeLessThan(cell.values.peakSpacing);
    expect(open.peakSpacing).toBeGreaterThan(cell.values.peakSpacing);
  });

  it("more baryons raise the first peak against the second (common practice, no source)", () => {
    const heavy = peakCell({ ...base, baryonDensity: 0.026 }).values;
    expect(heavy.peakHeightRatio[0]).toBeLessThan(cell.values.peakHeightRatio[0]);
  });

  it("names the spectral index, and says when it is the default", () => {
    expect(cell.toText()).toContain("spectral index n_s = 0.965 (default)");
    const tilted = peakCell({ ...base, scalarSpectralIndex: 1 });
    expect(tilted.toText()).toMatch(/spectral index n_s = 1$/m);
    expect(tilted.values.peakHeightRatio[0]).toBeGreaterThan(cell.values.peakHeightRatio[0]);
  });

  it("refuses a model without baryons", () => {
    expect(refusal(() => peakCell({ ...base, baryonDensity: 0 }))).toBe(
      "recombination: this model has no baryons (baryonDensity 0), so nothing recombines | give baryonDensity a value near 0.0224",
    );
  });

  it("refuses a typo in the model", () => {
    expect(refusal(() => peakCell({ ...base, scalarSpectralIndx: 1 } as never))).toBe(
      'peakCell: "scalarSpectralIndx" is not a known parameter | did you mean "scalarSpectralIndex"?',
    );
  });
});
