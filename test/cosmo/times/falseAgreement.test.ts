import { describe, expect, it } from "vitest";
import { expansionPart } from "../../../cosmo/expansion";
import { gaussLegendre } from "../../../cosmo/numerics";
import { evaluateModel } from "../../../cosmo/solve";

describe("an integral whose two rules agree by chance", () => {
  it("is not believed: the age of this model is right to its stated error", () => {
    // A model found by comparing a thousand random ones with another quadrature: one panel of 21 nodes claimed 6e-13 here and was off by 1.7e-8.
    const numbers = evaluateModel({
      hubble: 71.74434487707913,
      baryonDensity: 0.022549619525671007,
      coldMatterDensity: 0.2040421063755639,
      curvature: 0.13944159233942627,
      darkEnergy: { w0: -0.8062806069036015, wa: -0.009824355924502037 },
      neutrinos: { effectiveNumber: 3.9360620038351044, masses: [] },
      photonTemperature: 2.7235583776608108,
      conventions: { constants: "codata2014" },
    });
    // 400 panels of 12 Gauss-Legendre nodes in sqrt(a).
    const expansion = numbers.evaluation.once(expansionPart);
    const rule = gaussLegendre(12);
    let sum = 0;
    for (let panel = 0; panel < 400; panel++) {
      for (let node = 0; node < 12; node++) {
        const root = (panel + 0.5 + 0.5 * rule.nodes[node]!) / 400;
        const a = root * root;
        sum += ((rule.weights[node]! / 800) * 2 * a * root) / Math.sqrt(expansion.squaredTerm(a));
      }
    }
    const age = numbers.quantity("age");
    const reference = sum * 977.7922216807891 * 0.01;
    expect(Math.abs(age.value / reference - 1)).toBeLessThan(1e-12);
    expect(Math.abs(age.value - reference)).toBeLessThanOrEqual(age.error + 1e-13 * reference);
  });
});
