import { fitQuantity, type PublishedFit } from "./publishedFit";

const komatsuFit: PublishedFit = {
  source: "komatsu2011",
  label: "Komatsu et al. 2011, eq. 26",
  statement: "at most 0.34% off the exact integral (measured)",
  limits: [],
};

/**
 * Energy density of a massive neutrino species over that of a massless one: [1 + (0.3173 y)^1.83]^(1/1.83).
 *
 * @param y m c^2/(k T_nu), 0 or more. At most 0.34% off the exact integral (measured). Source: Komatsu et al. 2011, eq. 26.
 * @example komatsuNeutrinoEnergy(0) // 1
 */
export function komatsuNeutrinoEnergy(y: number): number {
  const power = 1.83;
  return (1 + (0.3173 * y) ** power) ** (1 / power);
}

export const neutrinoDensityKomatsuQuantity = fitQuantity({
  name: "neutrinoDensity.komatsu2011",
  symbol: "ω_ν",
  unit: "",
  description: "Massive neutrinos today by a published fit",
  equation: String.raw`\omega_\nu = \omega_\mathrm{massless}\sum_i [1 + (0.3173\,y_i)^{1.83}]^{1/1.83}`,
  fit: komatsuFit,
  compute: ({ neutrinos, constants }) => {
    const perElectronvolt = constants.elementaryCharge / (constants.boltzmann * neutrinos.temperature);
    const energies = neutrinos.masses.map((mass) => komatsuNeutrinoEnergy(mass * perElectronvolt));
    return neutrinos.masslessSpeciesDensity * energies.reduce((sum, energy) => sum + energy, 0);
  },
});
