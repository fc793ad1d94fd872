import { type ConstantsSetName, constantsSets } from "../constants";
import { DomainError, InconsistentParametersError } from "../errors";
import {
  closeDarkEnergyFunction,
  massiveNeutrinoDensity,
  masslessSpeciesDensity,
  neutrinoTemperature,
} from "../expansion";
import {
  type ClosedDarkEnergy,
  type ClosedModel,
  type ClosedNeutrinos,
  type ConventionGivens,
  type FlatGivens,
  type ModelGivens,
  type NeutrinoOrdering,
  neutrinoMassesFromSum,
  photonDensity,
  type RecombinationTier,
} from "../model";
import { nucleosynthesisHelium } from "../recombination/nucleosynthesisHelium";
import type { Origin } from "./origin";

/**
 * Closes a model whose givens are fields alone, exactly one of each needed: what closeModel does where nothing is to be solved.
 *
 * Exactly one of hubble or reducedHubble; of baryonDensity or baryonFraction; of coldMatterDensity, coldMatterFraction,
 * matterDensity, matterFraction; at most one of curvature, darkEnergyDensity, darkEnergyFraction (curvature 0 by default).
 * Closure: `radiationInside`, Omega_DE = 1 - Omega_k - everything else; `radiationOnTop`, Omega_DE = 1 - Omega_k - Omega_m.
 *
 * @param flat checked givens by dotted name; @param givens what the model says it was closed from.
 */
export function closeDirect(flat: FlatGivens, givens: ModelGivens, origin: Origin): ClosedModel {
  const where = origin.where ?? "model";
  const pick = new Picker(flat, where, origin.place);

  const hubbleName = pick.exactlyOne(["hubble", "reducedHubble"], "the expansion rate today");
  const reducedHubble = hubbleName === "hubble" ? pick.number("hubble") / 100 : pick.number("reducedHubble");
  const h2 = reducedHubble * reducedHubble;
  const hubble = hubbleName === "hubble" ? pick.number("hubble") : 100 * reducedHubble;

  const conventions: Required<ConventionGivens> = {
    constants: pick.word("conventions.constants", "codata2022") as ConstantsSetName,
    closure: pick.word("conventions.closure", "radiationInside") as "radiationInside" | "radiationOnTop",
    equalityMatter: pick.word("conventions.equalityMatter", "baryonsAndCold") as "baryonsAndCold" | "allMatter",
    lastScattering: pick.word("conventions.lastScattering", "full") as "full" | "huSugiyama1996",
    drag: pick.word("conventions.drag", "full") as "full" | "eisensteinHu1998",
    soundHorizon: pick.word("conventions.soundHorizon", "full") as Required<ConventionGivens>["soundHorizon"],
  };
  const constants = constantsSets[conventions.constants];
  const photonTemperature = pick.number("photonTemperature", 2.7255);
  const photons = photonDensity(photonTemperature, constants);
  const neutrinos = closeNeutrinos(pick, photonTemperature, photons);
  const neutrinoDensity = massiveNeutrinoDensity(
    neutrinos.masses,
    neutrinos.temperature,
    neutrinos.masslessSpeciesDensity,
    constants,
  );
  const masslessSpecies = 3 - neutrinos.masses.length;
  const radiationDensity = photons + masslessSpecies * neutrinos.masslessSpeciesDensity;

  const baryonName = pick.exactlyOne(["baryonDensity", "baryonFraction"], "the baryons");
  const baryonDensity =
    baryonName === "baryonDensity" ? pick.number("baryonDensity") : pick.number("baryonFraction") * h2;
  const coldMatterDensity = closeColdMatter(pick, h2, baryonDensity, neutrinoDensity);
  const matterDensity = baryonDensity + coldMatterDensity + neutrinoDensity;

  // What closes to one beside curvature and dark energy.
  const rest = matterDensity / h2 + (conventions.closure === "radiationInside" ? radiationDensity / h2 : 0);
  const closer = pick.atMostOne(["curvature", "darkEnergyDensity", "darkEnergyFraction"]);
  let curvature = 0;
  let darkEnergyFraction: number;
  if (closer === "darkEnergyFraction" || closer === "darkEnergyDensity") {
    darkEnergyFraction = closer === "darkEnergyFraction" ? pick.number(closer) : pick.number(closer) / h2;
    curvature = 1 - rest - darkEnergyFraction;
    // Rounding in the sum is not curvature.
    if (Math.abs(curvature) < 4 * Number.EPSILON) curvature = 0;
  } else {
    curvature = pick.number("curvature", 0);
    darkEnergyFraction = 1 - curvature - rest;
    if (Math.abs(darkEnergyFraction) < 4 * Number.EPSILON) darkEnergyFraction = 0;
  }

  const heliumGiven = flat.get("helium");
  const heliumSource = typeof heliumGiven === "number" ? "given" : "nucleosynthesis";
  const helium =
    typeof heliumGiven === "number" ? heliumGiven : nucleosynthesisHelium(baryonDensity, neutrinos.effectiveNumber);
  pick.atMostOne(["reionizationRedshift", "reionizationDepth"]);

  return {
    givens,
    hubble,
    reducedHubble,
    baryonDensity,
    coldMatterDensity,
    neutrinoDensity,
    matterDensity,
    photonDensity: photons,
    radiationDensity,
    darkEnergyDensity: darkEnergyFraction * h2,
    baryonFraction: baryonDensity / h2,
    coldMatterFraction: coldMatterDensity / h2,
    neutrinoFraction: neutrinoDensity / h2,
    matterFraction: matterDensity / h2,
    photonFraction: photons / h2,
    radiationFraction: radiationDensity / h2,
    darkEnergyFraction,
    curvature,
    darkEnergy: closeDarkEnergy(pick, givens, where, origin.place),
    neutrinos,
    photonTemperature,
    helium,
    heliumSource,
    reionizationRedshift: pick.optionalNumber("reionizationRedshift"),
    reionizationDepth: pick.optionalNumber("reionizationDepth"),
    recombination: pick.word("recombination", "calibrated") as RecombinationTier,
    scalarSpectralIndex: pick.number("scalarSpectralIndex", 0.965),
    conventions,
    constants,
  };
}

function closeDarkEnergy(
  pick: Picker,
  givens: ModelGivens,
  where: string,
  place: string | undefined,
): ClosedDarkEnergy {
  const form = pick.atMostOne(["darkEnergy.equation", "darkEnergy.table"]);
  if (form !== undefined) {
    const beside = ["darkEnergy.w0", "darkEnergy.wa"].find((name) => pick.has(name));
    if (beside !== undefined) throw pick.redundant([form, beside], `${form} takes the place of ${beside}`);
    return closeDarkEnergyFunction(givens.darkEnergy!, where, place);
  }
  const w0 = pick.number("darkEnergy.w0", -1);
  const wa = pick.number("darkEnergy.wa", 0);
  if (!(w0 + wa < 1 / 3)) {
    throw new DomainError({
      where,
      argument: "darkEnergy.w0 + darkEnergy.wa",
      rule: "must be below 1/3, or dark energy outgrows radiation in the past",
      value: w0 + wa,
      place,
    });
  }
  return { w0, wa };
}

function closeNeutrinos(pick: Picker, photonTemperature: number, photons: number): ClosedNeutrinos {
  const effectiveNumber = pick.number("neutrinos.effectiveNumber", 3.044);
  const given = pick.atMostOne(["neutrinos.masses", "neutrinos.massSum"]);
  const orderingGiven = pick.has("neutrinos.ordering");
  if (orderingGiven && given !== "neutrinos.massSum") {
    throw pick.redundant(
      ["neutrinos.ordering", ...(given === undefined ? [] : [given])],
      "neutrinos.ordering says how neutrinos.massSum is shared, and no massSum is given",
    );
  }
  let masses: readonly number[] = [0.06];
  if (given === "neutrinos.masses") masses = pick.list("neutrinos.masses");
  if (given === "neutrinos.massSum") {
    const ordering = pick.word("neutrinos.ordering", "oneMassive") as NeutrinoOrdering;
    masses = neutrinoMassesFromSum(pick.number("neutrinos.massSum"), ordering, pick.where);
  }
  const massive = masses.filter((mass) => mass > 0).sort((a, b) => b - a);
  const noNeutrinos = effectiveNumber === 0 || photonTemperature === 0;
  if (noNeutrinos && massive.length > 0 && given !== undefined) {
    throw new InconsistentParametersError({
      where: pick.where,
      parameters: [given, effectiveNumber === 0 ? "neutrinos.effectiveNumber" : "photonTemperature"],
      problem: "contradictory",
      reason: `${given} asks for massive neutrinos, but ${effectiveNumber === 0 ? "neutrinos.effectiveNumber" : "photonTemperature"} is 0, so there are none`,
    });
  }
  return {
    effectiveNumber,
    masses: noNeutrinos ? [] : massive,
    temperature: neutrinoTemperature(effectiveNumber, photonTemperature),
    masslessSpeciesDensity: masslessSpeciesDensity(effectiveNumber, photons),
  };
}

function closeColdMatter(pick: Picker, h2: number, baryonDensity: number, neutrinoDensity: number): number {
  const names = ["coldMatterDensity", "coldMatterFraction", "matterDensity", "matterFraction"];
  const name = pick.exactlyOne(names, "the cold matter");
  const value = pick.number(name);
  if (name === "coldMatterDensity") return value;
  if (name === "coldMatterFraction") return value * h2;
  const total = name === "matterDensity" ? value : value * h2;
  const cold = total - baryonDensity - neutrinoDensity;
  // Rounding in the difference is not negative matter.
  if (Math.abs(cold) < 4 * Number.EPSILON * total) return 0;
  if (cold < 0) {
    throw new InconsistentParametersError({
      where: pick.where,
      parameters: [name, "baryonDensity", "neutrinos.masses"],
      problem: "contradictory",
      reason: `${name} ${value} is less than its parts: baryons ${baryonDensity.toPrecision(6)} and massive neutrinos ${neutrinoDensity.toPrecision(6)} (as omega) leave ${cold.toPrecision(4)} for cold matter`,
      hint: `raise ${name}, or lower the baryons or the neutrino masses`,
    });
  }
  return cold;
}

/** Reads flat givens by name and says which are missing or too many. */
class Picker {
  constructor(
    private readonly flat: FlatGivens,
    readonly where: string,
    private readonly place: string | undefined,
  ) {}

  has(name: string): boolean {
    return this.flat.has(name);
  }

  number(name: string, fallback?: number): number {
    return (this.flat.get(name) as number | undefined) ?? fallback!;
  }

  optionalNumber(name: string): number | undefined {
    return this.flat.get(name) as number | undefined;
  }

  list(name: string): readonly number[] {
    return this.flat.get(name) as readonly number[];
  }

  word(name: string, fallback: string): string {
    return (this.flat.get(name) as string | undefined) ?? fallback;
  }

  atMostOne(names: readonly string[]): string | undefined {
    const given = names.filter((name) => this.flat.has(name));
    if (given.length > 1) {
      throw this.redundant(given, `${given.join(" and ")} state the same thing twice`);
    }
    return given[0];
  }

  exactlyOne(names: readonly string[], subject: string): string {
    const given = this.atMostOne(names);
    if (given !== undefined) return given;
    const place = this.place === undefined ? "" : ` (${this.place})`;
    throw new InconsistentParametersError({
      where: this.where,
      parameters: names,
      problem: "missing",
      reason: `${subject} ${subject.endsWith("s") ? "are" : "is"} not given${place}`,
      hint: `give one of ${names.join(", ")}`,
    });
  }

  redundant(parameters: readonly string[], reason: string): InconsistentParametersError {
    const place = this.place === undefined ? "" : ` (${this.place})`;
    return new InconsistentParametersError({
      where: this.where,
      parameters,
      problem: "redundant",
      reason: `${reason}${place}`,
      hint: "leave one of them out",
    });
  }
}
