import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../cosmo/model";
import { calibrationColumn, type PrintedColumn, planck2018BestFit, planck2018Table2 } from "../../cosmo/published";
import { evaluateModel } from "../../cosmo/solve";
import { halfUnit } from "./printed";

/**
 * Source of every printed number here: Planck Collaboration VI 2020, A&A 641, A6, arXiv:1807.06209, table 2 (six columns, means
 * and 68% errors) and table 1 (best fit), as carried in cosmo/published/planck2018.ts.
 *
 * Conventions of the tables: N_eff 3.046, one neutrino of 0.06 eV, T_cmb 2.7255 K, helium from nucleosynthesis, radiation on top,
 * z_eq from baryons and cold matter.
 */
const inputs = ["hubble", "baryonDensity", "coldMatterDensity"] as const;

const checked = [
  "lastScatteringRedshift",
  "dragRedshift",
  "lastScatteringSoundHorizon",
  "dragSoundHorizon",
  "acousticAngle",
  "dampingWavenumber",
  "age",
  "equalityRedshift",
  "equalityWavenumber",
  "equalitySoundAngle",
] as const;

/** The columns whose means are close to one parameter point. */
const narrowColumns = ["TT,TE,EE+lowE", "TT,TE,EE+lowE+lensing+BAO"];

function givensOf(column: PrintedColumn, moved: { [name: string]: number } = {}): ModelGivens {
  const given = (name: (typeof inputs)[number]) => Number(column.numbers[name]!.digits) + (moved[name] ?? 0);
  return {
    hubble: given("hubble"),
    baryonDensity: given("baryonDensity"),
    coldMatterDensity: given("coldMatterDensity"),
    neutrinos: { effectiveNumber: 3.046, masses: [0.06] },
    conventions: { constants: "codata2018", closure: "radiationOnTop", equalityMatter: "baryonsAndCold" },
  };
}

/** How far half a unit in the last digit of each given can move each number: the largest case, all signs alike. */
function roundingReach(column: PrintedColumn): Map<string, number> {
  const reach = new Map<string, number>();
  const center = evaluateModel(givensOf(column));
  for (const input of inputs) {
    const moved = evaluateModel(givensOf(column, { [input]: halfUnit(column.numbers[input]!) }));
    for (const name of checked) {
      reach.set(name, (reach.get(name) ?? 0) + Math.abs(moved.value(name) - center.value(name)));
    }
  }
  return reach;
}

describe("the columns of Planck 2018 VI table 2", () => {
  for (const column of planck2018Table2) {
    const isCalibration = column.name === calibrationColumn;
    const label = isCalibration
      ? `${column.name} (the calibration column: z_*, z_drag and k_D are met by construction)`
      : column.name;
    describe(label, () => {
      const numbers = evaluateModel(givensOf(column));
      const reach = roundingReach(column);
      for (const name of checked) {
        const printed = column.numbers[name]!;
        const value = Number(printed.digits);
        it(`${name} is within an eighth of the printed error of ${printed.digits}`, () => {
          const error = Math.min(printed.upper!, printed.lower!);
          // Measured: at most 0.114 of the error (theta_* of TE+lowE), 0.106 (k_D of EE+lowE).
          expect(Math.abs(numbers.value(name) - value)).toBeLessThan(error / 8);
        });
        if (narrowColumns.includes(column.name) || isCalibration) {
          it(`${name} follows from the printed givens: ${printed.digits} to the rounding of table and givens`, () => {
            expect(Math.abs(numbers.value(name) - value)).toBeLessThanOrEqual(halfUnit(printed) + reach.get(name)!);
          });
        }
      }
    });
  }
});

describe("z_re from tau in the columns of Planck 2018 VI table 2", () => {
  for (const column of planck2018Table2) {
    it(`${column.name}: within an eighth of the printed error, above it by the curvature of z_re over a posterior`, () => {
      const printed = column.numbers["reionizationRedshift"]!;
      const depth = Number(column.numbers["reionizationDepth"]!.digits);
      const z = evaluateModel({ ...givensOf(column), reionizationDepth: depth }).value("reionizationRedshift");
      // Measured: 0.020 to 0.037 of the error, all above the printed mean.
      expect(Math.abs(z - Number(printed.digits))).toBeLessThan(Math.min(printed.upper!, printed.lower!) / 8);
      expect(z).toBeGreaterThan(Number(printed.digits));
    });
  }
});

describe("the best fit of Planck 2018 VI table 1", () => {
  // One parameter point with givens of 4 to 5 digits.
  const numbers = evaluateModel({ ...givensOf(planck2018BestFit), reionizationDepth: 0.0543 });
  const relative = (name: string, value: number) =>
    Math.abs(value / Number(planck2018BestFit.numbers[name]!.digits) - 1);

  it("gives the printed age, theta_* and r_drag to 3e-5, what the digits of the givens allow", () => {
    // Measured: age 1.9e-6, theta_* 7.3e-6, r_drag 6e-7.
    for (const name of ["age", "acousticAngle", "dragSoundHorizon"]) {
      expect(relative(name, numbers.value(name))).toBeLessThan(3e-5);
    }
  });

  it("gives the printed omega_m and Omega_m to the last digit", () => {
    for (const name of ["matterDensity", "matterFraction"]) {
      const printed = planck2018BestFit.numbers[name]!;
      expect(Math.abs(numbers.value(name) - Number(printed.digits))).toBeLessThanOrEqual(1.01 * halfUnit(printed));
    }
  });

  it("gives z_re 7.68 for tau 0.0543", () => {
    const printed = planck2018BestFit.numbers["reionizationRedshift"]!;
    expect(Math.abs(numbers.value("reionizationRedshift") - Number(printed.digits))).toBeLessThanOrEqual(
      halfUnit(printed),
    );
  });
});
