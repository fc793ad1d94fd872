import { describe, expect, it } from "vitest";
import * as heliumEscape from "../../cosmo/batch/heliumEscape";
import * as blackbodyChromaticity from "../../cosmo/blackbody/blackbodyChromaticity";
import * as colorMatching from "../../cosmo/blackbody/colorMatching";
import * as photonNumberDensity from "../../cosmo/blackbody/photonNumberDensity";
import * as planckLaw from "../../cosmo/blackbody/planckLaw";
import * as wienFrequency from "../../cosmo/blackbody/wienFrequency";
import * as wienWavelength from "../../cosmo/blackbody/wienWavelength";
import * as astronomicalUnits from "../../cosmo/constants/astronomicalUnits";
import * as atoms from "../../cosmo/constants/atoms";
import * as constantsSets from "../../cosmo/constants/constantsSets";
import * as neutrinoDensity from "../../cosmo/expansion/neutrinoDensity";
import * as fits from "../../cosmo/fits";
import * as neutrinoMasses from "../../cosmo/model/neutrinoMasses";
import * as photonDensity from "../../cosmo/model/photonDensity";
import * as gas from "../../cosmo/recombination/gas";
import * as heliumRates from "../../cosmo/recombination/heliumRates";
import * as hydrogenRates from "../../cosmo/recombination/hydrogenRates";
import * as lymanAlphaCorrection from "../../cosmo/recombination/lymanAlphaCorrection";
import * as nucleosynthesisHelium from "../../cosmo/recombination/nucleosynthesisHelium";
import * as reionizationProfile from "../../cosmo/recombination/reionizationProfile";
import * as sahaFactors from "../../cosmo/recombination/sahaFactors";
import * as threeLevelAtom from "../../cosmo/recombination/threeLevelAtom";
import * as evaluateModel from "../../cosmo/solve/evaluateModel";
import { formulaBound } from "./formulaBounds";
import { type FormulaModules, formulaFunctions, type LoadModule } from "./formulaFunctions";
import { readFormulas } from "./readFormulas";

/** Every file of formulas/ against the program: closed formulas, transcribed and evaluated at 40 digits by generators/formulas.py. */
const modules: FormulaModules = {
  "batch/heliumEscape": heliumEscape,
  "blackbody/blackbodyChromaticity": blackbodyChromaticity,
  "blackbody/colorMatching": colorMatching,
  "blackbody/photonNumberDensity": photonNumberDensity,
  "blackbody/planckLaw": planckLaw,
  "blackbody/wienFrequency": wienFrequency,
  "blackbody/wienWavelength": wienWavelength,
  "constants/astronomicalUnits": astronomicalUnits,
  "constants/atoms": atoms,
  "constants/constantsSets": constantsSets,
  "expansion/neutrinoDensity": neutrinoDensity,
  "fits/index": fits,
  "model/neutrinoMasses": neutrinoMasses,
  "model/photonDensity": photonDensity,
  "recombination/gas": gas,
  "recombination/heliumRates": heliumRates,
  "recombination/hydrogenRates": hydrogenRates,
  "recombination/lymanAlphaCorrection": lymanAlphaCorrection,
  "recombination/nucleosynthesisHelium": nucleosynthesisHelium,
  "recombination/reionizationProfile": reionizationProfile,
  "recombination/sahaFactors": sahaFactors,
  "recombination/threeLevelAtom": threeLevelAtom,
  "solve/evaluateModel": evaluateModel,
};
const load: LoadModule = (place) => modules[place];

const files = readFormulas();

const difference = (value: number, expected: number) =>
  expected === 0 ? (value === 0 ? 0 : Number.POSITIVE_INFINITY) : Math.abs(value / expected - 1);

describe("closed formulas", () => {
  it("every file of formulas/ has its function, and every function its file", () => {
    expect(Object.keys(formulaFunctions).sort()).toEqual(files.map((file) => file.name).sort());
  });

  for (const file of files) {
    const bound = formulaBound(file.name);
    it(`${file.name} meets its transcription within ${bound}, and would not meet one that is ten bounds off`, () => {
      let worst = 0;
      let worstRow = "";
      for (const row of file.rows) {
        const value = formulaFunctions[file.name]!.evaluate(load, ...row.arguments);
        const off = difference(value, row.value);
        if (!(off <= worst)) {
          worst = off;
          worstRow = `${JSON.stringify(row)} came out as ${value}`;
        }
        if (row.value === 0) continue;
        for (const wrong of [row.value * (1 + 10 * bound), row.value * (1 - 10 * bound), 0]) {
          expect(difference(value, wrong)).toBeGreaterThan(bound);
        }
      }
      if (process.env.SHOW_MEASURED !== undefined) console.log(`${file.name} ${worst.toExponential(1)} at ${worstRow}`);
      expect(worst, worstRow).toBeLessThanOrEqual(bound);
    });
  }
});
