import type * as heliumEscape from "../../cosmo/batch/heliumEscape";
import type * as blackbodyChromaticity from "../../cosmo/blackbody/blackbodyChromaticity";
import type * as colorMatching from "../../cosmo/blackbody/colorMatching";
import type * as photonNumberDensity from "../../cosmo/blackbody/photonNumberDensity";
import type * as planckLaw from "../../cosmo/blackbody/planckLaw";
import type * as wienFrequency from "../../cosmo/blackbody/wienFrequency";
import type * as wienWavelength from "../../cosmo/blackbody/wienWavelength";
import type * as astronomicalUnits from "../../cosmo/constants/astronomicalUnits";
import type * as atoms from "../../cosmo/constants/atoms";
import type * as constantsSets from "../../cosmo/constants/constantsSets";
import type * as neutrinoDensity from "../../cosmo/expansion/neutrinoDensity";
import type * as fits from "../../cosmo/fits";
import type { NeutrinoOrdering } from "../../cosmo/model";
import type * as neutrinoMasses from "../../cosmo/model/neutrinoMasses";
import type * as photonDensity from "../../cosmo/model/photonDensity";
import type * as gas from "../../cosmo/recombination/gas";
import type { Gas } from "../../cosmo/recombination/gas";
import type * as heliumRates from "../../cosmo/recombination/heliumRates";
import type * as hydrogenRates from "../../cosmo/recombination/hydrogenRates";
import type * as lymanAlphaCorrection from "../../cosmo/recombination/lymanAlphaCorrection";
import type * as nucleosynthesisHelium from "../../cosmo/recombination/nucleosynthesisHelium";
import type * as reionizationProfile from "../../cosmo/recombination/reionizationProfile";
import type * as sahaFactors from "../../cosmo/recombination/sahaFactors";
import type * as threeLevelAtom from "../../cosmo/recombination/threeLevelAtom";
import type * as evaluateModel from "../../cosmo/solve/evaluateModel";
import type { FormulaArgument } from "./readFormulas";
import { referenceModels } from "./readReferences";

/** The modules of cosmo/ whose formulas have references, by their place below cosmo/. */
export interface FormulaModules {
  readonly "batch/heliumEscape": typeof heliumEscape;
  readonly "blackbody/blackbodyChromaticity": typeof blackbodyChromaticity;
  readonly "blackbody/colorMatching": typeof colorMatching;
  readonly "blackbody/photonNumberDensity": typeof photonNumberDensity;
  readonly "blackbody/planckLaw": typeof planckLaw;
  readonly "blackbody/wienFrequency": typeof wienFrequency;
  readonly "blackbody/wienWavelength": typeof wienWavelength;
  readonly "constants/astronomicalUnits": typeof astronomicalUnits;
  readonly "constants/atoms": typeof atoms;
  readonly "constants/constantsSets": typeof constantsSets;
  readonly "expansion/neutrinoDensity": typeof neutrinoDensity;
  readonly "fits/index": typeof fits;
  readonly "model/neutrinoMasses": typeof neutrinoMasses;
  readonly "model/photonDensity": typeof photonDensity;
  readonly "recombination/gas": typeof gas;
  readonly "recombination/heliumRates": typeof heliumRates;
  readonly "recombination/hydrogenRates": typeof hydrogenRates;
  readonly "recombination/lymanAlphaCorrection": typeof lymanAlphaCorrection;
  readonly "recombination/nucleosynthesisHelium": typeof nucleosynthesisHelium;
  readonly "recombination/reionizationProfile": typeof reionizationProfile;
  readonly "recombination/sahaFactors": typeof sahaFactors;
  readonly "recombination/threeLevelAtom": typeof threeLevelAtom;
  readonly "solve/evaluateModel": typeof evaluateModel;
}

/** Gives a module of cosmo/: the one that runs, or a copy with a changed coefficient. */
export type LoadModule = <Place extends keyof FormulaModules>(place: Place) => FormulaModules[Place];

type Numbers = number[];

/** One of the functions: the module it stands in, and how the arguments of a row go into it. */
export interface FormulaFunction {
  readonly module: keyof FormulaModules;
  readonly evaluate: (load: LoadModule, ...values: FormulaArgument[]) => number;
}

function entry<Place extends keyof FormulaModules>(
  place: Place,
  evaluate: (module: FormulaModules[Place], values: FormulaArgument[], load: LoadModule) => number,
): FormulaFunction {
  return { module: place, evaluate: (load, ...values) => evaluate(load(place), values, load) };
}

/** A function of numbers alone. */
function plain<Place extends keyof FormulaModules>(
  place: Place,
  pick: (module: FormulaModules[Place]) => (...values: Numbers) => number,
): FormulaFunction {
  return entry(place, (module, values) => pick(module)(...(values as Numbers)));
}

const setOf = (load: LoadModule, name: FormulaArgument) =>
  load("constants/constantsSets").constantsSets[name as constantsSets.ConstantsSetName];

/** A function whose last argument is a constants set. */
function withSet<Place extends keyof FormulaModules>(
  place: Place,
  pick: (module: FormulaModules[Place]) => (...values: never[]) => number,
): FormulaFunction {
  return entry(place, (module, values, load) => {
    const call = pick(module) as (...all: unknown[]) => number;
    return call(...values.slice(0, -1), setOf(load, values[values.length - 1]!));
  });
}

/** A quantity of the register, for a flat model with massless neutrinos and everything else at its default. */
function ofModel(quantity: string): FormulaFunction {
  return entry(
    "solve/evaluateModel",
    (module, [hubble, baryonDensity, coldMatterDensity, helium, photonTemperature, constants, ...own]) => {
      const [z] = own as Numbers;
      const givens = {
        hubble: hubble as number,
        baryonDensity: baryonDensity as number,
        coldMatterDensity: coldMatterDensity as number,
        helium: helium as number,
        photonTemperature: photonTemperature as number,
        neutrinos: { masses: [0, 0, 0] },
        conventions: { constants: constants as constantsSets.ConstantsSetName },
      };
      return quantity === "reionizationDepth"
        ? module.evaluateModel({ ...givens, reionizationRedshift: z! }).value(quantity)
        : module.evaluateModel(givens).value(quantity, ...(own as Numbers));
    },
  );
}

/** A quantity of the register, for one of the reference models in the calibrated tier. */
function ofReferenceModel(quantity: string): FormulaFunction {
  return entry("solve/evaluateModel", (module, [name, ...own]) =>
    module.evaluateModel(referenceModels().get(name as string)!).value(quantity, ...(own as Numbers)),
  );
}

/**
 * 1/(1 + a' g^b') out of the batch engine's table, at one of its points: a line of strength 1 against an ionization of 1 makes
 * C/(C + 1) of it, when nothing else escapes.
 */
function continuumEscape(line: "singlet" | "triplet"): FormulaFunction {
  return entry("batch/heliumEscape", (module, [singletStrength]) => {
    const table = new Float64Array(11);
    const at =
      line === "singlet"
        ? { recombination: 0, decay: 4, ionization: 5 }
        : { recombination: 1, decay: 6, ionization: 7 };
    // So strong that the two-photon decay beside it is nothing.
    const strong = 1e40;
    table[at.recombination] = 1;
    table[5] = table[7] = 1;
    table[at.decay] = table[at.ionization] = strong;
    table[8] = table[9] = 1e300;
    const share = module.lineEscapes(table, 0, 1, module.continuumPlace(singletStrength as number));
    return share / (1 - share);
  });
}

const numberNamed = (module: object, name: FormulaArgument) => (module as Record<string, number>)[name]!;

/** By the name of the file in formulas/. */
export const formulaFunctions: Readonly<Record<string, FormulaFunction>> = {
  constantsSets: entry("constants/constantsSets", (_module, [set, field], load) =>
    numberNamed(setOf(load, set!), field!),
  ),
  atoms: entry("constants/atoms", (module, [name]) => numberNamed(module, name!)),
  astronomicalUnits: entry("constants/astronomicalUnits", (module, [name], load) =>
    numberNamed(name === "lightSpeed" ? load("constants/constantsSets") : module, name!),
  ),
  radiationConstant: withSet("constants/constantsSets", (module) => module.radiationConstant),

  unitDensity: withSet("model/photonDensity", (module) => module.unitDensity),
  photonDensity: withSet("model/photonDensity", (module) => module.photonDensity),
  neutrinoMassesFromSum: entry(
    "model/neutrinoMasses",
    (module, [sum, ordering, which]) =>
      module.neutrinoMassesFromSum(sum as number, ordering as NeutrinoOrdering)[which as number]!,
  ),
  neutrinoTemperature: plain("expansion/neutrinoDensity", (module) => module.neutrinoTemperature),
  masslessSpeciesDensity: plain("expansion/neutrinoDensity", (module) => module.masslessSpeciesDensity),
  massToTemperature: withSet("expansion/neutrinoDensity", (module) => module.massToTemperature),

  caseBRecombination: plain("recombination/hydrogenRates", (module) => module.caseBRecombination),
  excitedIonizationOverRecombination: withSet(
    "recombination/hydrogenRates",
    (module) => module.excitedIonizationOverRecombination,
  ),
  groundIonizationOverRecombination: withSet(
    "recombination/hydrogenRates",
    (module) => module.groundIonizationOverRecombination,
  ),
  lymanAlphaVolume: entry("recombination/hydrogenRates", (module) => module.lymanAlphaVolume),
  peeblesFactor: plain("recombination/hydrogenRates", (module) => module.peeblesFactor),
  levelTemperature: withSet("recombination/sahaFactors", (module) => module.levelTemperature),
  electronStates: withSet("recombination/sahaFactors", (module) => module.electronStates),
  "sahaLogarithms.hydrogen": withSet(
    "recombination/sahaFactors",
    (module) =>
      (...values: Parameters<typeof module.sahaLogarithms>) =>
        module.sahaLogarithms(...values).hydrogen,
  ),
  "sahaLogarithms.helium": withSet(
    "recombination/sahaFactors",
    (module) =>
      (...values: Parameters<typeof module.sahaLogarithms>) =>
        module.sahaLogarithms(...values).helium,
  ),
  "sahaLogarithms.heliumIon": withSet(
    "recombination/sahaFactors",
    (module) =>
      (...values: Parameters<typeof module.sahaLogarithms>) =>
        module.sahaLogarithms(...values).heliumIon,
  ),
  heliumWithHydrogen: entry("recombination/threeLevelAtom", (module, values, load) => {
    const [hydrogen, temperature, hydrogenDensity, heliumRatio] = values as Numbers;
    // Of the gas it reads these two alone.
    const part = { heliumRatio: heliumRatio!, constants: setOf(load, values[4]!) } as Gas;
    return module.heliumWithHydrogen(hydrogen!, temperature!, hydrogenDensity!, part);
  }),
  heliumSingletRecombination: plain("recombination/heliumRates", (module) => module.heliumSingletRecombination),
  heliumTripletRecombination: plain("recombination/heliumRates", (module) => module.heliumTripletRecombination),
  heliumLogitRate: entry("recombination/heliumRates", (module, values, load) => {
    const [temperature, hydrogenDensity, heliumRatio, rate, neutralHydrogen, odds, ionized] = values as Numbers;
    return module.heliumLogitRate(
      {
        temperature: temperature!,
        hydrogenDensity: hydrogenDensity!,
        heliumRatio: heliumRatio!,
        rate: rate!,
        neutralHydrogen: neutralHydrogen!,
        neutralHelium: 1 / (1 + odds!),
      },
      ionized!,
      odds!,
      setOf(load, values[7]!),
    );
  }),
  calibratedRecombinationFactor: entry(
    "recombination/lymanAlphaCorrection",
    (module) => module.calibratedRecombinationFactor,
  ),
  lymanAlphaCorrection: entry("recombination/lymanAlphaCorrection", (module, [z, ...coefficients]) =>
    module.lymanAlphaCorrection(z as number, coefficients as Numbers),
  ),
  nucleosynthesisHelium: plain("recombination/nucleosynthesisHelium", (module) => module.nucleosynthesisHelium),
  massFractionFromNucleonFraction: plain(
    "recombination/nucleosynthesisHelium",
    (module) => module.massFractionFromNucleonFraction,
  ),
  heliumToHydrogenRatio: plain("recombination/gas", (module) => module.heliumToHydrogenRatio),
  reionizationProfile: plain("recombination/reionizationProfile", (module) => module.reionizationProfile),

  carrollAge: plain("fits/index", (module) => module.carrollAge),
  aubourgDragSoundHorizon: plain("fits/index", (module) => module.aubourgDragSoundHorizon),
  aubourgDragSoundHorizonWithNeutrinos: plain("fits/index", (module) => module.aubourgDragSoundHorizonWithNeutrinos),
  briedenDragSoundHorizon: plain("fits/index", (module) => module.briedenDragSoundHorizon),
  eisensteinHuEqualityRedshift: plain("fits/index", (module) => module.eisensteinHuEqualityRedshift),
  eisensteinHuEqualityWavenumber: plain("fits/index", (module) => module.eisensteinHuEqualityWavenumber),
  eisensteinHuDragRedshift: plain("fits/index", (module) => module.eisensteinHuDragRedshift),
  eisensteinHuSoundHorizon: plain("fits/index", (module) => module.eisensteinHuSoundHorizon),
  eisensteinHuSilkWavenumber: plain("fits/index", (module) => module.eisensteinHuSilkWavenumber),
  eisensteinHuShortSoundHorizon: plain("fits/index", (module) => module.eisensteinHuShortSoundHorizon),
  huSugiyamaLastScatteringRedshift: plain("fits/index", (module) => module.huSugiyamaLastScatteringRedshift),
  penLuminosityDistance: plain("fits/index", (module) => module.penLuminosityDistance),
  komatsuNeutrinoEnergy: plain("fits/index", (module) => module.komatsuNeutrinoEnergy),
  jonesWyseOpticalDepth: plain("fits/index", (module) => module.jonesWyseOpticalDepth),
  jonesWyseVisibility: plain("fits/index", (module) => module.jonesWyseVisibility),
  radiationToMatterAt: plain("fits/index", (module) => module.radiationToMatterAt),
  firstPeakPhase: plain("fits/index", (module) => module.firstPeakPhase),
  secondPeakHeightRatio: plain("fits/index", (module) => module.secondPeakHeightRatio),
  thirdPeakHeightRatio: plain("fits/index", (module) => module.thirdPeakHeightRatio),
  peakPhase: plain("fits/index", (module) => (...values) => {
    const [peak, baryonDensity, ratio, spectralIndex, earlyDarkEnergy] = values as [
      number,
      number,
      number,
      number,
      number,
    ];
    return module.peakPhase(peak, { baryonDensity, ratio, spectralIndex, earlyDarkEnergy });
  }),

  "ofModel.baryonToPhotonRatio": ofModel("baryonToPhotonRatio"),
  "ofModel.reionizationDepth": ofModel("reionizationDepth"),
  "ofReferenceModel.peakMultipole": ofReferenceModel("peakMultipole"),
  "ofReferenceModel.peakSpacing": ofReferenceModel("peakSpacing"),
  "ofModel.decelerationAt": ofModel("decelerationAt"),
  "ofModel.backgroundBrightness": ofModel("backgroundBrightness"),
  "ofModel.wienFrequency": ofModel("wienFrequency"),
  "ofModel.wienWavelength": ofModel("wienWavelength"),
  "ofModel.photonNumberDensity": ofModel("photonNumberDensity"),
  "ofModel.age.carroll1992": ofModel("age.carroll1992"),
  "ofModel.luminosityDistance.pen1999": ofModel("luminosityDistance.pen1999"),
  "ofModel.peakHeightRatio": ofModel("peakHeightRatio"),
  "continuumEscape.singlet": continuumEscape("singlet"),
  "continuumEscape.triplet": continuumEscape("triplet"),

  planckLaw: withSet("blackbody/planckLaw", (module) => module.planckLaw),
  photonNumberDensity: withSet("blackbody/photonNumberDensity", (module) => module.photonNumberDensity),
  wienWavelength: withSet("blackbody/wienWavelength", (module) => module.wienWavelength),
  wienFrequency: withSet("blackbody/wienFrequency", (module) => module.wienFrequency),
  colorMatching: entry("blackbody/colorMatching", (module, [wavelength, coordinate]) => {
    const row = ((wavelength as number) - module.firstWavelength) / module.wavelengthStep;
    return module.colorMatching[row]?.[coordinate as 0 | 1 | 2] ?? Number.NaN;
  }),
  blackbodyChromaticity: entry(
    "blackbody/blackbodyChromaticity",
    (module, [temperature, set, coordinate], load) =>
      module.blackbodyChromaticity(temperature as number, setOf(load, set!))[coordinate as "x" | "y"],
  ),
};
