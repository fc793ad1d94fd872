import { NoAnswerError } from "../errors";
import type { ClosedModel } from "../model";
import type { ValidityNote } from "../quantity";
import type { ModelEvaluation, ModelQuantity } from "./expansion";
import { fermiDiracEnergy } from "./fermiDirac";
import { massToTemperature } from "./neutrinoDensity";

/**
 * Redshift at which matter and radiation were equally dense.
 *
 * 1 + z_eq = omega_X/{omega_gamma [1 + (7/8) (4/11)^(4/3) N_eff]}: all neutrinos count as radiation. omega_X is baryons and cold
 * matter (`conventions.equalityMatter: "baryonsAndCold"`, the default, as in the Planck tables) or all matter of today (`allMatter`).
 *
 * Without radiation or without matter: NoAnswerError. Closed form; accuracy 1e-14.
 * Source: Planck 2018 VI, Table 2 (the definition that reproduces its column).
 * @example equalityRedshift(evaluation) // 3400 near Planck's parameters
 */
export function equalityRedshift(evaluation: ModelEvaluation): number {
  const { model } = evaluation;
  const matter =
    model.conventions.equalityMatter === "allMatter"
      ? model.matterDensity
      : model.baryonDensity + model.coldMatterDensity;
  const radiation = model.photonDensity + 3 * model.neutrinos.masslessSpeciesDensity;
  if (!(radiation > 0 && matter > 0)) {
    throw new NoAnswerError({
      where: "equalityRedshift",
      reason: `this model has no ${radiation > 0 ? "matter" : "radiation"}, so matter and radiation were never equal`,
    });
  }
  return matter / radiation - 1;
}

/** Excess of a massive species' energy over a massless one's at equality above which the definition is worth a word. */
const noteworthy = 0.01;

/** Massive neutrinos that are slow already at equality, though the definition counts them as radiation; with the size. */
function slowNeutrinoNote({ model }: ModelEvaluation, z: number): readonly ValidityNote[] {
  const { masses } = model.neutrinos;
  const excess = masses.map((mass) => energyExcess(model, mass, z));
  if (!(excess.length > 0 && excess[0]! > noteworthy)) return [];
  const { masslessSpeciesDensity } = model.neutrinos;
  const radiation = model.photonDensity + 3 * masslessSpeciesDensity;
  const share = (masslessSpeciesDensity * excess.reduce((sum, each) => sum + each, 0)) / radiation;
  const percent = (value: number) => `${Number((100 * value).toPrecision(2))}%`;
  return [
    {
      level: share > noteworthy ? "warning" : "note",
      text: `massive neutrinos are no longer fully relativistic at equality: one of ${masses[0]} eV carries ${percent(excess[0]!)} more energy than a massless one there, ${percent(share)} of the radiation, and counts as radiation in this definition`,
    },
  ];
}

function energyExcess(model: ClosedModel, mass: number, z: number): number {
  return fermiDiracEnergy(massToTemperature(mass, model.neutrinos.temperature, model.constants) / (1 + z)) - 1;
}

export const equalityRedshiftQuantity: ModelQuantity = {
  name: "equalityRedshift",
  symbol: "z_eq",
  unit: "",
  arguments: [],
  description: "Redshift of equal densities of matter and radiation",
  equation: String.raw`1 + z_{eq} = \frac{\omega_X}{\omega_\gamma\,[1 + \frac{7}{8}(\frac{4}{11})^{4/3} N_{eff}]}`,
  method: "closed form; all neutrinos count as radiation",
  accuracy: 1e-14,
  sources: ["planck2018Parameters"],
  notes: (evaluation) => [
    {
      level: "note",
      text:
        evaluation.model.conventions.equalityMatter === "allMatter"
          ? "matter at equality: baryons, cold matter and massive neutrinos (conventions.equalityMatter)"
          : "matter at equality: baryons and cold matter (conventions.equalityMatter)",
    },
    ...slowNeutrinoNote(evaluation, equalityRedshift(evaluation)),
  ],
  compute: (evaluation) => ({ value: equalityRedshift(evaluation), error: 0 }),
};
