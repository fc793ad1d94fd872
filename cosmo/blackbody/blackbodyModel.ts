import type { ConstantsSet } from "../constants";
import { DomainError } from "../errors";
import type { Quantity } from "../quantity";

/** What of a model the background's spectrum hangs on. Stands above `model/`, so it names the fields itself. */
export interface BlackbodyModel {
  /** T_cmb, K. */
  readonly photonTemperature: number;
  readonly constants: ConstantsSet;
}

/** A quantity of blackbody radiation. */
export type BlackbodyQuantity = Quantity<BlackbodyModel>;

/** Refuses a temperature that is not finite and positive. */
export function requireTemperature(temperature: number, where: string): void {
  if (!(temperature > 0 && Number.isFinite(temperature))) {
    throw new DomainError({ where, argument: "temperature", rule: "must be finite and positive", value: temperature });
  }
}
