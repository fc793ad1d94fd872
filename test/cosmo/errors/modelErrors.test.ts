import { describe, expect, it } from "vitest";
import { CosmologyError } from "../../../cosmo/errors";
import { closeModel, evaluateModel } from "../../../cosmo/solve";
import { plain } from "../exactModels";

/** Class, text and hint of what a call throws. */
function refusal(call: () => unknown): { name: string; message: string; hint: string | undefined } {
  try {
    call();
  } catch (error) {
    if (!(error instanceof CosmologyError)) throw error;
    return { name: error.name, message: error.message, hint: error.hint };
  }
  throw new Error("nothing was thrown");
}

const where = { where: "distanceCell" };
const close = (givens: unknown) => () => closeModel(givens as never, where);

describe("a model that cannot be understood is refused with the argument, the rule and the value", () => {
  const cases: [string, unknown, string, string, string | undefined][] = [
    [
      "a typo in a name",
      { hubbel: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 },
      "UnknownNameError",
      'distanceCell: "hubbel" is not a known parameter',
      'did you mean "hubble"?',
    ],
    [
      "a typo inside a group",
      { ...plain, darkEnergy: { w: -0.9 } },
      "UnknownNameError",
      'distanceCell: "darkEnergy.w" is not a known parameter',
      'did you mean "darkEnergy.w0"?',
    ],
    [
      "a typo in a word",
      { ...plain, recombination: "peeples" },
      "UnknownNameError",
      'distanceCell: "peeples" is not a known value of recombination',
      'did you mean "peebles"?',
    ],
    [
      "a negative density",
      { ...plain, baryonDensity: -0.0224 },
      "DomainError",
      "distanceCell: baryonDensity must be finite and not negative, got -0.0224",
      undefined,
    ],
    [
      "a string for a number",
      { ...plain, hubble: "67.4" },
      "DomainError",
      'distanceCell: hubble must be a number, got "67.4"',
      undefined,
    ],
    [
      "NaN",
      { ...plain, coldMatterDensity: Number.NaN },
      "DomainError",
      "distanceCell: coldMatterDensity must be finite and not negative, got NaN",
      undefined,
    ],
    [
      "null",
      { ...plain, curvature: null },
      "DomainError",
      "distanceCell: curvature must be a number, got null",
      undefined,
    ],
    [
      "an infinite curvature",
      { ...plain, curvature: Number.POSITIVE_INFINITY },
      "DomainError",
      "distanceCell: curvature must be a finite number, got Infinity",
      undefined,
    ],
    [
      "hubble 0",
      { ...plain, hubble: 0 },
      "DomainError",
      "distanceCell: hubble must be finite and positive, got 0",
      undefined,
    ],
    [
      "helium above 1",
      { ...plain, helium: 24.5 },
      "DomainError",
      'distanceCell: helium must be at least 0 and below 1 (a mass fraction), or "nucleosynthesis", got 24.5',
      undefined,
    ],
    [
      "four neutrino masses",
      { ...plain, neutrinos: { masses: [0.1, 0.1, 0.1, 0.1] } },
      "DomainError",
      "distanceCell: neutrinos.masses must be a list of at most three finite masses, none negative, got [0.1, 0.1, 0.1, 0.1]",
      undefined,
    ],
    [
      "a number where a group belongs",
      { ...plain, neutrinos: 3.046 },
      "DomainError",
      "distanceCell: neutrinos must be an object with effectiveNumber, masses, massSum, ordering, got 3.046",
      undefined,
    ],
    [
      "no model at all",
      undefined,
      "DomainError",
      "distanceCell: model must be an object such as { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }, got undefined",
      undefined,
    ],
    [
      "dark energy that outgrows radiation",
      { ...plain, darkEnergy: { w0: -0.5, wa: 1 } },
      "DomainError",
      "distanceCell: darkEnergy.w0 + darkEnergy.wa must be below 1/3, or dark energy outgrows radiation in the past, got 0.5",
      undefined,
    ],
  ];
  for (const [title, givens, name, message, hint] of cases) {
    it(title, () => {
      expect(refusal(close(givens))).toEqual({ name, message, hint });
    });
  }
});

describe("too few, too many or contradictory givens are refused with what would settle it", () => {
  const cases: [string, unknown, string, string][] = [
    [
      "no hubble",
      { baryonDensity: 0.0224, coldMatterDensity: 0.12 },
      "distanceCell: the expansion rate today is not given",
      "give one of hubble, reducedHubble",
    ],
    [
      "no baryons",
      { hubble: 67.4, coldMatterDensity: 0.12 },
      "distanceCell: the baryons are not given",
      "give one of baryonDensity, baryonFraction",
    ],
    [
      "no cold matter",
      { hubble: 67.4, baryonDensity: 0.0224 },
      "distanceCell: the cold matter is not given",
      "give one of coldMatterDensity, coldMatterFraction, matterDensity, matterFraction",
    ],
    [
      "hubble twice, with two values",
      { ...plain, reducedHubble: 0.7 },
      "distanceCell: hubble, reducedHubble contradict each other: from hubble 67.4 follows reducedHubble 0.67400000, given 0.7; they differ by 3.9%, 14 times what rounding allows",
      "leave one of them out, or name in solveFor a parameter that reducedHubble should determine",
    ],
    [
      "matter twice, with two values",
      { ...plain, matterFraction: 0.3 },
      "distanceCell: hubble, baryonDensity, coldMatterDensity, matterFraction contradict each other: from hubble 67.4, baryonDensity 0.0224, coldMatterDensity 0.12 follows matterFraction 0.31488544, given 0.3; they differ by 4.7%, 8.8 times what rounding allows",
      "leave one of them out, or name in solveFor a parameter that matterFraction should determine",
    ],
    [
      "curvature and dark energy that do not close together",
      { ...plain, curvature: 0, darkEnergyFraction: 0.7 },
      "distanceCell: hubble, baryonDensity, coldMatterDensity, darkEnergyFraction contradict each other: from hubble 67.4, baryonDensity 0.0224, coldMatterDensity 0.12 follows darkEnergyFraction 0.68503503, given 0.7; they differ by 2.2%, 6.0 times what rounding allows",
      "leave one of them out, or name in solveFor a parameter that darkEnergyFraction should determine",
    ],
    [
      "an ordering without a sum",
      { ...plain, neutrinos: { masses: [0.06], ordering: "normal" } },
      "distanceCell: neutrinos.ordering says how neutrinos.massSum is shared, and no massSum is given",
      "leave one of them out",
    ],
    [
      "less matter than baryons",
      { hubble: 67.4, baryonDensity: 0.0224, matterDensity: 0.02 },
      "distanceCell: matterDensity 0.02 is less than its parts: baryons 0.0224000 and massive neutrinos 0.000644899 (as omega) leave -0.003045 for cold matter",
      "raise matterDensity, or lower the baryons or the neutrino masses",
    ],
  ];
  for (const [title, givens, message, hint] of cases) {
    it(title, () => {
      expect(refusal(close(givens))).toEqual({ name: "InconsistentParametersError", message, hint });
    });
  }

  it("massive neutrinos without neutrinos", () => {
    const { name, message } = refusal(close({ ...plain, photonTemperature: 0, neutrinos: { masses: [0.1] } }));
    expect(name).toBe("InconsistentParametersError");
    expect(message).toBe(
      "distanceCell: neutrinos.masses asks for massive neutrinos, but photonTemperature is 0, so there are none",
    );
  });

  it("names the row where there is one", () => {
    const call = () => closeModel({ hubble: 67.4, coldMatterDensity: 0.12 }, { where: "derive", place: "row 3" });
    expect(refusal(call).message).toBe("derive: the baryons are not given (row 3)");
  });
});

describe("a question outside its domain is refused", () => {
  const numbers = evaluateModel(plain);
  const cases: [string, string, unknown[], string][] = [
    ["a redshift of -1.5", "hubbleRate", [-1.5], "hubbleRate: redshift must be finite and above -1, got -1.5"],
    ["a redshift of -1", "ageAt", [-1], "ageAt: redshift must be finite and above -1, got -1"],
    ["NaN", "lookbackTime", [Number.NaN], "lookbackTime: redshift must be finite and above -1, got NaN"],
    [
      "an infinite redshift",
      "comovingDistance",
      [Number.POSITIVE_INFINITY],
      "comovingDistance: redshift must be finite and above -1, got Infinity",
    ],
    ["a string", "ageAt", ["1"], 'ageAt: redshift must be a number, got "1"'],
    [
      "the second of a pair",
      "comovingDistance",
      [1, -2],
      "comovingDistance: redshift z2 must be finite and above -1, got -2",
    ],
    [
      "a distance to the future",
      "luminosityDistance",
      [-0.5],
      "luminosityDistance: redshift must be finite and not negative, got -0.5",
    ],
    ["too many arguments", "age", [1], "age: arguments must be left out, got [1]"],
    ["no argument", "ageAt", [], "ageAt: arguments must be (z), got []"],
    ["a list for a number", "ageAt", [[1, 2]], "ageAt: redshift must be a number, got [1, 2]"],
  ];
  for (const [title, quantity, values, message] of cases) {
    it(title, () => {
      expect(refusal(() => numbers.value(quantity, ...(values as number[])))).toEqual({
        name: "DomainError",
        message,
        hint: undefined,
      });
    });
  }

  it("a quantity with a typo", () => {
    expect(refusal(() => numbers.value("angularDiamterDistance", 1))).toEqual({
      name: "UnknownNameError",
      message: 'quantity: "angularDiamterDistance" is not a known quantity',
      hint: 'did you mean "angularDiameterDistance"?',
    });
  });

  it("a closed model that never had a Big Bang", () => {
    // The root of 0.1 x^3 - 1.1 x^2 + 2 = 0 (radiation moves it by 1e-4): x = 1.447.
    const bounced = evaluateModel({ hubble: 70, baryonFraction: 0.05, matterFraction: 0.1, darkEnergyFraction: 2 });
    expect(refusal(() => bounced.value("age"))).toEqual({
      name: "NoAnswerError",
      message: "age: this closed model never had a Big Bang: going back, H reaches zero at z = 0.44698173",
      hint: "curvature is too negative, or dark energy too large, for this matter density",
    });
    expect(refusal(() => bounced.value("luminosityDistance", 1100)).message).toBe(
      "luminosityDistance: redshift 1100 lies beyond the turning point of this closed model: it was never smaller than at z = 0.44698173",
    );
  });
});
