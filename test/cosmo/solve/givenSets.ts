/**
 * Sets of givens that close a model: what is dropped from a full model and what is given in its place. Each determines the model
 * (the two that meet two models say which one is meant).
 */
export interface GivenSet {
  readonly name: string;
  /** Number fields of the plain model kept as they are: hubble, baryonDensity, coldMatterDensity and options. */
  readonly keep: readonly string[];
  /** Derived quantities given in their place. */
  readonly give: readonly string[];
  readonly solveFor?: readonly string[];
  /** The open parameter that solveNear points near its true value: these givens meet two models. */
  readonly near?: string;
}

const densities = ["baryonDensity", "coldMatterDensity"];
const plain = ["hubble", "baryonDensity", "coldMatterDensity"];

export const givenSets: readonly GivenSet[] = [
  { name: "theta_* for hubble", keep: densities, give: ["acousticAngle"] },
  { name: "l_A for hubble", keep: densities, give: ["acousticMultipole"] },
  { name: "age for hubble", keep: densities, give: ["age"] },
  { name: "h for hubble", keep: densities, give: ["reducedHubble"] },
  { name: "r_drag h for hubble", keep: densities, give: ["dragSoundHorizonTimesReducedHubble"] },
  { name: "Omega_m and omega_m for hubble", keep: ["baryonDensity"], give: ["matterFraction", "matterDensity"] },
  { name: "Omega_m with hubble for cold matter", keep: ["hubble", "baryonDensity"], give: ["matterFraction"] },
  { name: "omega_m for cold matter", keep: ["hubble", "baryonDensity"], give: ["matterDensity"] },
  { name: "z_eq for cold matter", keep: ["hubble", "baryonDensity"], give: ["equalityRedshift"] },
  { name: "k_eq for cold matter", keep: ["hubble", "baryonDensity"], give: ["equalityWavenumber"] },
  { name: "r_drag for cold matter", keep: ["hubble", "baryonDensity"], give: ["dragSoundHorizon"] },
  { name: "r_* for cold matter", keep: ["hubble", "baryonDensity"], give: ["lastScatteringSoundHorizon"] },
  { name: "age for cold matter", keep: ["hubble", "baryonDensity"], give: ["age"] },
  { name: "Omega_b for the baryons", keep: ["hubble", "coldMatterDensity"], give: ["baryonFraction"] },
  { name: "r_drag for the baryons", keep: ["hubble", "coldMatterDensity"], give: ["dragSoundHorizon"] },
  { name: "z_drag for the baryons", keep: ["hubble", "coldMatterDensity"], give: ["dragRedshift"] },
  { name: "theta_* and z_eq", keep: ["baryonDensity"], give: ["acousticAngle", "equalityRedshift"] },
  { name: "theta_* and Omega_m", keep: ["baryonDensity"], give: ["acousticAngle", "matterFraction"] },
  { name: "age and r_drag", keep: ["baryonDensity"], give: ["age", "dragSoundHorizon"] },
  {
    name: "Omega_m h^3 and r_drag",
    keep: ["baryonDensity"],
    give: ["matterFractionTimesCubedHubble", "dragSoundHorizon"],
  },
  { name: "theta_*, z_eq and r_drag", keep: [], give: ["acousticAngle", "equalityRedshift", "dragSoundHorizon"] },
  {
    name: "Omega_b, Omega_m and theta_*",
    keep: [],
    give: ["baryonFraction", "matterFraction", "acousticAngle"],
    near: "hubble",
  },
  {
    name: "theta_* for the curvature",
    keep: plain,
    give: ["acousticAngle"],
    solveFor: ["curvature"],
    near: "curvature",
  },
  { name: "Omega_DE for the curvature", keep: plain, give: ["darkEnergyFraction"] },
  { name: "shift parameter for w0", keep: plain, give: ["shiftParameter"], solveFor: ["darkEnergy.w0"] },
  { name: "z_eq for N_eff", keep: plain, give: ["equalityRedshift"], solveFor: ["neutrinos.effectiveNumber"] },
  { name: "omega_nu for the masses", keep: plain, give: ["neutrinoDensity"] },
  { name: "omega_gamma for T_cmb", keep: plain, give: ["photonDensity"] },
  { name: "z_* for the helium", keep: plain, give: ["lastScatteringRedshift"], solveFor: ["helium"], near: "helium" },
];
