import { CosmologyError } from "../errors";
import type { ModelEvaluation, ModelPart } from "../expansion";
import type { ValidityNote } from "../quantity";
import { gasPart } from "./gas";
import { atomSettings, equilibriumAt, type IonizationHistory, kineticHistory } from "./ionizationHistory";
import { tierNotes } from "./tierStatement";

/** The three-level atom of the model, whatever its tier: what equilibrium is measured against. Undefined where it has none. */
const kineticComparisonPart: ModelPart<IonizationHistory | undefined> = {
  name: "three-level atom beside equilibrium",
  compute: (evaluation) => {
    try {
      return kineticHistory(evaluation, "peebles", atomSettings("peebles"));
    } catch (failure) {
      if (failure instanceof CosmologyError) return undefined;
      throw failure;
    }
  },
};

/** Temperature of the background around which photons last scatter, K: for numbers that are asked without a redshift. */
const lastScatteringTemperature = 2970;

/** Departures below this are not worth a warning. */
const slight = 0.01;

/**
 * What a reader must know of the tier before using the number; for Saha equilibrium with the size of its departure from the
 * three-level atom at the redshift.
 *
 * @param z the redshift that the number was asked at; without one, that of 2970 K.
 */
export function recombinationNotes(evaluation: ModelEvaluation, z?: number): readonly ValidityNote[] {
  const { model } = evaluation;
  if (model.recombination !== "saha") return tierNotes(model);
  const comparison = evaluation.once(kineticComparisonPart);
  if (comparison === undefined) return tierNotes(model);
  const t = z === undefined ? Math.log(lastScatteringTemperature / model.photonTemperature) : Math.log1p(z);
  const equilibrium = equilibriumAt(t, evaluation.once(gasPart)).ionized;
  const kinetic = comparison.ionized(t);
  const ratio = equilibrium / kinetic;
  const at = `z = ${Number(Math.expm1(t).toPrecision(5))}`;
  const digits = (value: number) => Number(value.toPrecision(3));
  if (Math.abs(ratio - 1) < slight) {
    const percent = Math.max(0.01, digits(100 * Math.abs(ratio - 1)));
    return [
      { level: "note", text: `Saha equilibrium at ${at}: x_e within ${percent}% of the three-level atom (peebles)` },
    ];
  }
  const size =
    ratio < 0.5
      ? `${digits(1 / ratio)} times too low`
      : `${digits(100 * Math.abs(ratio - 1))}% too ${ratio < 1 ? "low" : "high"}`;
  return [
    {
      level: "warning",
      text: `Saha equilibrium at ${at}: x_e is ${digits(equilibrium)} where the three-level atom (peebles) has ${digits(kinetic)}, ${size}; hydrogen has left equilibrium`,
    },
  ];
}
