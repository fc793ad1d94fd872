import { describe, expect, it } from "vitest";
import { AtomMarch } from "../../../cosmo/batch/atomMarch";
import { atomTables, heliumColumns, hydrogenColumns } from "../../../cosmo/batch/atomTables";
import { pastWeights, slopeWeight } from "../../../cosmo/batch/backwardDifferences";
import { gasPerUnit } from "../../../cosmo/batch/closeRow";
import { GridExpansion } from "../../../cosmo/batch/gridExpansion";
import { continuumPlace, lineEscapes } from "../../../cosmo/batch/heliumEscape";
import { marchHydrogen } from "../../../cosmo/batch/marchHydrogen";
import {
  equilibriumPoints,
  gridBlocks,
  gridStep,
  gridTemperatures,
  heliumEnd,
  mainFirst,
} from "../../../cosmo/batch/temperatureGrid";
import { constantsSets } from "../../../cosmo/constants";
import { expansionPart } from "../../../cosmo/expansion";
import { type ClosedModel, hundredKmPerSecondPerMpc, type ModelGivens } from "../../../cosmo/model";
import { Evaluation } from "../../../cosmo/quantity";
import { atomSettings, gasPart } from "../../../cosmo/recombination";
import { type HeliumTreatment, ThreeLevelAtom } from "../../../cosmo/recombination/threeLevelAtom";
import { closeModel } from "../../../cosmo/solve";
import { boxModels } from "./boxModels";
import { rowOf } from "./rowOf";

/** Newton steps that leave nothing to converge. */
const converged = 40;

type Tier = "peebles" | "calibrated";

function atomOf(model: ClosedModel, helium: HeliumTreatment): ThreeLevelAtom {
  const evaluation = new Evaluation(model);
  const settings = atomSettings(model.recombination as Tier);
  return new ThreeLevelAtom(evaluation.once(gasPart), evaluation.once(expansionPart), settings, helium);
}

/** Models without massive neutrinos: their H on the grid carries no interpolation. */
function plainModels(count: number, tier: Tier): ModelGivens[] {
  return boxModels(count, 7).map((givens) => ({
    ...givens,
    darkEnergy: {},
    neutrinos: { effectiveNumber: givens.neutrinos!.effectiveNumber!, masses: [] },
    recombination: tier,
  }));
}

/** d(1 - x_p)/ds of the single model, s = -ln(1+z), and how fast it changes with 1 - x_p, at a point of the grid. */
function singleSlope(atom: ThreeLevelAtom, temperature: number, point: number, x: number, d: number, y: number) {
  const out = new Float64Array(atom.dimension);
  const state = new Float64Array(atom.dimension);
  const at = (neutral: number) => {
    state[0] = Math.log((1 - neutral) / neutral);
    state[1] = Math.log1p(-d);
    if (atom.dimension === 3) state[2] = Math.log((1 - y) / y);
    atom.derivative(Math.log(gridTemperatures[point]! / temperature), state, out);
    return out[0]! * (1 - neutral) * neutral;
  };
  const change = (at(x * (1 + 1e-6)) - at(x * (1 - 1e-6))) / 2e-6;
  return { slope: at(x), change: Math.abs(change), cooling: (1 - d) * out[1]! };
}

/** Indices of the points that the formula looked back at from a point of the march. */
function lookedBack(point: number): { stride: number; past: number[] } {
  const b = gridBlocks.findIndex(({ end }) => point < end);
  const { first, stride } = gridBlocks[b]!;
  const past: number[] = [];
  let index = point;
  for (let k = 1; k <= 6; k++) {
    index -= b > 0 && index <= first - 1 ? 2 : 1;
    past.push(index);
  }
  return { stride, past };
}

function marchSlope(values: Float64Array, point: number): number {
  const { stride, past } = lookedBack(point);
  const sum = past.reduce((total, index, k) => total + pastWeights[k]! * values[index]!, 0);
  return (values[point]! - sum) / (stride * gridStep * slopeWeight);
}

describe("the march of the batch engine", () => {
  it.each(["peebles", "calibrated"] as const)("satisfies the single model's equation for hydrogen, tier %s", (tier) => {
    let worst = 0;
    let worstWithCooling = 0;
    for (const givens of plainModels(6, tier)) {
      const model = closeModel(givens);
      const row = rowOf(givens)!;
      const expansion = new GridExpansion();
      expansion.fill(row);
      const { comptonRate } = gasPerUnit(model.constants);
      const withHelium = atomOf(model, tier === "peebles" ? "saha" : "kinetic");
      const without = atomOf(model, "gone");
      // Endless Compton heating holds T_m at T_r, so that no series is in play.
      for (const heating of [1e30, 1]) {
        const march = new AtomMarch(atomTables(tier, model.constants), heating * comptonRate, converged);
        march.run(row, expansion.inverseRate);
        for (let i = mainFirst + equilibriumPoints; i < march.neutral.length; i++) {
          const x = march.neutral[i]!;
          const y = march.neutralHelium[i]!;
          // The interpolated end of helium may pass 1 by its error; there is no such state to compare at.
          if (tier === "calibrated" && i < heliumEnd && !(y < 1)) continue;
          const atom = i < heliumEnd ? withHelium : without;
          const d = heating === 1 ? march.cooling[i]! : 0;
          const single = singleSlope(atom, model.photonTemperature, i, x, d, y);
          const difference =
            Math.abs(marchSlope(march.neutral, i) - single.slope) / (Math.abs(single.slope) + single.change);
          if (heating === 1) worstWithCooling = Math.max(worstWithCooling, difference);
          else worst = Math.max(worst, difference);
        }
      }
    }
    // Measured 6.3e-14 (rounding) and 2.1e-7 (the extrapolated d and its series), of the sum of slope and stiffness.
    expect(worst).toBeLessThan(6e-13);
    expect(worstWithCooling).toBeLessThan(2e-6);
  });

  it("satisfies the single model's equation for hydrogen from random states", () => {
    let worst = 0;
    plainModels(20, "calibrated").forEach((givens, k) => {
      const model = closeModel(givens);
      const row = rowOf(givens)!;
      const expansion = new GridExpansion();
      expansion.fill(row);
      const march = new AtomMarch(atomTables("calibrated", model.constants), 1e30, converged);
      march.run(row, expansion.inverseRate);
      const b = 1 + (k % (gridBlocks.length - 1));
      const { first } = gridBlocks[b]!;
      march.neutral.fill(0.6 + 0.02 * k);
      march.cooling.fill(0);
      marchHydrogen(march, b, row, expansion.inverseRate);
      const atom = atomOf(model, "gone");
      const single = singleSlope(atom, model.photonTemperature, first, march.neutral[first]!, 0, 1);
      const difference = Math.abs(marchSlope(march.neutral, first) - single.slope);
      worst = Math.max(worst, difference / (Math.abs(single.slope) + single.change));
    });
    // Measured 1.2e-16 of the sum of slope and stiffness.
    expect(worst).toBeLessThan(2e-15);
  });

  it("cools the gas by the single model's equation", () => {
    let worst = 0;
    for (const givens of plainModels(6, "calibrated")) {
      const model = closeModel(givens);
      const row = rowOf(givens)!;
      const expansion = new GridExpansion();
      expansion.fill(row);
      const march = new AtomMarch(atomTables("calibrated", model.constants), gasPerUnit(model.constants).comptonRate);
      march.run(row, expansion.inverseRate);
      const atom = atomOf(model, "gone");
      for (let i = heliumEnd; i < march.neutral.length; i++) {
        const d = march.cooling[i]!;
        const { stride, past } = lookedBack(i);
        // Backward differentiation of fourth order (Gear 1971, memory).
        const sum = [48, -36, 16, -3].reduce((total, weight, k) => total + (weight / 25) * march.cooling[past[k]!]!, 0);
        const slope = (d - sum) / ((stride * gridStep * 12) / 25);
        const { cooling } = singleSlope(atom, model.photonTemperature, i, march.neutral[i]!, d, 1);
        // dd/ds = 1 - (1 + heating) d: both terms are of order one.
        worst = Math.max(worst, Math.abs(slope - cooling) / (1 + Math.abs(slope)));
      }
    }
    // Measured 4.1e-15.
    expect(worst).toBeLessThan(4e-14);
  });

  it("recombines helium at the single model's rate in random states", () => {
    let worst = 0;
    const tables = atomTables("calibrated", constantsSets.codata2022);
    plainModels(40, "calibrated").forEach((given, k) => {
      const givens = { ...given, conventions: {} };
      const model = closeModel(givens);
      const row = rowOf(givens)!;
      const expansion = new GridExpansion();
      expansion.fill(row);
      const i = (7 * k) % mainFirst;
      const x = 10 ** (-9 + 0.2 * k);
      const y = 0.001 + 0.0245 * k;
      const n = row.hydrogenDensity * (gridTemperatures[i]! / row.photonTemperature) ** 3;
      const electrons = n * (1 - x + row.heliumRatio * (1 - y));
      const at = i * heliumColumns;
      const perRate = expansion.inverseRate[i]! / hundredKmPerSecondPerMpc;
      const absorbers = (row.heliumRatio * y) / x;
      const through = lineEscapes(
        tables.helium,
        at,
        row.heliumRatio * y * n * perRate,
        continuumPlace(tables.helium[at + 10]! * absorbers),
      );
      const slope = perRate * through * (electrons * (1 - y) - tables.helium[at + 2]! * y);
      const atom = atomOf(model, "kinetic");
      const out = new Float64Array(3);
      const state = Float64Array.of(Math.log((1 - x) / x), 0, Math.log((1 - y) / y));
      atom.derivative(Math.log(gridTemperatures[i]! / model.photonTemperature), state, out);
      const single = out[2]! * y * (1 - y);
      worst = Math.max(worst, Math.abs(slope / single - 1));
    });
    // Measured 8.2e-9: the cubic interpolation in the tables of escape.
    expect(worst).toBeLessThan(8e-8);
  });

  it("takes case-B recombination from the single model, cube of the temperature included", () => {
    const tables = atomTables("peebles", constantsSets.codata2018);
    const share = tables.hydrogen[hydrogenColumns * mainFirst]! / tables.hydrogen[hydrogenColumns * mainFirst + 9]!;
    const calibrated = atomTables("calibrated", constantsSets.codata2018);
    const raised =
      calibrated.hydrogen[hydrogenColumns * mainFirst]! / calibrated.hydrogen[hydrogenColumns * mainFirst + 9]!;
    // F = 1.14: Seager, Sasselov & Scott 1999.
    expect(raised / share).toBeCloseTo(1.14, 14);
  });
});
