import { engineServes, prepareBatch } from "../../../cosmo/batch";
import { CosmologyError } from "../../../cosmo/errors";
import type { ModelGivens } from "../../../cosmo/model";
import { closeModel } from "../../../cosmo/solve";
import type { WorkerRequest } from "../../workers";
import type { ColumnPlan, GivenColumn } from "./columns";
import { isDerived } from "./givenNames";
import { nestGivens } from "./givensOfRow";
import type { DeriveOptions } from "./options";

/** How the rows of a file go through the batch engine. */
export interface FastPlan {
  readonly request: WorkerRequest;
  /** Columns of the file with one number a row. */
  readonly numbers: readonly GivenColumn[];
  /** The column of neutrino masses, a list a row. */
  readonly masses: GivenColumn | undefined;
}

/**
 * Plans the fast path of `derive`, or says in a clause why all rows have to take the full computation.
 */
export function planFast(plan: ColumnPlan, options: DeriveOptions): FastPlan | { readonly reason: string } {
  const { givens, groups } = plan;
  if (groups.length > 0) return { reason: `the column ${groups[0]!.column} holds objects` };
  if (options.solveFor.length > 0)
    return { reason: "--solve-for asks for a parameter that the batch engine does not solve for" };
  const numeric = ["number", "numberOrChoice", "numberList"];
  const words = givens.find(({ given }) => !numeric.includes(given.kind));
  if (words !== undefined) return { reason: `the column ${words.column} holds words` };
  const shared: ModelGivens = nestGivens(new Map([...options.fill].filter(([name]) => !isDerived(name))));
  if (!engineServes(shared)) return { reason: "the batch engine does not know these conventions" };
  const outputs = options.requests.map((request) => request.text);
  const { singlePathOutputs } = prepareBatch({ outputs, shared, closeModel });
  if (singlePathOutputs.length > 0)
    return { reason: `the batch engine does not compute ${singlePathOutputs.join(", ")}` };
  const present = new Set([...givens.map(({ given }) => given.name), ...options.fill.keys()]);
  const derived = [...present].filter(isDerived);
  if (derived.length > 1)
    return { reason: `${derived.join(" and ")} stand in for parameters, and the batch engine solves for H0 alone` };
  const [hubbleFrom] = derived;
  if (hubbleFrom !== undefined) {
    if (present.has("hubble") || present.has("reducedHubble") || options.fill.has(hubbleFrom)) {
      return { reason: `${hubbleFrom} stands in for a parameter other than H0` };
    }
    if (prepareBatch({ outputs: [hubbleFrom], shared, closeModel }).singlePathOutputs.length > 0) {
      return { reason: `the batch engine does not compute ${hubbleFrom}, which stands in for H0` };
    }
  }
  const refusal = structureRefusal(
    [...present].filter((name) => !isDerived(name) && !options.fill.has(name)),
    {
      outputs,
      shared,
      hubbleFrom,
    },
  );
  if (refusal !== undefined) return { reason: refusal };
  return {
    request: { outputs, shared, hubbleFrom },
    numbers: givens.filter(({ given }) => given.kind !== "numberList"),
    masses: givens.find(({ given }) => given.kind === "numberList"),
  };
}

/** Why columns of these names make no plain model for the engine; the full computation may still accept them, or say why not. */
function structureRefusal(names: readonly string[], request: WorkerRequest): string | undefined {
  const { outputs, shared = {}, hubbleFrom } = request;
  const all = hubbleFrom === undefined ? names : [...names, "hubble"];
  try {
    const plan = prepareBatch({ outputs, shared, closeModel });
    const nothing = new Float64Array(0);
    const out = Object.fromEntries(plan.outputs.map((name) => [name, nothing]));
    plan.run(Object.fromEntries(all.map((name) => [name, nothing])), { from: 0, to: 0 }, out);
    return undefined;
  } catch (error) {
    if (!(error instanceof CosmologyError)) throw error;
    return error.message.replace(/^batch: /, "");
  }
}
