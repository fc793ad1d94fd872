import { describe, expect, it } from "vitest";
import { fittedCoefficients } from "../../../cosmo/recombination/lymanAlphaCorrection";
import { fitCorrection } from "../../../kernel-ext/command/calibrate";

describe("the fit of the calibrated tier", () => {
  it("gives the coefficients that stand in the tree, and meets its three printed numbers", () => {
    const { coefficients, residuals } = fitCorrection();
    coefficients.forEach((each, i) => {
      // Three nearly degenerate numbers: noise of 1e-12 in the histories moves the coefficients by some 1e-8.
      expect(Math.abs(each / fittedCoefficients[i]! - 1)).toBeLessThan(1e-6);
    });
    for (const residual of residuals) expect(Math.abs(residual)).toBeLessThan(1e-9);
  });
});
