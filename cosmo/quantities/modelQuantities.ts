import { NoAnswerError } from "../errors";
import type { ModelQuantity } from "../expansion";
import type { ClosedModel } from "../model";
import type { SourceKey } from "../sources";

/** What today's numbers of a closed model are called; reading them costs nothing. */
interface ModelNumber {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  readonly description: string;
  readonly equation: string;
  readonly read: (model: ClosedModel) => number;
  readonly sources?: (model: ClosedModel) => readonly SourceKey[];
  /** Relative; rounding unless given. */
  readonly accuracy?: number;
}

/** What the tables behind the Fermi-Dirac integral are good for. */
const fermiDiracAccuracy = 1e-14;

const constantsSource = (model: ClosedModel): readonly SourceKey[] => [model.conventions.constants];

const heliumSource = (model: ClosedModel): readonly SourceKey[] =>
  model.heliumSource === "nucleosynthesis" ? ["planck2015Parameters"] : [];

const temperatureSource = (model: ClosedModel): readonly SourceKey[] =>
  model.givens.photonTemperature === undefined ? ["fixsen2009"] : [];

const effectiveNumberSource = (model: ClosedModel): readonly SourceKey[] =>
  model.givens.neutrinos?.effectiveNumber === undefined ? ["bennett2021", "froustey2020"] : [];

const equationOfStateSource = ({ darkEnergy }: ClosedModel): readonly SourceKey[] =>
  darkEnergy.equation === undefined && darkEnergy.table === undefined ? ["chevallierPolarski2001", "linder2003"] : [];

const modelNumbers: readonly ModelNumber[] = [
  {
    name: "hubble",
    symbol: "H_0",
    unit: "km/s/Mpc",
    description: "Expansion rate today; the normalizing one under radiationOnTop",
    equation: "H_0",
    read: (model) => model.hubble,
  },
  {
    name: "reducedHubble",
    symbol: "h",
    unit: "",
    description: "H_0 in units of 100 km/s/Mpc",
    equation: String.raw`h = H_0/(100\,\mathrm{km/s/Mpc})`,
    read: (model) => model.reducedHubble,
  },
  {
    name: "baryonDensity",
    symbol: "ω_b",
    unit: "",
    description: "Baryons today, Omega_b h^2",
    equation: String.raw`\omega_b = \Omega_b h^2`,
    read: (model) => model.baryonDensity,
  },
  {
    name: "coldMatterDensity",
    symbol: "ω_c",
    unit: "",
    description: "Cold matter today, Omega_c h^2",
    equation: String.raw`\omega_c = \Omega_c h^2`,
    read: (model) => model.coldMatterDensity,
  },
  {
    name: "matterDensity",
    symbol: "ω_m",
    unit: "",
    description: "All matter today with massive neutrinos, Omega_m h^2",
    equation: String.raw`\omega_m = \omega_b + \omega_c + \omega_\nu`,
    read: (model) => model.matterDensity,
  },
  {
    name: "neutrinoDensity",
    symbol: "ω_ν",
    unit: "",
    description: "Massive neutrinos today by their whole energy density, Omega_nu h^2",
    equation: String.raw`\omega_\nu = \frac{15}{\pi^4}\left(\frac{T_\nu}{T}\right)^4 \omega_\gamma \sum_i \int_0^\infty \frac{x^2\sqrt{x^2+y_i^2}}{e^x+1}\,dx`,
    read: (model) => model.neutrinoDensity,
    sources: constantsSource,
    accuracy: fermiDiracAccuracy,
  },
  {
    name: "darkEnergyDensity",
    symbol: "ω_DE",
    unit: "",
    description: "Dark energy today, Omega_DE h^2",
    equation: String.raw`\omega_{DE} = \Omega_{DE} h^2`,
    read: (model) => model.darkEnergyDensity,
  },
  {
    name: "photonDensity",
    symbol: "ω_γ",
    unit: "",
    description: "Photons today, Omega_gamma h^2",
    equation: String.raw`\omega_\gamma = \frac{4\sigma_{SB} T^4}{c^3 \rho_{100}}`,
    read: (model) => model.photonDensity,
    sources: constantsSource,
  },
  {
    name: "radiationDensity",
    symbol: "ω_r",
    unit: "",
    description: "Photons and massless neutrinos today, Omega_r h^2",
    equation: String.raw`\omega_r = \omega_\gamma\left[1 + \frac{7}{8}\left(\frac{4}{11}\right)^{4/3}\frac{N_{eff}}{3}\,N_{massless}\right]`,
    read: (model) => model.radiationDensity,
    sources: constantsSource,
  },
  {
    name: "baryonFraction",
    symbol: "Ω_b",
    unit: "",
    description: "Baryons over the critical density today",
    equation: String.raw`\Omega_b = \omega_b/h^2`,
    read: (model) => model.baryonFraction,
  },
  {
    name: "coldMatterFraction",
    symbol: "Ω_c",
    unit: "",
    description: "Cold matter over the critical density today",
    equation: String.raw`\Omega_c = \omega_c/h^2`,
    read: (model) => model.coldMatterFraction,
  },
  {
    name: "matterFraction",
    symbol: "Ω_m",
    unit: "",
    description: "All matter with massive neutrinos over the critical density today",
    equation: String.raw`\Omega_m = \omega_m/h^2`,
    read: (model) => model.matterFraction,
  },
  {
    name: "neutrinoFraction",
    symbol: "Ω_ν",
    unit: "",
    description: "Massive neutrinos over the critical density today",
    equation: String.raw`\Omega_\nu = \omega_\nu/h^2`,
    read: (model) => model.neutrinoFraction,
    sources: constantsSource,
    accuracy: fermiDiracAccuracy,
  },
  {
    name: "darkEnergyFraction",
    symbol: "Ω_DE",
    unit: "",
    description: "Dark energy over the critical density today",
    equation: String.raw`\Omega_{DE} = \omega_{DE}/h^2`,
    read: (model) => model.darkEnergyFraction,
  },
  {
    name: "photonFraction",
    symbol: "Ω_γ",
    unit: "",
    description: "Photons over the critical density today",
    equation: String.raw`\Omega_\gamma = \omega_\gamma/h^2`,
    read: (model) => model.photonFraction,
    sources: constantsSource,
  },
  {
    name: "radiationFraction",
    symbol: "Ω_r",
    unit: "",
    description: "Photons and massless neutrinos over the critical density today",
    equation: String.raw`\Omega_r = \omega_r/h^2`,
    read: (model) => model.radiationFraction,
    sources: constantsSource,
  },
  {
    name: "curvature",
    symbol: "Ω_k",
    unit: "",
    description: "Curvature today, positive for an open model",
    equation: String.raw`\Omega_k`,
    read: (model) => model.curvature,
  },
  {
    name: "matterFractionTimesCubedHubble",
    symbol: "Ω_m h^3",
    unit: "",
    description: "Omega_m h^3, the combination that the acoustic scale fixes best",
    equation: String.raw`\Omega_m h^3 = \omega_m h`,
    read: (model) => model.matterDensity * model.reducedHubble,
  },
  {
    name: "scalarSpectralIndex",
    symbol: "n_s",
    unit: "",
    description: "Spectral index of the primordial fluctuations, read by the peak fits only",
    equation: "n_s",
    read: (model) => model.scalarSpectralIndex,
  },
  {
    name: "darkEnergy.w0",
    symbol: "w_0",
    unit: "",
    description: "Equation of state of the dark energy today",
    equation: "w(a) = w_0 + w_a (1-a)",
    read: (model) => model.darkEnergy.w0,
    sources: equationOfStateSource,
  },
  {
    name: "darkEnergy.wa",
    symbol: "w_a",
    unit: "",
    description: "Change of the equation of state with 1 - a",
    equation: "w(a) = w_0 + w_a (1-a)",
    read: ({ darkEnergy }) => {
      if (darkEnergy.equation !== undefined || darkEnergy.table !== undefined) {
        const form = darkEnergy.equation === undefined ? "a table" : "a formula";
        const hint = "ask for equationOfStateAt(z)";
        throw new NoAnswerError({
          where: "darkEnergy.wa",
          reason: `w of this model follows ${form}, it has no wa`,
          hint,
        });
      }
      return darkEnergy.wa;
    },
    sources: equationOfStateSource,
  },
  {
    name: "neutrinos.effectiveNumber",
    symbol: "N_eff",
    unit: "",
    description: "Effective number of neutrino species while they were relativistic",
    equation: "N_{eff}",
    read: (model) => model.neutrinos.effectiveNumber,
    sources: effectiveNumberSource,
  },
  {
    name: "neutrinos.massSum",
    symbol: "Σm_ν",
    unit: "eV",
    description: "Sum of the neutrino masses",
    equation: String.raw`\sum m_\nu`,
    read: (model) => model.neutrinos.masses.reduce((sum, mass) => sum + mass, 0),
  },
  {
    name: "photonTemperature",
    symbol: "T_cmb",
    unit: "K",
    description: "Temperature of the background radiation today",
    equation: "T_{cmb}",
    read: (model) => model.photonTemperature,
    sources: temperatureSource,
  },
  {
    name: "helium",
    symbol: "Y_p",
    unit: "",
    description: "Helium by mass",
    equation: String.raw`Y_p = \rho_{He}/\rho_b`,
    read: (model) => model.helium,
    sources: heliumSource,
  },
];

/** Today's numbers of the closed model as quantities: densities, fractions, and what they stand on. Accuracy: rounding. */
export const modelQuantities: readonly ModelQuantity[] = modelNumbers.map(
  ({ name, symbol, unit, description, equation, read, sources, accuracy = 1e-15 }) => ({
    name,
    symbol,
    unit,
    arguments: [],
    description,
    equation,
    method: "read from the closed model",
    accuracy,
    sources: sources ?? [],
    compute: (evaluation) => {
      const value = read(evaluation.model);
      return { value, error: accuracy * Math.abs(value) };
    },
  }),
);
