import { describe, expect, it } from "vitest";
import { lookBack, pastWeights, predictionWeights, slopeWeight } from "../../../cosmo/batch/backwardDifferences";
import { GridExpansion } from "../../../cosmo/batch/gridExpansion";
import { edgeWeights, innerCell, partialCell, tailWeights } from "../../../cosmo/batch/gridQuadrature";
import { addEnergy } from "../../../cosmo/batch/neutrinoTable";
import { fillSquaredTerms } from "../../../cosmo/batch/rowExpansion";
import { gridBlocks, gridSize, gridTemperatures, mainFirst } from "../../../cosmo/batch/temperatureGrid";
import { expansionPart, fermiDiracEnergy } from "../../../cosmo/expansion";
import { Evaluation } from "../../../cosmo/quantity";
import { closeModel } from "../../../cosmo/solve";
import { boxModels } from "./boxModels";
import { rowOf } from "./rowOf";

describe("the formulas on the grid", () => {
  it("backwardDifferences is exact for polynomials of degree six, its prediction for degree five", () => {
    for (let degree = 0; degree <= lookBack; degree++) {
      // y = (1 + s/10)^degree at s = 0 from s = -1 .. -6; h = 1.
      const y = (s: number) => (1 + s / 10) ** degree;
      const past = pastWeights.reduce((sum, weight, k) => sum + weight * y(-1 - k), 0);
      expect(past + (slopeWeight * degree) / 10).toBeCloseTo(1, 13);
      if (degree === lookBack) continue;
      expect(predictionWeights.reduce((sum, weight, k) => sum + weight * y(-1 - k), 0)).toBeCloseTo(1, 13);
    }
  });

  it("gridQuadrature has the weights of Abramowitz & Stegun 1964, 25.4 (six points, memory)", () => {
    [11, -93, 802, 802, -93, 11].forEach((weight, j) => {
      expect(innerCell[j]! * 1440).toBeCloseTo(weight, 9);
    });
    let sum = 0;
    innerCell.forEach((weight, j) => {
      sum += weight * 1440;
      expect(edgeWeights[j]!).toBeCloseTo(sum, 9);
    });
  });

  it("tailWeights integrates a power of the temperature over the blocks", () => {
    const top = gridBlocks[0]!.first + 60;
    const weights = tailWeights(top);
    for (const power of [1, 3, 6]) {
      const sum = weights.reduce((total, weight, i) => total + weight * (gridTemperatures[i]! / 2000) ** power, 0);
      const exact =
        ((gridTemperatures[top]! / 2000) ** power - (gridTemperatures[gridSize - 1]! / 2000) ** power) / power;
      // Measured 2e-9 for the sixth power.
      expect(Math.abs(sum / exact - 1)).toBeLessThan(2e-8);
    }
  });

  it("partialCell integrates quintic polynomials from any place to the cell's end", () => {
    for (const from of [0, 0.3, 0.9]) {
      for (let power = 0; power <= 5; power++) {
        const values = Float64Array.from({ length: 6 }, (_, j) => (j - 2 + 3) ** power);
        const exact = (4 ** (power + 1) - (3 + from) ** (power + 1)) / (power + 1);
        expect(Math.abs(partialCell(values, 0, from) / exact - 1)).toBeLessThan(1e-12);
      }
    }
  });

  it("addEnergy agrees with fermiDiracEnergy", () => {
    const logs = Float64Array.from({ length: 800 }, (_, i) => -20 + 0.0371 * i);
    const sum = new Float64Array(logs.length);
    addEnergy(0, 1, logs, sum, 0, logs.length);
    logs.forEach((log, i) => {
      // Measured 2.1e-10.
      expect(Math.abs(sum[i]! / fermiDiracEnergy(Math.exp(log)) - 1)).toBeLessThan(2e-9);
    });
  });

  it("expansion on the grid and off it agrees with the single model", () => {
    let worst = 0;
    let worstOffGrid = 0;
    for (const givens of boxModels(60, 11)) {
      const row = rowOf(givens);
      if (row === undefined) continue;
      const expansion = new Evaluation(closeModel(givens)).once(expansionPart);
      const grid = new GridExpansion();
      grid.fill(row);
      for (let i = 0; i < gridSize; i += 3) {
        const a = row.photonTemperature / gridTemperatures[i]!;
        worst = Math.max(worst, Math.abs(grid.inverseRate[i]! * expansion.rate(a) - 1));
      }
      const logs = Float64Array.from({ length: 13 }, (_, k) => -0.7 * k);
      const scaleFactors = logs.map(Math.exp);
      const terms = new Float64Array(logs.length);
      fillSquaredTerms(row, scaleFactors, logs, terms, 0, logs.length);
      scaleFactors.forEach((a, k) => {
        worstOffGrid = Math.max(worstOffGrid, Math.abs(terms[k]! / expansion.squaredTerm(a) - 1));
      });
    }
    // Measured 4.0e-10 and 3.3e-11.
    expect(worst).toBeLessThan(4e-9);
    expect(worstOffGrid).toBeLessThan(3e-10);
  });

  it("keeps the neutrinos of the row before only where they are the same", () => {
    const [first, second] = boxModels(40, 3).filter((givens) => givens.neutrinos!.masses!.length === 3);
    const reused = new GridExpansion();
    for (const givens of [first!, second!, second!, first!]) {
      const row = rowOf(givens)!;
      const fresh = new GridExpansion();
      fresh.fill(row);
      reused.fill(row);
      expect(reused.inverseRate).toEqual(fresh.inverseRate);
    }
  });

  it("has its blocks in order, every stride twice the one before", () => {
    expect(gridBlocks[0]!.first).toBe(mainFirst);
    gridBlocks.forEach(({ first, end, stride }, b) => {
      expect(stride).toBe(2 ** b);
      expect(end).toBe(gridBlocks[b + 1]?.first ?? gridSize);
      const ratio = Math.log(gridTemperatures[first]! / gridTemperatures[first + 1]!);
      expect(ratio).toBeCloseTo(0.01 * stride, 12);
    });
  });
});
