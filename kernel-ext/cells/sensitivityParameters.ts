import { DomainError } from "../../cosmo/errors";
import { type ClosedModel, type ModelGivens, modelFieldByName } from "../../cosmo/model";
import { quantityRegister } from "../../cosmo/quantities";
import type { ModelNumbers } from "../../cosmo/solve";

/** A parameter by which quantities are differentiated. */
export interface SensitivityParameter {
  /** Flat name, as derivatives take it. */
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly value: number;
  /** Differentiated by the parameter itself rather than by its logarithm: it may be zero or negative. */
  readonly perUnit: boolean;
}

/** What is varied unless parameters are named: each group is one degree of freedom, in whichever form the model states it. */
const groups: readonly { readonly forms: readonly string[]; readonly hasDefault: boolean }[] = [
  { forms: ["hubble", "reducedHubble"], hasDefault: false },
  { forms: ["baryonDensity", "baryonFraction"], hasDefault: false },
  { forms: ["coldMatterDensity", "coldMatterFraction", "matterDensity", "matterFraction"], hasDefault: false },
  { forms: ["curvature", "darkEnergyDensity", "darkEnergyFraction"], hasDefault: true },
  { forms: ["darkEnergy.w0"], hasDefault: true },
  { forms: ["neutrinos.effectiveNumber"], hasDefault: true },
  { forms: ["neutrinos.massSum"], hasDefault: true },
];

/** The number that a model states under a flat name. */
export function statedNumber(givens: ModelGivens, name: string): number | undefined {
  const value = name
    .split(".")
    .reduce<unknown>((inner, key) => (inner as Record<string, unknown> | undefined)?.[key], givens);
  return typeof value === "number" ? value : undefined;
}

/** The form in which the model states one of the three parameters that it needs; undefined where it is solved for. */
export function statedForm(givens: ModelGivens, parameter: "hubble" | "baryonDensity" | "coldMatterDensity") {
  const { forms } = groups.find((group) => group.forms[0] === parameter)!;
  return forms.find((name) => statedNumber(givens, name) !== undefined);
}

/**
 * The same model with its neutrino masses stated as their sum, where that can be done without changing it: one massive species, or three
 * of equal mass. A sum can be varied, a list cannot.
 */
export function withMassSum({ givens, photonTemperature, neutrinos }: ClosedModel): ModelGivens {
  if (!(photonTemperature > 0 && neutrinos.effectiveNumber > 0)) return givens;
  const { masses = [0.06], massSum, ordering, ...others } = givens.neutrinos ?? {};
  const replaced = givens.neutrinoDensity !== undefined || givens.neutrinoFraction !== undefined;
  const varied = givens.solveFor?.includes("neutrinos.massSum") === true;
  if (massSum !== undefined || ordering !== undefined || replaced || varied || !Array.isArray(masses)) return givens;
  const massive = masses.filter((mass) => mass !== 0);
  const sum = massive.reduce((total, mass) => total + mass, 0);
  if (massive.length <= 1) return { ...givens, neutrinos: { ...others, massSum: sum, ordering: "oneMassive" } };
  if (massive.length === 3 && massive.every((mass) => mass === massive[0])) {
    return { ...givens, neutrinos: { ...others, massSum: sum, ordering: "degenerate" } };
  }
  return givens;
}

/** Names of the parameters of a model that are varied unless others are named, and why some are left out. */
export function defaultParameters(numbers: ModelNumbers): { names: string[]; notes: string[] } {
  const { givens, solution, darkEnergy, neutrinos, photonTemperature } = numbers.model;
  const hasNeutrinos = photonTemperature > 0 && neutrinos.effectiveNumber > 0;
  const notes: string[] = [];
  const names = groups.flatMap(({ forms, hasDefault }) => {
    const stated = forms.find((name) => statedNumber(givens, name) !== undefined);
    if (stated !== undefined) return [stated];
    const name = forms[0]!;
    if (!hasDefault || solution?.solvedFor.includes(name)) return [];
    if (name === "darkEnergy.w0" && (darkEnergy.equation ?? darkEnergy.table) !== undefined) {
      notes.push("darkEnergy.w0 is not varied: w follows an equation or a table");
      return [];
    }
    if (name.startsWith("neutrinos.") && !hasNeutrinos) return [];
    if (name === "neutrinos.massSum") {
      notes.push(
        "neutrinos.massSum is not varied: the model states a list of different masses; state their sum to vary it",
      );
      return [];
    }
    return [name];
  });
  // Derived numbers that stand in for a parameter are what may be varied in its place.
  return { names: [...names, ...(solution?.determinedBy ?? []).filter((name) => !names.includes(name))], notes };
}

/** Names as the user gives them: a list of different texts. */
export function checkedNames(parameters: unknown, where: string): string[] {
  const refuse = (rule: string, value: unknown): never => {
    throw new DomainError({ where, argument: "parameters", rule, value });
  };
  if (!Array.isArray(parameters) || parameters.length === 0 || !parameters.every((name) => typeof name === "string")) {
    return refuse('must be a list of parameter names such as ["hubble", "curvature"]', parameters);
  }
  const twice = parameters.find((name, i) => parameters.indexOf(name) !== i);
  if (twice !== undefined) return refuse("must name each parameter once", twice);
  return parameters;
}

/** A parameter with its value in this model. */
export function describeParameter(numbers: ModelNumbers, name: string): SensitivityParameter {
  const field = modelFieldByName.get(name);
  const quantity = quantityRegister.get(name);
  const value = statedNumber(numbers.model.givens, name) ?? numbers.value(name);
  return {
    name,
    symbol: field?.symbol ?? quantity?.symbol ?? "",
    unit: field?.unit ?? quantity?.unit ?? "",
    value,
    perUnit: field?.accepts(-1) === true || !(value > 0),
  };
}
