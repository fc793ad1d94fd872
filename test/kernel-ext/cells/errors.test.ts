import { describe, expect, it } from "vitest";
import { CosmologyError } from "../../../cosmo/errors";
import {
  acousticScaleCell,
  distanceCell,
  lastScatteringCell,
  recombinationCell,
  soundHorizonCell,
} from "../../../kernel-ext/cells";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };

/** Message and hint of what a wrong input meets; cells come as a user types them, so types do not guard here. */
function refusal(run: () => unknown): string {
  try {
    run();
  } catch (error) {
    expect(error).toBeInstanceOf(CosmologyError);
    const { message, hint } = error as CosmologyError;
    return hint === undefined ? message : `${message} | ${hint}`;
  }
  throw new Error("nothing was refused");
}

describe("a wrong input is refused by name, rule and value", () => {
  const cases: [title: string, run: () => unknown, text: string][] = [
    [
      "a typo in a parameter's name",
      () => lastScatteringCell({ ...base, hubbel: 70 } as never),
      'lastScatteringCell: "hubbel" is not a known parameter | did you mean "hubble"?',
    ],
    [
      "a typo in a nested name",
      () => soundHorizonCell({ ...base, neutrinos: { efectiveNumber: 3 } } as never),
      'soundHorizonCell: "neutrinos.efectiveNumber" is not a known parameter | did you mean "neutrinos.effectiveNumber"?',
    ],
    [
      "a negative density",
      () => acousticScaleCell({ ...base, baryonDensity: -0.02 }),
      "acousticScaleCell: baryonDensity must be finite and not negative, got -0.02",
    ],
    [
      "a string for a number",
      () => lastScatteringCell({ ...base, hubble: "67.4" } as never),
      'lastScatteringCell: hubble must be a number, got "67.4"',
    ],
    [
      "NaN for a parameter",
      () => acousticScaleCell({ ...base, coldMatterDensity: Number.NaN }),
      "acousticScaleCell: coldMatterDensity must be finite and not negative, got NaN",
    ],
    [
      "a redshift of -1.5",
      () => distanceCell(base, { redshifts: [0.5, -1.5] }),
      "distanceCell: redshifts must be finite and above -1, got -1.5 (entry 2)",
    ],
    [
      "NaN among the redshifts",
      () => distanceCell(base, { redshifts: [0.5, 1, Number.NaN] }),
      "distanceCell: redshifts must be finite and above -1, got NaN (entry 3)",
    ],
    [
      "a string among the redshifts",
      () => distanceCell(base, { redshifts: [0.5, "1"] as never }),
      'distanceCell: redshifts must be numbers, got "1" (entry 2)',
    ],
    ["no redshifts", () => distanceCell(base, { redshifts: [] }), "distanceCell: redshifts must not be empty, got []"],
    [
      "redshifts forgotten",
      () => distanceCell(base, {} as never),
      "distanceCell: redshifts must be a list of numbers such as [0.3, 0.5, 1.1], got undefined",
    ],
    [
      "options forgotten",
      () => distanceCell(base, undefined as never),
      "distanceCell: redshifts must be a list of numbers such as [0.3, 0.5, 1.1], got undefined",
    ],
    [
      "an unknown option",
      () => distanceCell(base, { redshift: [1] } as never),
      'distanceCell: "redshift" is not a known option | did you mean "redshifts"?',
    ],
    [
      "an unknown quantity",
      () => distanceCell(base, { redshifts: [1], quantities: ["luminosityDistanc"] }),
      'distanceCell: "luminosityDistanc" is not a known quantity | did you mean "luminosityDistance"?',
    ],
    [
      "a quantity without a redshift",
      () => distanceCell(base, { redshifts: [1], quantities: ["age"] }),
      'distanceCell: quantities must be quantities of a redshift z, got "age"',
    ],
    [
      "a redshift outside one quantity's domain",
      () => distanceCell(base, { redshifts: [1, -0.5], quantities: ["opticalDepth"] }),
      "opticalDepth: redshift must be finite and not negative, got -0.5 (entry 2 of redshifts)",
    ],
    [
      "an unknown tier",
      () => recombinationCell(base, { tiers: ["sahha" as never] }),
      'recombinationCell: "sahha" is not a known tier | did you mean "saha"?',
    ],
    [
      "an unknown convention",
      () => lastScatteringCell({ ...base, conventions: { constants: "codata2023" } } as never),
      'lastScatteringCell: "codata2023" is not a known value of conventions.constants | did you mean "codata2022"?',
    ],
    [
      "the expansion rate forgotten",
      () => lastScatteringCell({ baryonDensity: 0.0224, coldMatterDensity: 0.12 }),
      "lastScatteringCell: the expansion rate today is not given | give one of hubble, reducedHubble",
    ],
    [
      "the same thing twice, not alike",
      () => lastScatteringCell({ ...base, reducedHubble: 0.7 }),
      "lastScatteringCell: hubble, reducedHubble contradict each other: from hubble 67.4 follows reducedHubble 0.67400000, given 0.7; they differ by 3.9%, 14 times what rounding allows | leave one of them out, or name in solveFor a parameter that reducedHubble should determine",
    ],
    [
      "no baryons",
      () => lastScatteringCell({ ...base, baryonDensity: 0 }),
      "recombination: this model has no baryons (baryonDensity 0), so nothing recombines | give baryonDensity a value near 0.0224",
    ],
    [
      "a model that is no object",
      () => lastScatteringCell(67.4 as never),
      "lastScatteringCell: model must be an object such as { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 }, got 67.4",
    ],
  ];
  for (const [title, run, text] of cases) {
    it(title, () => {
      expect(refusal(run)).toBe(text);
    });
  }

  it("a redshift beyond the turning point of a closed model says where that is", () => {
    const bounced = { hubble: 70, baryonDensity: 0.022, coldMatterDensity: 0.02, darkEnergyFraction: 1.8 };
    expect(refusal(() => distanceCell(bounced, { redshifts: [0.1, 9] }))).toMatch(
      /redshift 9 lies beyond the turning point of this closed model: it was never smaller than at z = [\d.]+ \(entry 2 of redshifts\)/,
    );
  });
});
