import { describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { closeModel, evaluateModel } from "../../../cosmo/solve";
import { slots } from "../../../cosmo/solve/slots";
import { givenSets } from "./givenSets";

/** Models a set; `MODELS=200` makes the long run of `npm run roundtrip`. */
const models = Number(process.env["MODELS"] ?? 8);

/** A seeded generator (mulberry32): the same models every time. */
function generator(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

function randomModel(next: () => number, set: { name: string }): ModelGivens & Record<string, unknown> {
  const between = (low: number, high: number) => low + (high - low) * next();
  const curved = set.name.includes("curvature") || set.name.includes("Omega_DE");
  const w0 = set.name.includes("w0");
  return {
    hubble: between(60, 78),
    baryonDensity: between(0.019, 0.026),
    coldMatterDensity: between(0.1, 0.14),
    ...(curved ? { curvature: between(-0.03, 0.03) } : {}),
    ...(w0 ? { darkEnergy: { w0: between(-1.2, -0.8) } } : {}),
    ...(set.name.includes("N_eff") ? { neutrinos: { effectiveNumber: between(2.6, 3.6) } } : {}),
    ...(set.name.includes("masses") ? { neutrinos: { massSum: between(0.05, 0.4) } } : {}),
    ...(set.name.includes("T_cmb") ? { photonTemperature: between(2.6, 2.8) } : {}),
    ...(set.name.includes("helium") ? { helium: between(0.22, 0.27) } : {}),
  };
}

function fieldOf(model: unknown, name: string): number {
  return name.split(".").reduce((value, key) => (value as Record<string, unknown>)[key], model) as unknown as number;
}

describe("a model derived, dropped and recovered", () => {
  for (const [index, set] of givenSets.entries()) {
    it(`${set.name}: ${[...set.keep, ...set.give].join(", ")}`, () => {
      const next = generator(1000 + index);
      for (let k = 0; k < models; k++) {
        const truth = randomModel(next, set);
        const numbers = evaluateModel(truth);
        const solveFor = set.solveFor ?? [];
        const givens = Object.fromEntries([
          ...set.keep.map((name) => [name, truth[name]]),
          ...set.give.map((name) => [name, numbers.value(name)]),
        ]) as ModelGivens;
        const near = set.near ? { solveNear: { [set.near]: numbers.value(set.near) * 1.001 } } : {};
        const solved = closeModel({ ...givens, solveFor, ...near });
        for (const slot of slots) {
          if (slot.parameter.startsWith("reion") || slot.parameter === "neutrinos.massSum") continue;
          const [wanted, found] = [fieldOf(numbers.model, slot.parameter), fieldOf(solved, slot.parameter)];
          expect(Math.abs(found - wanted), `${slot.parameter} of model ${k + 1}`).toBeLessThan(
            1e-9 * Math.max(Math.abs(wanted), slot.logarithmic ? 0 : 1),
          );
        }
        // Second forms of one parameter need no search.
        if (solved.solution !== undefined) expect(solved.solution.determinedBy.length).toBeGreaterThan(0);
      }
    });
  }

  it("hubble from theta_* costs at most 8 evaluations of the suite", () => {
    const next = generator(77);
    for (let k = 0; k < 12; k++) {
      const truth = randomModel(next, { name: "" });
      const { hubble: _, ...densities } = truth;
      const acousticAngle = evaluateModel(truth).value("acousticAngle");
      // Measured: 5 in each of twelve models.
      expect(closeModel({ ...densities, acousticAngle }).solution!.evaluations).toBeLessThanOrEqual(8);
    }
  });
});
