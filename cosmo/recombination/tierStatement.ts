import type { ClosedModel, RecombinationTier } from "../model";
import type { ValidityNote } from "../quantity";
import type { SourceKey } from "../sources";

/** What each tier is, in one sentence for method lines. */
export const tierMethods: Readonly<Record<RecombinationTier, string>> = {
  saha: "Saha equilibrium of hydrogen and helium",
  peebles: "three-level atom, case-B recombination as published, helium in Saha equilibrium",
  calibrated:
    "three-level atom with recombination raised by 1.14, kinetic helium, and this project's Lyman-alpha correction fitted to one published column",
};

const tierSources: Readonly<Record<RecombinationTier, readonly SourceKey[]>> = {
  saha: ["peebles1968", "nistAsd"],
  peebles: ["peebles1968", "zeldovich1968", "pequignot1991", "goldman1989", "nistAsd"],
  calibrated: [
    "peebles1968",
    "zeldovich1968",
    "pequignot1991",
    "goldman1989",
    "nistAsd",
    "seager1999",
    "switzerHirata2008",
    "kholupenko2007",
    "wong2008",
    "drake1969",
    "thisProjectCalibration",
    "planck2018Parameters",
  ],
};

/** The sources that every number of recombination rests on: the tier's, the constants set, and helium's where it was computed. */
export function recombinationSources(model: ClosedModel): readonly SourceKey[] {
  const helium: readonly SourceKey[] = model.heliumSource === "nucleosynthesis" ? ["planck2015Parameters"] : [];
  return [...tierSources[model.recombination], ...helium, model.constants.source, "ame2020"];
}

/** Where the calibration of the tier was tested against print: the six columns of Planck 2018 VI table 2. */
const tested = { baryons: [0.0221, 0.024], cold: [0.1158, 0.1206] } as const;

/** What a tier says of itself, in every model; recombinationNotes.ts adds what it is worth in this one. */
export function tierNotes(model: ClosedModel): readonly ValidityNote[] {
  switch (model.recombination) {
    case "saha":
      return [
        {
          level: "warning",
          text: "Saha equilibrium: hydrogen leaves it near z = 1600; numbers of last scattering in this tier serve comparison only",
        },
      ];
    case "peebles":
      return [
        {
          level: "note",
          text: "Peebles tier: no correction for Lyman-alpha transfer or for higher levels, helium in equilibrium",
        },
      ];
    case "calibrated": {
      const notes: ValidityNote[] = [
        {
          level: "note",
          text: "calibrated tier: three coefficients fitted to z_*, z_drag and k_D of Planck 2018 VI table 2, TT,TE,EE+lowE+lensing; not a first-principles computation",
        },
      ];
      const inside =
        model.baryonDensity >= 0.9 * tested.baryons[0] &&
        model.baryonDensity <= 1.1 * tested.baryons[1] &&
        model.coldMatterDensity >= 0.9 * tested.cold[0] &&
        model.coldMatterDensity <= 1.1 * tested.cold[1];
      if (!inside) {
        notes.push({
          level: "warning",
          text: `densities outside what the calibration was tested on (omega_b ${tested.baryons[0]} to ${tested.baryons[1]}, omega_c ${tested.cold[0]} to ${tested.cold[1]})`,
        });
      }
      return notes;
    }
  }
}
