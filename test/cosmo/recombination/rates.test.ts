import { describe, expect, it } from "vitest";
import { atoms, constantsSets } from "../../../cosmo/constants";
import {
  heliumLogitRate,
  heliumSingletRecombination,
  heliumTripletRecombination,
} from "../../../cosmo/recombination/heliumRates";
import {
  caseBRecombination,
  excitedIonizationOverRecombination,
  groundIonizationOverRecombination,
  lymanAlphaVolume,
  peeblesFactor,
} from "../../../cosmo/recombination/hydrogenRates";
import { electronStates, levelTemperature, sahaLogarithms } from "../../../cosmo/recombination/sahaFactors";

const constants = constantsSets.codata2022;

describe("atomic data", () => {
  it("the Lyman-alpha level is the statistical mean of the two 2p levels", () => {
    // NIST Atomic Spectra Database: 2p J = 1/2 and J = 3/2, weights 2 and 4.
    const mean = (2 * 82258.9191133 + 4 * 82259.2850014) / 6;
    expect(atoms.lymanAlpha / 100).toBeCloseTo(mean, 4);
  });

  it("the photo-ionization cross sections are the exact ones of hydrogen at the two helium lines", () => {
    // Stobbe 1930; Osterbrock & Ferland 2006, eq. 2.4 (memory): A0 (L_H/L)^4 exp(4 - 4 atan(x)/x)/(1 - e^(-2 pi/x)), x = sqrt(L/L_H - 1).
    const fineStructure = 7.2973525643e-3;
    const bohrRadius = 5.29177210544e-11;
    const threshold = (2 ** 9 * Math.PI ** 2 * fineStructure * bohrRadius ** 2) / (3 * Math.exp(4));
    expect(threshold).toBeCloseTo(6.304e-22, 25);
    const crossSection = (level: number) => {
      const x = Math.sqrt(level / atoms.hydrogenLimit - 1);
      const shape = Math.exp(4 - (4 * Math.atan(x)) / x) / (1 - Math.exp((-2 * Math.PI) / x));
      return threshold * (atoms.hydrogenLimit / level) ** 4 * shape;
    };
    // Printed with five digits.
    expect(Math.abs(crossSection(atoms.heliumSinglet2p) / atoms.hydrogenCrossSectionAtSinglet - 1)).toBeLessThan(5e-5);
    expect(Math.abs(crossSection(atoms.heliumTriplet2p) / atoms.hydrogenCrossSectionAtTriplet - 1)).toBeLessThan(5e-5);
  });

  it("levels in kelvin: hydrogen's limit is 157,800 K, helium's 285,300 K", () => {
    // 13.598 eV and 24.587 eV over k_B (NIST ASD).
    expect((atoms.hydrogenLimit * levelTemperature(constants)) / 11604.518).toBeCloseTo(13.5984, 4);
    expect((atoms.heliumLimit * levelTemperature(constants)) / 11604.518).toBeCloseTo(24.587, 3);
  });
});

describe("hydrogen's rates", () => {
  it("caseBRecombination is near 2.59e-19 m3/s at 10,000 K", () => {
    // Osterbrock & Ferland 2006, table 2.1: alpha_B = 2.59e-13 cm3/s at 10^4 K (memory).
    expect(Math.abs(caseBRecombination(1e4) / 2.59e-19 - 1)).toBeLessThan(0.01);
    expect(caseBRecombination(3000)).toBeGreaterThan(caseBRecombination(1e4));
  });

  it("ionization from n = 2 and from the ground differ by the Lyman-alpha Boltzmann factor", () => {
    for (const temperature of [2000, 3000, 8000]) {
      const factor = Math.exp((-atoms.lymanAlpha * levelTemperature(constants)) / temperature);
      const ratio =
        groundIonizationOverRecombination(temperature, constants) /
        excitedIonizationOverRecombination(temperature, constants);
      expect(ratio / factor - 1).toBeCloseTo(0, 12);
    }
  });

  it("ionization from the ground over recombination is Saha's equilibrium", () => {
    for (const temperature of [2000, 5000]) {
      const saha = Math.exp(sahaLogarithms(temperature, constants).hydrogen);
      expect(groundIonizationOverRecombination(temperature, constants) / saha - 1).toBeCloseTo(0, 12);
    }
  });

  it("electronStates is 2.4e21 T^1.5 per cubic meter", () => {
    // (2 pi m_e k/h^2)^1.5 = 2.4147e21 m^-3 K^-1.5: handbook value of the Richardson/Saha constant (memory).
    expect(electronStates(1, constants) / 2.4146831e21).toBeCloseTo(1, 6);
    expect(electronStates(100, constants) / electronStates(1, constants)).toBeCloseTo(1000, 9);
  });

  it("peeblesFactor goes from 1 in empty space to the share of two-photon decays in thick gas", () => {
    expect(peeblesFactor(1e-10, 1e5, 0)).toBe(1);
    const beta = 1e5;
    const rate = atoms.hydrogenTwoPhotonRate;
    expect(peeblesFactor(1, beta, 1e30)).toBeCloseTo(rate / (rate + beta), 12);
    // Half way, by hand: K n = 1/beta.
    expect(peeblesFactor(1, beta, 1 / beta)).toBeCloseTo((1 + rate / beta) / (2 + rate / beta), 14);
  });

  it("lymanAlphaVolume is lambda^3/(8 pi) with lambda = 121.57 nm", () => {
    // The Lyman-alpha wavelength in vacuum, 1215.67 Angstrom (NIST ASD).
    expect(lymanAlphaVolume / (121.567e-9 ** 3 / (8 * Math.PI)) - 1).toBeCloseTo(0, 4);
  });
});

describe("helium's rates", () => {
  it("recombination coefficients fall with temperature and the triplets take more than the singlets", () => {
    for (const temperature of [3000, 5000, 8000]) {
      expect(heliumSingletRecombination(temperature)).toBeGreaterThan(heliumSingletRecombination(1.1 * temperature));
      expect(heliumTripletRecombination(temperature)).toBeGreaterThan(heliumSingletRecombination(temperature));
    }
    // Singlets plus triplets near the case-B total of 2.7e-19 m3/s at 10^4 K (Osterbrock & Ferland 2006, table 2.5, memory).
    expect(Math.abs((heliumSingletRecombination(1e4) + heliumTripletRecombination(1e4)) / 2.7e-19 - 1)).toBeLessThan(
      0.25,
    );
  });

  it("heliumLogitRate vanishes in Saha equilibrium and pulls back towards it", () => {
    const temperature = 5500;
    const hydrogenDensity = 0.19 * (temperature / 2.7255) ** 3;
    const electrons = 1.02;
    const odds = Math.exp(sahaLogarithms(temperature, constants).helium) / (electrons * hydrogenDensity);
    const rateAt = (factor: number) =>
      heliumLogitRate(
        {
          temperature,
          hydrogenDensity,
          heliumRatio: 0.08,
          rate: 1e-13,
          neutralHydrogen: 1e-7,
          neutralHelium: 1 / (1 + odds * factor),
        },
        electrons,
        odds * factor,
        constants,
      );
    const scale = Math.abs(rateAt(1.01));
    expect(Math.abs(rateAt(1)) / scale).toBeLessThan(1e-10);
    // In t = ln(1+z), which falls with time: too many ions means a positive slope, back down as time goes on.
    expect(rateAt(1.01)).toBeGreaterThan(0);
    expect(rateAt(0.99)).toBeLessThan(0);
  });
});
