import { expansionPart, type ModelPart } from "./expansion";

/** Where dark energy would matter to recombination and the sound horizon: z = 1000 to 1e6, even in ln(1+z). */
const latest = 1000;
const earliest = 1e6;
const points = 60;

/** Share of the density above which it is said. */
const noteworthy = 1e-4;

/** Share above which fits and calibrations, made without it, should not be trusted. */
const serious = 1e-2;

/**
 * The largest share of dark energy in the density between z = 1000 and 1e6, and where. A part that numbers of last scattering and of
 * the sound horizon ask for, so that they carry its note.
 */
export const earlyDarkEnergySharePart: ModelPart<{ readonly share: number; readonly redshift: number }> = {
  name: "largest early share of dark energy",
  compute: (evaluation) => {
    const expansion = evaluation.once(expansionPart);
    let share = 0;
    let redshift = latest;
    if (expansion.darkEnergy === 0) return { share, redshift };
    for (let i = 0; i <= points; i++) {
      const z = latest * (earliest / latest) ** (i / points);
      const a = 1 / (1 + z);
      const here = Math.abs(expansion.darkEnergyTerm(a) / expansion.squaredTerm(a));
      if (here > share) {
        share = here;
        redshift = z;
      }
    }
    return { share, redshift };
  },
  notes: (evaluation) => {
    const { share, redshift } = evaluation.once(earlyDarkEnergySharePart);
    if (!(share > noteworthy)) return [];
    const percent = Number((100 * share).toPrecision(2));
    return [
      {
        level: share > serious ? "warning" : "note",
        text: `dark energy matters before last scattering: ${percent}% of the density at z = ${Number(redshift.toPrecision(3))}; fits and the calibrated tier were made without it`,
      },
    ];
  },
};
