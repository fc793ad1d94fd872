/**
 * The free parameters of a model, each a slot that some given must fill. A given that names a slot's parameter in another
 * form (Omega_b for omega_b) fills it too; whatever else is given must follow, or be solved for.
 */
export interface Slot {
  /** The parameter that is solved for when no given fills the slot. */
  readonly parameter: string;
  /** Givens that fill the slot, the parameter first. */
  readonly fillers: readonly string[];
  /** Whether the model needs it: the others have defaults. */
  readonly required: boolean;
  /** Quantities that set this slot free of its default by themselves when they are given. */
  readonly determiners: readonly string[];
  /** Where a search starts. */
  readonly start: number;
  /** Where the parameter may lie while it is searched. */
  readonly range: readonly [number, number];
  /** Searched in its logarithm: positive over decades. */
  readonly logarithmic: boolean;
  /** In words, for errors. */
  readonly subject: string;
}

export const slots: readonly Slot[] = [
  {
    parameter: "hubble",
    fillers: ["hubble", "reducedHubble"],
    required: true,
    determiners: [],
    start: 68,
    range: [20, 200],
    logarithmic: true,
    subject: "the expansion rate today",
  },
  {
    parameter: "baryonDensity",
    fillers: ["baryonDensity", "baryonFraction"],
    required: true,
    determiners: [],
    start: 0.0224,
    range: [1e-3, 0.2],
    logarithmic: true,
    subject: "the baryons",
  },
  {
    parameter: "coldMatterDensity",
    fillers: ["coldMatterDensity", "coldMatterFraction", "matterDensity", "matterFraction"],
    required: true,
    determiners: [],
    start: 0.12,
    range: [1e-3, 2],
    logarithmic: true,
    subject: "the cold matter",
  },
  {
    parameter: "curvature",
    fillers: ["curvature", "darkEnergyDensity", "darkEnergyFraction"],
    required: false,
    determiners: [],
    start: 0,
    range: [-0.6, 0.95],
    logarithmic: false,
    subject: "the curvature",
  },
  {
    parameter: "darkEnergy.w0",
    fillers: ["darkEnergy.w0"],
    required: false,
    determiners: [],
    start: -1,
    range: [-3, -0.1],
    logarithmic: false,
    subject: "w0",
  },
  {
    parameter: "darkEnergy.wa",
    fillers: ["darkEnergy.wa"],
    required: false,
    determiners: [],
    start: 0,
    range: [-3, 2],
    logarithmic: false,
    subject: "wa",
  },
  {
    parameter: "neutrinos.effectiveNumber",
    fillers: ["neutrinos.effectiveNumber"],
    required: false,
    determiners: ["radiationDensity", "radiationFraction"],
    start: 3,
    range: [0.05, 20],
    logarithmic: false,
    subject: "N_eff",
  },
  {
    parameter: "neutrinos.massSum",
    fillers: ["neutrinos.massSum", "neutrinos.masses"],
    required: false,
    determiners: ["neutrinoDensity", "neutrinoFraction"],
    start: 0.12,
    range: [1e-3, 10],
    logarithmic: false,
    subject: "the neutrino masses",
  },
  {
    parameter: "photonTemperature",
    fillers: ["photonTemperature"],
    required: false,
    determiners: ["photonDensity", "photonFraction"],
    start: 2.7255,
    range: [0.5, 10],
    logarithmic: true,
    subject: "the temperature of the background",
  },
  {
    parameter: "helium",
    fillers: ["helium"],
    required: false,
    determiners: [],
    start: 0.245,
    range: [0.01, 0.6],
    logarithmic: false,
    subject: "helium",
  },
  {
    parameter: "reionizationRedshift",
    fillers: ["reionizationRedshift", "reionizationDepth"],
    required: false,
    determiners: [],
    start: 8,
    range: [0.1, 44],
    logarithmic: false,
    subject: "reionization",
  },
];
