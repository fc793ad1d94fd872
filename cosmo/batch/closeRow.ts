import { type ConstantsSet, lightSpeed } from "../constants";
import { fermiDiracEnergy, masslessSpeciesDensity, massToTemperature, neutrinoTemperature } from "../expansion";
import {
  type ClosedModel,
  hundredKmPerSecondPerMpc,
  type NeutrinoOrdering,
  neutrinoMassesFromSum,
  photonDensity,
} from "../model";
import { Evaluation } from "../quantity";
import { gasPart, heliumToHydrogenRatio } from "../recombination";
import { nucleosynthesisHelium } from "../recombination/nucleosynthesisHelium";
import { type BoundColumns, type Slot, slotValue } from "./batchColumns";
import type { BatchRow } from "./batchRow";
import { isInsideRange } from "./validatedRange";

const absent: Slot = { column: undefined, constant: Number.NaN };
const defaultMasses: readonly Slot[] = [{ column: undefined, constant: 0.06 }];

/** n_H for omega_b = 1 without helium, and the Compton rate at 1 K, from the gas of the single model. */
export function gasPerUnit(constants: ConstantsSet): { hydrogenDensity: number; comptonRate: number } {
  const probe = { baryonDensity: 1, helium: 0, photonTemperature: 1, constants } as ClosedModel;
  return new Evaluation(probe).once(gasPart);
}

/**
 * Closes rows as solve/closeModel.ts closes models, with the same functions for photons, neutrinos and helium, into one
 * {@link BatchRow}; for givens that make one model in one of the plain ways. Anything that is not a plain number inside the validated
 * range is left to the single path, whose errors name the field and the rule.
 */
export class RowCloser {
  private readonly hubble: Slot;
  private readonly hubbleIsReduced: boolean;
  private readonly baryons: Slot;
  private readonly baryonsAreFraction: boolean;
  private readonly cold: Slot;
  private readonly coldKind: "cold" | "matter";
  private readonly coldIsFraction: boolean;
  private readonly curvature: Slot;
  private readonly darkEnergy: Slot;
  private readonly closesByDarkEnergy: boolean;
  private readonly darkEnergyIsFraction: boolean;
  private readonly w0: Slot;
  private readonly wa: Slot;
  private readonly effectiveNumber: Slot;
  private readonly temperature: Slot;
  private readonly helium: Slot;
  private readonly masses: readonly Slot[];
  private readonly massSum: Slot | undefined;
  private readonly ordering: NeutrinoOrdering;
  private readonly radiationInside: boolean;
  private readonly gas: { hydrogenDensity: number; comptonRate: number };
  /** Masses of the row in eV, and the sum that they were made from. */
  private readonly mass = new Float64Array(3);
  private sharedSum = Number.NaN;
  /** The neutrinos that {@link BatchRow} holds already. */
  private readonly held = new Float64Array(5).fill(Number.NaN);

  constructor(
    bound: BoundColumns,
    private readonly constants: ConstantsSet,
  ) {
    const { numbers, words } = bound;
    const slot = (name: string, fallback?: number): Slot =>
      numbers.get(name) ?? (fallback === undefined ? absent : { column: undefined, constant: fallback });
    this.hubbleIsReduced = numbers.has("reducedHubble");
    this.hubble = slot(this.hubbleIsReduced ? "reducedHubble" : "hubble");
    this.baryonsAreFraction = numbers.has("baryonFraction");
    this.baryons = slot(this.baryonsAreFraction ? "baryonFraction" : "baryonDensity");
    const coldName = ["coldMatterDensity", "coldMatterFraction", "matterDensity", "matterFraction"].find((name) =>
      numbers.has(name),
    );
    this.cold = coldName === undefined ? absent : slot(coldName);
    this.coldKind = coldName?.startsWith("matter") ? "matter" : "cold";
    this.coldIsFraction = coldName?.endsWith("Fraction") === true;
    this.curvature = slot("curvature", 0);
    this.darkEnergyIsFraction = numbers.has("darkEnergyFraction");
    this.closesByDarkEnergy = this.darkEnergyIsFraction || numbers.has("darkEnergyDensity");
    this.darkEnergy = slot(this.darkEnergyIsFraction ? "darkEnergyFraction" : "darkEnergyDensity");
    this.w0 = slot("darkEnergy.w0", -1);
    this.wa = slot("darkEnergy.wa", 0);
    this.effectiveNumber = slot("neutrinos.effectiveNumber", 3.044);
    this.temperature = slot("photonTemperature", 2.7255);
    this.helium = slot("helium");
    this.massSum = numbers.get("neutrinos.massSum");
    this.masses = bound.masses ?? defaultMasses;
    this.ordering = (words.get("neutrinos.ordering") ?? "oneMassive") as NeutrinoOrdering;
    this.radiationInside = words.get("conventions.closure") !== "radiationOnTop";
    this.gas = gasPerUnit(constants);
  }

  /** Fills the row; false where it is not a plain model inside the validated range. */
  close(index: number, row: BatchRow): boolean {
    const hubbleValue = slotValue(this.hubble, index);
    const h = this.hubbleIsReduced ? hubbleValue : hubbleValue / 100;
    row.reducedHubble = h;
    row.hubble = this.hubbleIsReduced ? 100 * hubbleValue : hubbleValue;
    const h2 = h * h;
    if (!this.closeNeutrinos(index, row)) return false;
    const baryons = slotValue(this.baryons, index);
    row.baryonDensity = this.baryonsAreFraction ? baryons * h2 : baryons;
    const given = slotValue(this.cold, index);
    const cold = this.coldIsFraction ? given * h2 : given;
    row.coldMatterDensity = this.coldKind === "cold" ? cold : cold - row.baryonDensity - row.neutrinoDensity;
    row.matterDensity = row.baryonDensity + row.coldMatterDensity + row.neutrinoDensity;
    const rest = row.matterDensity / h2 + (this.radiationInside ? row.radiationDensity / h2 : 0);
    if (this.closesByDarkEnergy) {
      const value = slotValue(this.darkEnergy, index);
      row.darkEnergyFraction = this.darkEnergyIsFraction ? value : value / h2;
      row.curvature = 1 - rest - row.darkEnergyFraction;
      if (Math.abs(row.curvature) < 4 * Number.EPSILON) row.curvature = 0;
    } else {
      row.curvature = slotValue(this.curvature, index);
      row.darkEnergyFraction = 1 - row.curvature - rest;
      if (Math.abs(row.darkEnergyFraction) < 4 * Number.EPSILON) row.darkEnergyFraction = 0;
    }
    row.darkEnergyDensity = row.darkEnergyFraction * h2;
    row.w0 = slotValue(this.w0, index);
    row.wa = slotValue(this.wa, index);
    const helium = slotValue(this.helium, index);
    row.helium = this.helium === absent ? nucleosynthesisHelium(row.baryonDensity, row.effectiveNumber) : helium;
    row.hydrogenDensity = (1 - row.helium) * row.baryonDensity * this.gas.hydrogenDensity;
    row.heliumRatio = heliumToHydrogenRatio(row.helium);
    row.scattering = (lightSpeed * this.constants.thomsonCrossSection * row.hydrogenDensity) / hundredKmPerSecondPerMpc;
    row.loading = (3 * row.baryonDensity) / (4 * row.photonDensity);
    return isInsideRange(row);
  }

  /** Photons and neutrinos, anew only where the row differs from the one before. */
  private closeNeutrinos(index: number, row: BatchRow): boolean {
    const { held, mass } = this;
    const effectiveNumber = slotValue(this.effectiveNumber, index);
    const temperature = slotValue(this.temperature, index);
    if (!this.readMasses(index)) return false;
    if (
      held[0] === effectiveNumber &&
      held[1] === temperature &&
      held[2] === mass[0] &&
      held[3] === mass[1] &&
      held[4] === mass[2]
    ) {
      return true;
    }
    held[0] = effectiveNumber;
    held[1] = temperature;
    held.set(mass, 2);
    const photons = photonDensity(temperature, this.constants);
    const species = masslessSpeciesDensity(effectiveNumber, photons);
    const neutrino = neutrinoTemperature(effectiveNumber, temperature);
    row.effectiveNumber = effectiveNumber;
    row.photonTemperature = temperature;
    row.logPhotonTemperature = Math.log(temperature);
    row.photonDensity = photons;
    row.speciesDensity = species;
    row.massCount = 0;
    row.massSum = 0;
    row.neutrinoDensity = 0;
    let massive = 0;
    for (let m = 0; m < 3; m++) {
      if (!(mass[m] > 0)) continue;
      massive++;
      const ratio = massToTemperature(mass[m], neutrino, this.constants);
      row.neutrinoDensity += species * fermiDiracEnergy(ratio);
      row.massSum += mass[m];
      // Species of equal mass go together.
      if (m > 0 && mass[m] === mass[m - 1]) {
        row.massShares[row.massCount - 1] += 1;
      } else {
        row.logMassRatios[row.massCount] = Math.log(ratio);
        row.massShares[row.massCount] = 1;
        row.massCount++;
      }
    }
    row.radiationDensity = photons + (3 - massive) * species;
    return effectiveNumber > 0 && temperature > 0;
  }

  /** The row's masses, largest first; false where one is not a number at or above 0. */
  private readMasses(index: number): boolean {
    const { mass } = this;
    if (this.massSum !== undefined) {
      const sum = slotValue(this.massSum, index);
      if (!(sum >= 0)) return false;
      if (this.ordering === "oneMassive") {
        mass[0] = sum;
      } else if (sum !== this.sharedSum) {
        // Below an ordering's least sum there is no answer; the single path says so. 0.1 eV is above both.
        if (this.ordering !== "degenerate" && sum < 0.1) return false;
        mass.set(neutrinoMassesFromSum(sum, this.ordering));
        this.sharedSum = sum;
      }
      return true;
    }
    mass.fill(0);
    for (let m = 0; m < this.masses.length; m++) {
      mass[m] = slotValue(this.masses[m], index);
      if (!(mass[m] >= 0)) return false;
    }
    if (mass[0] < mass[1]) swap(mass, 0, 1);
    if (mass[1] < mass[2]) swap(mass, 1, 2);
    if (mass[0] < mass[1]) swap(mass, 0, 1);
    return true;
  }
}

function swap(values: Float64Array, i: number, j: number): void {
  const held = values[i];
  values[i] = values[j];
  values[j] = held;
}
