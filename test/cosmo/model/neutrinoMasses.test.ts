import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { neutrinoMassesFromSum } from "../../../cosmo/model";
import { relative } from "../exactModels";

const sumOf = (masses: number[]) => masses.reduce((a, b) => a + b, 0);

describe("neutrinoMassesFromSum(sum, ordering)", () => {
  it("shares the sum among three species, largest first", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 3, noNaN: true }),
        fc.constantFrom("oneMassive" as const, "degenerate" as const, "normal" as const, "inverted" as const),
        (sum, ordering) => {
          const masses = neutrinoMassesFromSum(sum, ordering);
          expect(masses).toHaveLength(3);
          expect(relative(sumOf(masses), sum)).toBeLessThan(1e-14);
          expect(masses[0]).toBeGreaterThanOrEqual(masses[1]!);
          expect(masses[1]).toBeGreaterThanOrEqual(masses[2]!);
        },
      ),
    );
  });

  it("keeps the squared splittings of each ordering", () => {
    // Splittings 7.42e-5 and 2.51e-3 eV^2 (memory).
    const [m3, m2, m1] = neutrinoMassesFromSum(0.1, "normal") as [number, number, number];
    expect(relative(m2 ** 2 - m1 ** 2, 7.42e-5)).toBeLessThan(1e-12);
    expect(relative(m3 ** 2 - m1 ** 2, 2.51e-3)).toBeLessThan(1e-12);
    const [i2, i1, i3] = neutrinoMassesFromSum(0.15, "inverted") as [number, number, number];
    expect(relative(i2 ** 2 - i1 ** 2, 7.42e-5)).toBeLessThan(1e-12);
    expect(relative(i2 ** 2 - i3 ** 2, 2.51e-3)).toBeLessThan(1e-12);
  });

  it("refuses a sum below the least that the ordering allows", () => {
    // sqrt(2.51e-3) + sqrt(7.42e-5) = 0.058714; sqrt(2.51e-3) + sqrt(2.51e-3 - 7.42e-5) = 0.099455.
    expect(() => neutrinoMassesFromSum(0.05, "normal")).toThrow(
      "neutrinos: neutrinos.massSum must be at least 0.058714 eV, the least that the normal ordering allows, got 0.05",
    );
    expect(() => neutrinoMassesFromSum(0.09, "inverted", "acousticScaleCell")).toThrow(
      "acousticScaleCell: neutrinos.massSum must be at least 0.099454 eV, the least that the inverted ordering allows, got 0.09",
    );
    expect(neutrinoMassesFromSum(Math.sqrt(2.51e-3) + Math.sqrt(7.42e-5), "normal")[2]).toBe(0);
  });
});
