import { describe, expect, it } from "vitest";
import { parseRequest, parseRequests } from "../../../cosmo/quantities";

describe("parseRequests(text)", () => {
  it("splits at commas, but not at those inside parentheses", () => {
    expect(parseRequests("age, lastScatteringRedshift, luminosityDistance(1.1), transverseDistance(0.5,1.2)")).toEqual([
      { name: "age", arguments: [], text: "age" },
      { name: "lastScatteringRedshift", arguments: [], text: "lastScatteringRedshift" },
      { name: "luminosityDistance", arguments: [1.1], text: "luminosityDistance(1.1)" },
      { name: "transverseDistance", arguments: [0.5, 1.2], text: "transverseDistance(0.5,1.2)" },
    ]);
  });

  it("takes semicolons for commas, blanks, signs and exponents", () => {
    expect(parseRequests(" comovingDistance( 0.5 ; 1 );ageAt(-5e-1) ,hubbleRate(+1100)")).toEqual([
      { name: "comovingDistance", arguments: [0.5, 1], text: "comovingDistance(0.5,1)" },
      { name: "ageAt", arguments: [-0.5], text: "ageAt(-5e-1)" },
      { name: "hubbleRate", arguments: [1100], text: "hubbleRate(+1100)" },
    ]);
    expect(parseRequests("neutrinos.massSum")[0]!.name).toBe("neutrinos.massSum");
    expect(parseRequest("age()")).toEqual({ name: "age", arguments: [], text: "age" });
  });

  it("gives an empty list for empty text", () => {
    expect(parseRequests("  ")).toEqual([]);
  });

  it("refuses an unknown name with the one that was meant", () => {
    expect(() => parseRequests("age, lastScatteringRedshif", "derive")).toThrow(
      'derive: "lastScatteringRedshif" is not a known quantity',
    );
    try {
      parseRequests("age, lastScatteringRedshif", "derive");
    } catch (error) {
      expect((error as { hint: string }).hint).toBe('did you mean "lastScatteringRedshift"?');
    }
  });

  it("refuses what is not a list of requests, and arguments outside the domain, before anything is computed", () => {
    const form = 'request must look like age, luminosityDistance(1.1) or comovingDistance(0.5, 1), separated by ","';
    expect(() => parseRequests("age,,hubbleRate(1)", "derive")).toThrow(`derive: ${form}, got ""`);
    expect(() => parseRequests("age hubbleRate(1) x", "derive")).toThrow(`derive: ${form}, got "age hubbleRate(1) x"`);
    expect(() => parseRequests("(1)", "derive")).toThrow(`derive: ${form}, got "(1)"`);
    for (const text of ["hubbleRate(1", "hubbleRate(1))", "hubbleRate((1))"]) {
      expect(() => parseRequests(text, "derive"), text).toThrow(
        `derive: request must close every parenthesis once, got ${JSON.stringify(text)}`,
      );
    }
    for (const [text, piece] of [
      ["hubbleRate(one)", "one"],
      ["hubbleRate(1,)", ""],
      ["hubbleRate(0x)", "0x"],
      ["hubbleRate(Infinity)", "Infinity"],
      ["hubbleRate(NaN)", "NaN"],
    ] as const) {
      expect(() => parseRequests(text, "derive"), text).toThrow(
        `derive: argument of hubbleRate must be a number, got ${JSON.stringify(piece)}`,
      );
    }
    expect(() => parseRequests("luminosityDistance(-1.5)")).toThrow(
      "luminosityDistance: redshift must be finite and not negative, got -1.5",
    );
    expect(() => parseRequests("age(1)")).toThrow("age: arguments must be left out, got [1]");
    expect(() => parseRequests("hubbleRate(1,2)")).toThrow("hubbleRate: arguments must be (z), got [1, 2]");
    expect(() => parseRequests("comovingDistance")).toThrow(
      "comovingDistance: arguments must be (z) or (z1, z2), got []",
    );
    expect(() => parseRequests(7 as never)).toThrow("quantities: request must be text, got 7");
  });
});
