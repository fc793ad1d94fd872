import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import {
  acousticScaleCell,
  distanceCell,
  lastScatteringCell,
  recombinationCell,
  soundHorizonCell,
} from "../../../kernel-ext/cells";
import { type CellResult, displaySymbol } from "../../../kernel-ext/display";
import { expectPicture } from "../display/charts/expectPicture";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const numbers = evaluateModel(base);

const cells: { [name: string]: CellResult<unknown> } = {
  distanceCell: distanceCell(base, { redshifts: [0.3, 0.51, 0.7, 1.1, 2.33] }),
  distanceCellFar: distanceCell(base, { redshifts: [1, 10, 1100] }),
  recombinationCell: recombinationCell(base),
  lastScatteringCell: lastScatteringCell(base),
  soundHorizonCell: soundHorizonCell(base),
  acousticScaleCell: acousticScaleCell(base),
};

describe("every cell helper", () => {
  for (const [name, cell] of Object.entries(cells)) {
    it(`${name} shows a table, a chart, the conventions and its sources`, async () => {
      const bundle = await cell[displaySymbol]();
      const text = bundle["text/plain"] as string;
      expect(cell.tables.length).toBeGreaterThanOrEqual(2);
      expect(cell.charts.length).toBeGreaterThanOrEqual(1);
      expect(cell.sources.length).toBeGreaterThan(0);
      expect(text).toContain("conventions: constants codata2022, closure radiationInside");
      expect(text).toContain("Sources");
      expect(text).not.toMatch(/NaN|undefined|Infinity|\[object/);
      expect(bundle["text/html"] as string).not.toMatch(/NaN|undefined|Infinity|\[object/);
    });

    it(`${name} draws the picture in the tree and logs no warning`, async () => {
      for (const [index, chart] of cell.charts.entries()) {
        expectPicture(`../../cells/charts/${name}${index === 0 ? "" : `-${index}`}`, await chart.toSvg());
      }
    });
  }
});

describe("values go on to the next cell", () => {
  it("distanceCell gives typed arrays by the vocabulary's names, with the register's digits", () => {
    const { values } = distanceCell(base, { redshifts: Float64Array.of(0.5, 1.1), quantities: ["luminosityDistance"] });
    expect(Object.keys(values)).toEqual(["redshift", "luminosityDistance"]);
    expect(values.luminosityDistance).toBeInstanceOf(Float64Array);
    expect(values.luminosityDistance![1]).toBe(numbers.value("luminosityDistance", 1.1));
  });

  it("distanceCell takes a column, an iterable or an array of the user's own", () => {
    const fromSet = distanceCell(base, { redshifts: new Set([0.5, 1.1]) });
    const fromArray = distanceCell(base, { redshifts: [0.5, 1.1] });
    expect(fromSet.values).toEqual(fromArray.values);
  });

  it("recombinationCell gives an array a tier and z_* of each", () => {
    const { values } = recombinationCell(base, { tiers: ["saha", "peebles"], redshifts: [900, 1100] });
    expect(values.residualIonizedFraction.peebles).toHaveLength(2);
    expect(values.residualIonizedFraction.calibrated).toBeUndefined();
    const peebles = evaluateModel({ ...base, recombination: "peebles" });
    expect(values.residualIonizedFraction.peebles![1]).toBe(peebles.value("residualIonizedFraction", 1100));
    expect(values.lastScatteringRedshift.peebles).toBe(peebles.value("lastScatteringRedshift"));
  });

  it("the scalar cells give the register's digits", () => {
    const last = lastScatteringCell(base).values;
    expect(last.lastScatteringRedshift).toBe(numbers.value("lastScatteringRedshift"));
    expect(last.radiationTemperature).toBe(numbers.value("radiationTemperature", last.lastScatteringRedshift));
    expect(soundHorizonCell(base).values.dragSoundHorizon).toBe(numbers.value("dragSoundHorizon"));
    const scale = acousticScaleCell({ ...base, curvature: -0.01 }).values;
    expect(scale.acousticAngle).toBe(evaluateModel({ ...base, curvature: -0.01 }).value("acousticAngle"));
    expect(scale.acousticAngle).toBeGreaterThan(numbers.value("acousticAngle"));
  });

  it("acousticScaleCell shows the printed digits with their errors as printed (Planck 2018 VI, table 2)", () => {
    const text = acousticScaleCell(base).toText();
    for (const printed of ["1.04110 ± 0.00031", "1089.92 ± 0.25", "144.39 ± 0.30", "1087.8 +1.6 −1.7"]) {
      expect(text).toContain(printed);
    }
  });
});
