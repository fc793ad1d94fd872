import { InconsistentParametersError } from "../errors";
import type { BoundColumns } from "./batchColumns";

const exactlyOne: readonly (readonly [subject: string, names: readonly string[]])[] = [
  ["the expansion rate today", ["hubble", "reducedHubble"]],
  ["the baryons", ["baryonDensity", "baryonFraction"]],
  ["the cold matter", ["coldMatterDensity", "coldMatterFraction", "matterDensity", "matterFraction"]],
];

const atMostOne: readonly (readonly [subject: string, names: readonly string[]])[] = [
  ["the closing of the budget", ["curvature", "darkEnergyDensity", "darkEnergyFraction"]],
  ["the neutrino masses", ["neutrinos.masses", "neutrinos.massSum"]],
  ["the reionization", ["reionizationRedshift", "reionizationDepth"]],
];

/**
 * Refuses columns that cannot make one model in any row, once for all rows: InconsistentParametersError, as solve/closeModel.ts
 * says it of one model.
 */
export function requireStructure(bound: BoundColumns): void {
  const has = (name: string) => (name === "neutrinos.masses" ? bound.masses !== undefined : bound.numbers.has(name));
  const where = "batch";
  for (const [subject, names] of exactlyOne) {
    if (!names.some(has)) {
      throw new InconsistentParametersError({
        where,
        parameters: names,
        problem: "missing",
        reason: `no column and no shared value gives ${subject}`,
        hint: `give one of ${names.join(", ")}`,
      });
    }
  }
  for (const [subject, names] of [...exactlyOne, ...atMostOne]) {
    const given = names.filter(has);
    if (given.length > 1) {
      throw new InconsistentParametersError({
        where,
        parameters: given,
        problem: "redundant",
        reason: `${given.join(" and ")} state ${subject} twice`,
        hint: "leave one of them out",
      });
    }
  }
  if (bound.words.has("neutrinos.ordering") && !bound.numbers.has("neutrinos.massSum")) {
    throw new InconsistentParametersError({
      where,
      parameters: ["neutrinos.ordering"],
      problem: "redundant",
      reason: "neutrinos.ordering says how neutrinos.massSum is shared, and no massSum is given",
    });
  }
}
