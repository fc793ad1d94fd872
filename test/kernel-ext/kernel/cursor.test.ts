import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { pointsFromUnits, unitsFromPoints } from "../../../kernel-ext/kernel/cursor";

describe("cursor positions", () => {
  it("count a character outside the basic plane once in code points, twice in UTF-16 units", () => {
    expect(unitsFromPoints("a😀b", 2)).toBe(3);
    expect(pointsFromUnits("a😀b", 3)).toBe(2);
  });

  it("come back from code points to UTF-16 units and again, for any text", () => {
    fc.assert(
      fc.property(fc.string({ unit: "grapheme" }), fc.nat(), (text, seed) => {
        const points = seed % ([...text].length + 1);
        expect(pointsFromUnits(text, unitsFromPoints(text, points))).toBe(points);
      }),
    );
  });

  it("beyond the end are the end", () => {
    expect(unitsFromPoints("ab", 7)).toBe(2);
  });
});
