import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { einsteinDeSitter, plain, relative, withoutRadiation } from "../exactModels";

describe("equalityRedshift and equalityWavenumber", () => {
  it("compare baryons and cold matter, or all matter, with photons and N_eff neutrinos", () => {
    const printed = evaluateModel(plain);
    const all = evaluateModel({ ...plain, conventions: { equalityMatter: "allMatter" } });
    const radiation = printed.model.photonDensity * (1 + (7 / 8) * (4 / 11) ** (4 / 3) * 3.044);
    expect(relative(1 + printed.value("equalityRedshift"), 0.1424 / radiation)).toBeLessThan(1e-14);
    expect(relative(1 + all.value("equalityRedshift"), all.model.matterDensity / radiation)).toBeLessThan(1e-14);
    expect(printed.quantity("equalityRedshift").notes[0]!.text).toContain("baryons and cold matter");
    expect(all.quantity("equalityRedshift").notes[0]!.text).toContain("massive neutrinos");
  });

  it("the wavenumber is sqrt(2 Omega_m H0^2 (1+z_eq))/c when neutrinos are massless", () => {
    // Eisenstein & Hu 1998, eq. 3, before rounding: (2 Omega_0 H0^2 z_eq)^(1/2), with 1+z; curvature and dark energy add 1e-9.
    const numbers = evaluateModel({ ...plain, neutrinos: { masses: [] } });
    const z = numbers.value("equalityRedshift");
    const expected = Math.sqrt(2 * numbers.value("matterFraction") * (1 + z)) * (67.4 / 299792.458);
    expect(relative(numbers.value("equalityWavenumber"), expected)).toBeLessThan(1e-9);
  });

  it("are refused without radiation or without matter", () => {
    expect(() => einsteinDeSitter().value("equalityRedshift")).toThrow(
      "equalityRedshift: this model has no radiation, so matter and radiation were never equal",
    );
    expect(() =>
      withoutRadiation({ coldMatterFraction: 0, photonTemperature: 2.7 }).value("equalityWavenumber"),
    ).toThrow("equalityRedshift: this model has no matter");
  });
});
