import { describe, expect, it } from "vitest";
import {
  blackbodyChromaticity,
  photonNumberDensity,
  planckLaw,
  wienFrequency,
  wienWavelength,
} from "../../../cosmo/blackbody";
import { colorMatching, firstWavelength, wavelengthStep } from "../../../cosmo/blackbody/colorMatching";
import { frequencyRoot } from "../../../cosmo/blackbody/wienFrequency";
import { wavelengthRoot } from "../../../cosmo/blackbody/wienWavelength";
import { constantsSets, radiationConstant } from "../../../cosmo/constants";
import { integrate } from "../../../cosmo/numerics";
import { evaluateModel } from "../../../cosmo/solve";
import { plain, relative } from "../exactModels";

const constants = constantsSets.codata2022;

describe("Planck's law", () => {
  it("integrates to the Stefan-Boltzmann law, sigma T^4/pi, with the printed sigma", () => {
    // sigma_SB 5.670374419e-8 W m-2 K-4 (CODATA 2018 and 2022, exact, printed with ten digits).
    const temperature = 2970;
    const total = integrate((x) => planckLaw(x * 1e14, temperature, constants), 1e-6, 60).value * 1e14;
    expect(relative(total, (5.670374419e-8 * temperature ** 4) / Math.PI)).toBeLessThan(5e-10);
  });

  it("tends to the Rayleigh-Jeans law at low frequency and stays finite at high", () => {
    const low = (2 * 1e6 ** 2 * constants.boltzmann * 2.7255) / 299792458 ** 2;
    // The next term is h nu/2kT = 9e-6.
    expect(relative(planckLaw(1e6, 2.7255, constants), low)).toBeLessThan(1e-5);
    expect(planckLaw(1e15, 2.7255, constants)).toBe(0);
    expect(planckLaw(0, 2.7255, constants)).toBe(0);
  });

  it("has its maximum at wienFrequency by frequency and at wienWavelength by wavelength", () => {
    const nu = wienFrequency(2.7255, constants);
    const lambda = wienWavelength(2.7255, constants);
    const perWavelength = (wavelength: number) =>
      (planckLaw(299792458 / wavelength, 2.7255, constants) * 299792458) / wavelength ** 2;
    for (const step of [0.999, 1.001]) {
      expect(planckLaw(nu * step, 2.7255, constants)).toBeLessThan(planckLaw(nu, 2.7255, constants));
      expect(perWavelength(lambda * step)).toBeLessThan(perWavelength(lambda));
    }
  });

  it("refuses temperatures that are not finite and positive, by name, and NaN frequencies", () => {
    expect(() => planckLaw(1e9, 0, constants)).toThrow("planckLaw: temperature must be finite and positive, got 0");
    expect(() => planckLaw(Number.NaN, 2.7, constants)).toThrow("planckLaw: frequency must be finite and not negative");
    expect(() => wienWavelength(Number.NaN, constants)).toThrow("wienWavelength: temperature must be finite");
    expect(() => photonNumberDensity(-1, constants)).toThrow("photonNumberDensity: temperature must be finite");
  });
});

describe("Wien's displacement law", () => {
  it("has the constants of CODATA 2022: b = 2.897771955e-3 m K, b' = 5.878925757e10 Hz/K", () => {
    expect(relative(wienWavelength(1, constants), 2.897771955e-3)).toBeLessThan(2e-10);
    expect(relative(wienFrequency(1, constants), 5.878925757e10)).toBeLessThan(2e-10);
  });

  it("has roots of x = n (1 - e^-x)", () => {
    expect(relative(wavelengthRoot, 5 * -Math.expm1(-wavelengthRoot))).toBeLessThan(4e-16);
    expect(relative(frequencyRoot, 3 * -Math.expm1(-frequencyRoot))).toBeLessThan(4e-16);
  });
});

describe("photonNumberDensity", () => {
  it("is 410.73 per cm3 at 2.7255 K", () => {
    // Particle Data Group, Review of Particle Physics 2022, table 2.1 (memory): n_gamma = 410.73 (T/2.7255)^3 per cm3.
    const value = evaluateModel(plain).value("photonNumberDensity");
    expect(Math.abs(value - 410.73)).toBeLessThan(0.005);
  });

  it("is the energy density over the mean energy 2.7012 kT", () => {
    // zeta(4) Gamma(4)/(zeta(3) Gamma(3)) = pi^4/(30 zeta(3)): exact.
    const energy = radiationConstant(constants) * 2.7255 ** 4;
    const mean = Math.PI ** 4 / (30 * 1.2020569031595942);
    expect(
      relative(energy / (mean * constants.boltzmann * 2.7255), photonNumberDensity(2.7255, constants)),
    ).toBeLessThan(1e-14);
  });
});

describe("baryonToPhotonRatio", () => {
  it("meets the rule eta = 273.9e-10 omega_b", () => {
    // Steigman 2006, Int. J. Mod. Phys. E 15, 1 (memory): 1e10 eta = 273.9 omega_b at T 2.725 K, nucleon mass averaged over helium.
    const numbers = evaluateModel({ ...plain, photonTemperature: 2.725, helium: 0.245 });
    expect(relative(numbers.value("baryonToPhotonRatio"), 273.9e-10 * 0.0224)).toBeLessThan(1e-3);
  });
});

describe("blackbodyChromaticity", () => {
  it("rests on color-matching functions that have one sum: 21.3715, 21.3713, 21.3715 as the standard prints them", () => {
    // CIE 15, sums of the 5 nm table (memory).
    const sums = [0, 1, 2].map((k) => colorMatching.reduce((sum, row) => sum + row[k]!, 0));
    expect(sums[0]).toBeCloseTo(21.3715, 4);
    expect(sums[1]).toBeCloseTo(21.3713, 4);
    expect(sums[2]).toBeCloseTo(21.3715, 4);
    expect(colorMatching).toHaveLength(81);
    // Common practice, no source: visible light is 380 to 780 nm.
    expect(firstWavelength).toBe(380);
    expect(firstWavelength + wavelengthStep * 80).toBe(780);
  });

  it("gives illuminant A: x 0.44758, y 0.40745", () => {
    // CIE 15: a Planckian radiator of 2848 K with hc/k = 1.435e-2 m K, which is 2856 K with today's constant.
    const temperature = (2848 * ((constants.planck * 299792458) / constants.boltzmann)) / 1.435e-2;
    expect(temperature).toBeCloseTo(2855.5, 1);
    const { x, y } = blackbodyChromaticity(temperature, constants);
    // Measured 4.9e-6 and 4.3e-6; half a unit of the last digit is 5e-6.
    expect(Math.abs(x - 0.44758)).toBeLessThan(1e-5);
    expect(Math.abs(y - 0.40745)).toBeLessThan(1e-5);
  });

  it("gives x 0.4369, y 0.4041 at 3000 K", () => {
    // Wyszecki & Stiles 1982, Color Science, table of Planckian radiators (memory).
    const numbers = evaluateModel(plain);
    const x = numbers.quantity("blackbodyChromaticityX", 3000);
    const y = numbers.quantity("blackbodyChromaticityY", 3000);
    expect(Math.abs(x.value - 0.4369)).toBeLessThan(5e-5);
    expect(Math.abs(y.value - 0.4041)).toBeLessThan(5e-5);
    expect(x.error).toBeLessThan(5e-4 * x.value);
    expect(x.error).toBeGreaterThan(6e-6);
  });

  it("runs from the red end of the spectrum to the blue limit", () => {
    // Red end: x 0.7347, y 0.2653 of monochromatic light beyond 700 nm. Blue limit of a hot body: x 0.2399, y 0.2341 (both CIE, memory).
    const cold = blackbodyChromaticity(5, constants);
    expect(cold.x).toBeCloseTo(0.737, 2);
    const hot = blackbodyChromaticity(1e9, constants);
    expect(hot.x).toBeCloseTo(0.2399, 3);
    expect(hot.y).toBeCloseTo(0.2341, 3);
    let before = cold.x;
    for (let temperature = 800; temperature < 3e4; temperature *= 1.2) {
      const { x } = blackbodyChromaticity(temperature, constants);
      expect(x).toBeLessThan(before);
      before = x;
    }
  });
});

describe("the background", () => {
  const numbers = evaluateModel(plain);

  it("is near 2.7 K and its spectrum peaks in the microwaves", () => {
    // Common practice, no source: microwaves are 0.3 to 300 GHz, 1 mm to 1 m.
    expect(Math.abs(numbers.value("photonTemperature") - 2.7)).toBeLessThan(0.05);
    expect(numbers.value("wienFrequency")).toBeGreaterThan(0.3);
    expect(numbers.value("wienFrequency")).toBeLessThan(300);
    expect(numbers.value("wienWavelength")).toBeGreaterThan(1);
    expect(numbers.value("wienWavelength")).toBeLessThan(1000);
    const peak = numbers.value("backgroundBrightness", numbers.value("wienFrequency"));
    expect(numbers.value("backgroundBrightness", 30)).toBeLessThan(peak);
    expect(numbers.value("backgroundBrightness", 600)).toBeLessThan(peak);
  });

  it("would have looked red to orange to the eye at last scattering", () => {
    // Common practice, no source: visible light is 380 to 780 nm. Red to orange of the CIE diagram is taken as the hues from where
    // yellow ends, 580 nm (x 0.5125, y 0.4866), to the red end (x 0.7347, y 0.2653), seen from white at (1/3, 1/3).
    const temperature = numbers.value("radiationTemperature", numbers.value("lastScatteringRedshift"));
    const { x, y } = blackbodyChromaticity(temperature, constants);
    const angle = (a: number, b: number) => Math.atan2(b - 1 / 3, a - 1 / 3);
    expect(angle(x, y)).toBeGreaterThan(angle(0.7347, 0.2653));
    expect(angle(x, y)).toBeLessThan(angle(0.5125, 0.4866));
    expect(Math.hypot(x - 1 / 3, y - 1 / 3)).toBeGreaterThan(0.1);
  });
});
