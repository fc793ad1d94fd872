/** What a field of a model takes; validation, completion and the columns of files read it here. */
export interface ModelField {
  /** Flat name, dots for nesting: "darkEnergy.w0". */
  readonly name: string;
  readonly symbol: string;
  /** "" for a pure number. */
  readonly unit: string;
  readonly kind: "number" | "numberList" | "choice" | "numberOrChoice" | "equation" | "table";
  /** The rule for numbers, as an error says it. */
  readonly rule: string;
  readonly accepts: (value: number) => boolean;
  readonly choices?: readonly string[];
  /** The default in words, where there is one. */
  readonly defaultText?: string;
  readonly description: string;
}

const finite = (value: number) => Number.isFinite(value);
const positive = (value: number) => value > 0 && Number.isFinite(value);
const notNegative = (value: number) => value >= 0 && Number.isFinite(value);

const positiveRule = "must be finite and positive";
const notNegativeRule = "must be finite and not negative";
const finiteRule = "must be a finite number";

function numberField(
  name: string,
  symbol: string,
  unit: string,
  limit: "positive" | "notNegative" | "finite",
  description: string,
  defaultText?: string,
): ModelField {
  const rule = limit === "positive" ? positiveRule : limit === "notNegative" ? notNegativeRule : finiteRule;
  const accepts = limit === "positive" ? positive : limit === "notNegative" ? notNegative : finite;
  const field = { name, symbol, unit, kind: "number" as const, rule, accepts, description };
  return defaultText === undefined ? field : { ...field, defaultText };
}

function choiceField(name: string, choices: readonly string[], description: string): ModelField {
  return {
    name,
    symbol: "",
    unit: "",
    kind: "choice",
    rule: `must be one of ${choices.join(", ")}`,
    accepts: () => false,
    choices,
    defaultText: choices[0]!,
    description,
  };
}

/** Every field of a model, in the order in which tables list them. The first choice of a list is the default. */
export const modelFields: readonly ModelField[] = [
  numberField("hubble", "H_0", "km/s/Mpc", "positive", "Expansion rate today"),
  numberField("reducedHubble", "h", "", "positive", "H_0 in units of 100 km/s/Mpc"),
  numberField("baryonDensity", "ω_b", "", "notNegative", "Baryons, Omega_b h^2"),
  numberField("baryonFraction", "Ω_b", "", "notNegative", "Baryons today"),
  numberField("coldMatterDensity", "ω_c", "", "notNegative", "Cold matter, Omega_c h^2"),
  numberField("coldMatterFraction", "Ω_c", "", "notNegative", "Cold matter today"),
  numberField("matterDensity", "ω_m", "", "notNegative", "All matter with massive neutrinos, Omega_m h^2"),
  numberField("matterFraction", "Ω_m", "", "notNegative", "All matter today, massive neutrinos included"),
  numberField("curvature", "Ω_k", "", "finite", "Curvature today, positive for an open model", "0"),
  numberField("darkEnergyDensity", "ω_DE", "", "finite", "Dark energy, Omega_DE h^2"),
  numberField("darkEnergyFraction", "Ω_DE", "", "finite", "Dark energy today"),
  numberField("darkEnergy.w0", "w_0", "", "finite", "Equation of state today", "-1"),
  numberField("darkEnergy.wa", "w_a", "", "finite", "Change of the equation of state with 1 - a", "0"),
  {
    name: "darkEnergy.equation",
    symbol: "w",
    unit: "",
    kind: "equation",
    rule: "must be a formula in z or in a, such as -1 + 0.1 z/(1 + z)",
    accepts: () => false,
    description: "Equation of state as a formula, in place of w_0 and w_a",
  },
  {
    name: "darkEnergy.table",
    symbol: "w",
    unit: "",
    kind: "table",
    rule: "must be an object with lists redshifts and values",
    accepts: () => false,
    description: "Equation of state as a table over redshift, in place of w_0 and w_a",
  },
  numberField("neutrinos.effectiveNumber", "N_eff", "", "notNegative", "Effective number of neutrino species", "3.044"),
  {
    name: "neutrinos.masses",
    symbol: "m_ν",
    unit: "eV",
    kind: "numberList",
    rule: "must be a list of at most three finite masses, none negative",
    accepts: notNegative,
    defaultText: "0.06",
    description: "Neutrino masses",
  },
  numberField("neutrinos.massSum", "Σm_ν", "eV", "notNegative", "Sum of the neutrino masses, in place of the list"),
  choiceField(
    "neutrinos.ordering",
    ["oneMassive", "degenerate", "normal", "inverted"],
    "How the sum of the neutrino masses is shared",
  ),
  numberField("photonTemperature", "T_cmb", "K", "notNegative", "Temperature of the background today", "2.7255"),
  {
    name: "helium",
    symbol: "Y_p",
    unit: "",
    kind: "numberOrChoice",
    rule: 'must be at least 0 and below 1 (a mass fraction), or "nucleosynthesis"',
    accepts: (value) => value >= 0 && value < 1,
    choices: ["nucleosynthesis"],
    defaultText: "nucleosynthesis",
    description: "Helium by mass",
  },
  numberField("reionizationRedshift", "z_re", "", "positive", "Middle of the reionization of hydrogen"),
  numberField("reionizationDepth", "τ", "", "positive", "Optical depth of reionization"),
  choiceField("recombination", ["calibrated", "peebles", "saha"], "How recombination is computed"),
  numberField("scalarSpectralIndex", "n_s", "", "finite", "Spectral index, for the peak fits only", "0.965"),
  choiceField(
    "conventions.constants",
    ["codata2022", "codata2018", "codata2014", "codata2010"],
    "Set of physical constants",
  ),
  choiceField(
    "conventions.closure",
    ["radiationInside", "radiationOnTop"],
    "Whether radiation counts when the densities are closed to one",
  ),
  choiceField("conventions.equalityMatter", ["baryonsAndCold", "allMatter"], "The matter that defines equality"),
  choiceField("conventions.lastScattering", ["full", "huSugiyama1996"], "How z_* is found"),
  choiceField("conventions.drag", ["full", "eisensteinHu1998"], "How z_drag is found"),
  choiceField(
    "conventions.soundHorizon",
    ["full", "eisensteinHu1998", "aubourg2015", "brieden2023"],
    "How sound horizons are found",
  ),
];

/** A field by its flat name. */
export const modelFieldByName: ReadonlyMap<string, ModelField> = new Map(
  modelFields.map((field) => [field.name, field]),
);
