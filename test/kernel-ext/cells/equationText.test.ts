import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import {
  acousticScaleCell,
  distanceCell,
  expansionCell,
  lastScatteringCell,
  peakCell,
  recombinationCell,
  sensitivityCell,
  soundHorizonCell,
  timelineCell,
} from "../../../kernel-ext/cells";
import type { CellResult } from "../../../kernel-ext/display";
import { refusal } from "./refusal";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const text = "-0.9 + 0.3 z/(1 + z)";

/** Every cell helper with one number of its values. */
const cells: { [name: string]: (model: ModelGivens) => [CellResult<unknown>, number] } = {
  acousticScaleCell: (model) => {
    const cell = acousticScaleCell(model);
    return [cell, cell.values.acousticAngle];
  },
  distanceCell: (model) => {
    const cell = distanceCell(model, { redshifts: [1.1] });
    return [cell, cell.values["luminosityDistance"]![0]!];
  },
  expansionCell: (model) => {
    const cell = expansionCell(model);
    return [cell, cell.values.accelerationRedshift!];
  },
  lastScatteringCell: (model) => {
    const cell = lastScatteringCell(model);
    return [cell, cell.values.lastScatteringRedshift];
  },
  peakCell: (model) => {
    const cell = peakCell(model);
    return [cell, cell.values.peakMultipole[1]];
  },
  recombinationCell: (model) => {
    const cell = recombinationCell(model, { tiers: ["peebles"], redshifts: [1000] });
    return [cell, cell.values.residualIonizedFraction.peebles![0]!];
  },
  sensitivityCell: (model) => {
    const cell = sensitivityCell(model, { of: "age", parameters: ["hubble"] });
    return [cell, cell.values.matrix["age"]!["hubble"]!];
  },
  soundHorizonCell: (model) => {
    const cell = soundHorizonCell(model);
    return [cell, cell.values.dragSoundHorizon];
  },
  timelineCell: (model) => {
    const cell = timelineCell(model);
    return [cell, cell.values.find(({ event }) => event === "dark energy equality")!.redshift];
  },
};

describe("darkEnergy.equation as text", () => {
  for (const [name, run] of Object.entries(cells)) {
    it(`${name} takes it, gives the number of the same w0 and wa, and prints it with the model`, () => {
      const [cell, value] = run({ ...base, darkEnergy: { equation: text } });
      const [, expected] = run({ ...base, darkEnergy: { w0: -0.9, wa: 0.3 } });
      // Measured 2e-14 for the slope, the others below 1e-15.
      expect(Math.abs(value / expected - 1)).toBeLessThan(2e-13);
      expect(cell.toText()).toMatch(new RegExp(`darkEnergy.equation +w +${text.replace(/[+()]/g, "\\$&")}`));
    });
  }

  it("a formula that cannot be taken is refused by place", () => {
    expect(refusal(() => timelineCell({ ...base, darkEnergy: { equation: "-1 + 0.1 t" } }))).toMatch(
      /^timelineCell: darkEnergy\.equation must be a formula in z or in a; this one has an unknown name t \(character 10\), got "-1 \+ 0\.1 t"/,
    );
  });
});
