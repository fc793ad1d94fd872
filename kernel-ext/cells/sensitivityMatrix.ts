import type { QuantityRequest } from "../../cosmo/quantities";
import type { QuantityValue } from "../../cosmo/quantity";
import type { Derivative } from "../../cosmo/solve";
import type { SensitivityParameter } from "./sensitivityParameters";

/** A quantity whose derivatives are shown. */
export interface SensitivityColumn {
  readonly request: QuantityRequest;
  readonly value: QuantityValue;
  /** Whether its logarithm is differentiated: where it is positive and no magnitude. */
  readonly logarithmic: boolean;
}

/** One derivative of the matrix. */
export interface SensitivityEntry {
  readonly column: SensitivityColumn;
  readonly parameter: SensitivityParameter;
  readonly slope: Derivative;
  /** The slope as the matrix has it. */
  readonly shown: number;
}
