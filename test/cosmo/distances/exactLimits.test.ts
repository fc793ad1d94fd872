import { describe, expect, it } from "vitest";
import {
  deSitter,
  einsteinDeSitter,
  flatLambda,
  hubbleDistance70,
  matterAndCurvature,
  milne,
  relative,
  withoutRadiation,
} from "../exactModels";

// Bound of the issue for exact limits; measured 1.2e-15 at most, over all checks of this file.
const bound = 1e-14;
const redshifts = [1e-6, 0.01, 0.5, 1.25, 7, 1100];

describe("an Einstein-de Sitter model", () => {
  it("has D_M = 2 D_H [1 - (1+z)^-1/2]", () => {
    for (const z of redshifts) {
      // 1 - (1+z)^-1/2 without cancellation at small z.
      const expected = -2 * hubbleDistance70 * Math.expm1(-0.5 * Math.log1p(z));
      for (const name of ["comovingDistance", "transverseDistance"]) {
        expect(relative(einsteinDeSitter().value(name, z), expected), `${name}(${z})`).toBeLessThan(bound);
      }
    }
  });

  it("has its largest angular-diameter distance, (8/27) D_H, at z = 5/4", () => {
    const numbers = einsteinDeSitter();
    const largest = numbers.value("angularDiameterDistance", 1.25);
    expect(relative(largest, (8 / 27) * hubbleDistance70)).toBeLessThan(bound);
    expect(numbers.value("angularDiameterDistance", 1.2499)).toBeLessThan(largest);
    expect(numbers.value("angularDiameterDistance", 1.2501)).toBeLessThan(largest);
  });

  it("has V_C = (4 pi/3) D_M^3 and D_V, F_AP from D_M and H", () => {
    const numbers = einsteinDeSitter();
    for (const z of redshifts) {
      const transverse = -2 * hubbleDistance70 * Math.expm1(-0.5 * Math.log1p(z));
      const rate = hubbleDistance70 * (1 + z) ** -1.5;
      expect(relative(numbers.value("comovingVolume", z), ((4 * Math.PI) / 3) * (transverse / 1000) ** 3)).toBeLessThan(
        bound,
      );
      expect(
        relative(numbers.value("comovingVolumeElement", z), 4 * Math.PI * transverse ** 2 * rate * 1e-9),
      ).toBeLessThan(bound);
      expect(relative(numbers.value("volumeDistance", z), Math.cbrt(transverse ** 2 * z * rate))).toBeLessThan(bound);
      expect(relative(numbers.value("alcockPaczynskiRatio", z), transverse / rate)).toBeLessThan(bound);
      expect(relative(numbers.value("hubbleDistance", z), rate)).toBeLessThan(bound);
      expect(
        relative(numbers.value("properScale", z), ((transverse / (1 + z)) * 1000 * Math.PI) / 648000),
      ).toBeLessThan(bound);
    }
  });
});

describe("a Milne model", () => {
  it("has D_L = D_H z (1 + z/2)", () => {
    for (const z of redshifts) {
      const expected = hubbleDistance70 * z * (1 + z / 2);
      expect(relative(milne().value("luminosityDistance", z), expected), `z = ${z}`).toBeLessThan(bound);
    }
  });
});

describe("a de Sitter model", () => {
  it("has D_L = D_H z (1+z)", () => {
    for (const z of redshifts) {
      const expected = hubbleDistance70 * z * (1 + z);
      expect(relative(deSitter().value("luminosityDistance", z), expected), `z = ${z}`).toBeLessThan(bound);
    }
  });
});

describe("a model without dark energy", () => {
  it("follows Mattig's formula, open or closed", () => {
    // Mattig 1958: D_L = 2 c/(H0 Omega^2) {Omega z + (Omega - 2) [sqrt(1 + Omega z) - 1]}.
    for (const matter of [0.1, 0.3, 0.9, 1.2, 2, 3]) {
      for (const z of [0.5, 2, 10, 1100]) {
        const root = Math.sqrt(1 + matter * z);
        const expected = ((2 * hubbleDistance70) / matter ** 2) * (matter * z + (matter - 2) * (root - 1));
        const value = matterAndCurvature(matter).value("luminosityDistance", z);
        // The formula itself cancels: 1e-13 at Omega = 0.1, z = 0.5. Measured 6e-14.
        expect(relative(value, expected), `Omega ${matter}, z ${z}`).toBeLessThan(5e-13);
      }
    }
  });
});

describe("distanceModulus(z)", () => {
  it("is 5 log10(D_L/10 pc)", () => {
    const expected = 5 * Math.log10(hubbleDistance70 * 2 * 1e5);
    expect(relative(deSitter().value("distanceModulus", 1), expected)).toBeLessThan(bound);
  });

  it("is not defined at z = 0, where luminosityDistance is 0", () => {
    expect(deSitter().value("luminosityDistance", 0)).toBe(0);
    expect(deSitter().value("angularDiameterDistance", 0)).toBe(0);
    expect(deSitter().value("volumeDistance", 0)).toBe(0);
    expect(deSitter().value("comovingVolume", 0)).toBe(0);
    expect(() => deSitter().value("distanceModulus", 0)).toThrow(
      "distanceModulus: redshift must be finite and above 0, got 0",
    );
  });
});

describe("comovingDistance(z) of the future", () => {
  it("is negative, and keeps the formula of Einstein-de Sitter", () => {
    const expected = -2 * hubbleDistance70 * Math.expm1(-0.5 * Math.log1p(-0.75));
    expect(relative(einsteinDeSitter().value("comovingDistance", -0.75), expected)).toBeLessThan(bound);
    expect(expected).toBeLessThan(0);
  });
});

describe("a flat model of matter and a cosmological constant", () => {
  it("agrees with the elliptic integral in the form of a binomial series at z = 0.2", () => {
    // 1/E = (1 + Omega_m [(1+z)^3 - 1])^-1/2 expanded in Omega_m [(1+z)^3 - 1] < 0.22, integrated term by term.
    const matter = 0.3;
    const z = 0.2;
    let sum = 0;
    let coefficient = 1;
    for (let n = 0; n < 120; n++) {
      // int_0^z [(1+x)^3 - 1]^n dx by the finite binomial sum is unstable; Gauss-Legendre with 5 nodes on 40 panels is not.
      sum += coefficient * matter ** n * power(n, z);
      coefficient *= (-0.5 - n) / (n + 1);
    }
    expect(relative(flatLambda(matter).value("comovingDistance", z), hubbleDistance70 * sum)).toBeLessThan(1e-13);
  });
});

/** int_0^z [(1+x)^3 - 1]^n dx, composite Gauss-Legendre with the five nodes of Abramowitz & Stegun, table 25.4. */
function power(n: number, z: number): number {
  const nodes = [0, 0.538469310105683, -0.538469310105683, 0.906179845938664, -0.906179845938664];
  const weights = [0.568888888888889, 0.478628670499366, 0.478628670499366, 0.236926885056189, 0.236926885056189];
  const panels = 40;
  let sum = 0;
  for (let i = 0; i < panels; i++) {
    nodes.forEach((node, j) => {
      const x = (z / panels) * (i + 0.5 + node / 2);
      sum += weights[j]! * (3 * x + 3 * x * x + x ** 3) ** n;
    });
  }
  return (sum * z) / panels / 2;
}

describe("dark energy alone with constant w", () => {
  it("has D_C = D_H [(1+z)^p - 1]/p with p = -(1 + 3w)/2", () => {
    for (const w0 of [-1.2, -0.8, -0.5]) {
      const p = -(1 + 3 * w0) / 2;
      for (const z of redshifts) {
        const value = withoutRadiation({ coldMatterFraction: 0, darkEnergy: { w0 } }).value("comovingDistance", z);
        // H = H0 (1+z)^(3(1+w)/2) and p = 1 - 3(1+w)/2.
        const expected = (hubbleDistance70 * Math.expm1(p * Math.log1p(z))) / p;
        expect(relative(value, expected), `w0 ${w0}, z ${z}`).toBeLessThan(bound);
      }
    }
  });
});
