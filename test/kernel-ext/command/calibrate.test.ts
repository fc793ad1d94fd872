import { describe, expect, it } from "vitest";
import { fittedCoefficients } from "../../../cosmo/recombination/lymanAlphaCorrection";
import { fitCorrection } from "../../../kernel-ext/command/calibrate";

describe("the fit of the calibrated tier", () => {
  it("gives the coefficients that stand in the tree, and meets its three printed numbers", () => {
    const { coefficients, residuals } = fitCorrection();
    coefficients.forEach((each, i) => {
      // A finer solver was seen to move the coefficients by 3e-9 to 9e-9.
      expect(Math.abs(each / fittedCoefficients[i]! - 1)).toBeLessThan(1e-6);
    });
    for (const residual of residuals) expect(Math.abs(residual)).toBeLessThan(1e-9);
  });
});
