import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { plain, relative } from "../exactModels";

const numbers = evaluateModel(plain);

describe("peakMultipole(m)", () => {
  it("is within 2% of the measured peaks of Planck 2018 I", () => {
    // Planck 2018 I (1807.06205), table of peaks and troughs of TT (memory): 220.6 +- 0.6, 538.1 +- 1.3, 809.8 +- 1.0.
    const measured = [220.6, 538.1, 809.8];
    measured.forEach((multipole, i) => {
      // Measured 0.1%, 0.4%, 0.6%.
      expect(relative(numbers.value("peakMultipole", i + 1), multipole), `peak ${i + 1}`).toBeLessThan(0.02);
    });
    expect(relative(numbers.value("peakSpacing"), (809.8 - 220.6) / 2)).toBeLessThan(0.02);
  });

  it("closed geometry brings the peaks closer together, open spreads them, dark energy likewise but more weakly", () => {
    // Common practice, no source.
    const spacing = (more: object) => evaluateModel({ ...plain, ...more }).value("peakSpacing");
    const flat = spacing({});
    const closed = spacing({ curvature: -0.03 });
    const open = spacing({ curvature: 0.03 });
    expect(closed).toBeLessThan(flat);
    expect(open).toBeGreaterThan(flat);
    // The same change of Omega_DE in flat models at the same densities of matter: hubble makes room for it.
    const share = numbers.value("darkEnergyFraction");
    const hubbleFor = (fraction: number) => 67.4 * Math.sqrt((1 - share) / (1 - fraction));
    const more = spacing({ hubble: hubbleFor(share + 0.03) });
    const less = spacing({ hubble: hubbleFor(share - 0.03) });
    expect(more).toBeLessThan(flat);
    expect(less).toBeGreaterThan(flat);
    expect(flat - more).toBeLessThan(0.6 * (flat - closed));
    expect(less - flat).toBeLessThan(0.6 * (open - flat));
  });

  it("moves with the spectral index by the fit and with nothing else of it", () => {
    const blue = evaluateModel({ ...plain, scalarSpectralIndex: 1 });
    // phi has the factor 1.466 - 0.466 n: 1.6% of a phase of 0.27 between 0.965 and 1.
    const shift = blue.value("peakMultipole", 1) - numbers.value("peakMultipole", 1);
    const phase = 1 - blue.value("peakMultipole", 1) / blue.value("acousticMultipole");
    expect(shift / (numbers.value("acousticMultipole") * phase * 0.466 * 0.035)).toBeCloseTo(1, 8);
    expect(blue.value("acousticMultipole")).toBe(numbers.value("acousticMultipole"));
  });

  it("dark energy that was there before last scattering shifts the peaks", () => {
    const early = evaluateModel({ ...plain, darkEnergy: { w0: -0.9, wa: 0.85 } });
    const without =
      early.value("acousticMultipole") * (numbers.value("peakMultipole", 1) / numbers.value("acousticMultipole"));
    expect(early.value("darkEnergyFractionAt", 1090)).toBeGreaterThan(1e-3);
    expect(early.value("peakMultipole", 1)).toBeLessThan(without);
  });

  it("says which fit it uses and refuses other peaks", () => {
    const value = numbers.quantity("peakMultipole", 2);
    expect(value.sources).toContain("doranLilley2002");
    expect(value.notes[0]!.text).toContain("fit of Doran & Lilley 2002");
    expect(value.notes.some((note) => note.text.startsWith("calibrated tier"))).toBe(true);
    expect(() => numbers.value("peakMultipole", 4)).toThrow("peakMultipole: peak must be 1, 2 or 3, got 4");
    expect(() => numbers.value("peakHeightRatio", 1)).toThrow("peakHeightRatio: peak must be 2 or 3, got 1");
  });
});

describe("peakHeightRatio(m)", () => {
  it("is within 3% of the measured heights", () => {
    // Planck 2018 I, table of peaks (memory): D_l 5733, 2586 and 2518 uK^2.
    expect(relative(numbers.value("peakHeightRatio", 2), 2586 / 5733)).toBeLessThan(0.03);
    expect(relative(numbers.value("peakHeightRatio", 3), 2518 / 5733)).toBeLessThan(0.03);
  });

  it("more baryons raise the odd peaks against the even ones", () => {
    // Common practice, no source.
    const heavy = evaluateModel({ ...plain, baryonDensity: 0.03 });
    expect(heavy.value("peakHeightRatio", 2)).toBeLessThan(numbers.value("peakHeightRatio", 2));
    const odd = (each: typeof numbers) => each.value("peakHeightRatio", 3) / each.value("peakHeightRatio", 2);
    expect(odd(heavy)).toBeGreaterThan(odd(numbers));
  });
});
