import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import type { ModelGivens, RecombinationTier } from "../../cosmo/model";
import { evaluateModel, type ModelNumbers } from "../../cosmo/solve";

/** One reference value: a model, arguments, and the value at two tolerances of the generator. */
export interface ReferenceRow {
  readonly model: string;
  readonly arguments: readonly number[];
  readonly value: number;
  readonly looserValue: number;
}

/** One file of values/: `quantity.json`, `quantity.<tier>.json`, or `quantity.between.json` for pairs of redshifts. */
export interface ReferenceFile {
  /** Without the ending. */
  readonly name: string;
  readonly quantity: string;
  readonly tier: RecombinationTier | undefined;
  readonly unit: string;
  readonly rows: readonly ReferenceRow[];
}

const folder = join(__dirname, "values");
const tiers: readonly string[] = ["saha", "peebles", "calibrated"];

/** All reference files, in the order of their names. */
export function readReferences(): ReferenceFile[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith(".json"))
    .sort()
    .map((file) => {
      const content = JSON.parse(readFileSync(join(folder, file), "utf8")) as {
        unit: string;
        rows: [string, ...number[]][];
      };
      const [quantity, tag] = file.slice(0, -".json".length).split(".") as [string, string | undefined];
      if (tag !== undefined && tag !== "between" && !tiers.includes(tag)) {
        throw new Error(`${file}: ${tag} is neither a tier nor "between"`);
      }
      return {
        name: file.slice(0, -".json".length),
        quantity,
        tier: tag === undefined || tag === "between" ? undefined : (tag as RecombinationTier),
        unit: content.unit,
        rows: content.rows.map(([model, ...numbers]) => ({
          model,
          arguments: numbers.slice(0, -2),
          value: numbers[numbers.length - 2]!,
          looserValue: numbers[numbers.length - 1]!,
        })),
      };
    });
}

/** Givens of the reference models, by name. */
export function referenceModels(): Map<string, ModelGivens> {
  const models = JSON.parse(readFileSync(join(__dirname, "models.json"), "utf8")) as {
    name: string;
    givens: ModelGivens;
  }[];
  return new Map(models.map((model) => [model.name, model.givens]));
}

/** Evaluates the reference models, each tier of each once. */
export class ReferenceModels {
  private readonly givens = referenceModels();
  private readonly evaluated = new Map<string, ModelNumbers>();

  numbers(model: string, tier: RecombinationTier | undefined): ModelNumbers {
    const key = `${model} ${tier}`;
    const known = this.evaluated.get(key);
    if (known !== undefined) return known;
    const givens = this.givens.get(model);
    if (givens === undefined) throw new Error(`models.json has no model ${model}`);
    const numbers = evaluateModel(tier === undefined ? givens : { ...givens, recombination: tier });
    this.evaluated.set(key, numbers);
    return numbers;
  }
}
