import { describe, expect, it } from "vitest";
import { astronomicalUnit, julianYear, lightSpeed, parsec } from "../../cosmo/constants";
import { evaluateModel } from "../../cosmo/solve";
import { plain } from "./exactModels";

/** Facts of the trade: common practice, no source. */
describe("common practice", () => {
  it("the energy budget is about 69% dark energy, 26% dark matter and 5% baryons", () => {
    const numbers = evaluateModel(plain);
    expect(Math.abs(numbers.value("darkEnergyFraction") - 0.69)).toBeLessThan(0.01);
    expect(Math.abs(numbers.value("coldMatterFraction") - 0.26)).toBeLessThan(0.01);
    expect(Math.abs(numbers.value("baryonFraction") - 0.05)).toBeLessThan(0.005);
  });

  it("light takes a little over 8 minutes from the Sun and about 4 years from the nearest star", () => {
    const minutes = astronomicalUnit / lightSpeed / 60;
    expect(minutes).toBeGreaterThan(8);
    expect(minutes).toBeLessThan(8.5);
    // 1.30 pc: the nearest star's parallax is 0.77 seconds of arc.
    const years = (1.3 * parsec) / lightSpeed / julianYear;
    expect(Math.abs(years - 4)).toBeLessThan(0.5);
  });

  it("the same units code carries a light-travel distance in Mpc to a lookback time in Gyr", () => {
    const numbers = evaluateModel(plain);
    const years = (numbers.value("lightTravelDistance", 1) * 1e6 * parsec) / lightSpeed / julianYear;
    expect(years / (1e9 * numbers.value("lookbackTime", 1))).toBeCloseTo(1, 13);
  });
});
