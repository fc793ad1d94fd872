import type { Literal } from "./changedCopies";

/** The files of cosmo/ that hold physical coefficients, by their place. */
export const coefficientFiles: readonly string[] = [
  "constants/constantsSets",
  "constants/atoms",
  "constants/astronomicalUnits",
  "model/neutrinoMasses",
  "model/photonDensity",
  "solve/closeDirect",
  "expansion/neutrinoDensity",
  "expansion/fermiDirac",
  "expansion/darkEnergyGrowth",
  "expansion/hubbleRate",
  "expansion/criticalDensity",
  "expansion/equalityRedshift",
  "expansion/equalityWavenumber",
  "expansion/decelerationAt",
  "distances/comovingVolume",
  "distances/comovingVolumeElement",
  "distances/distanceModulus",
  "distances/hubbleDistance",
  "distances/properScale",
  "distances/volumeDistance",
  "recombination/hydrogenRates",
  "recombination/heliumRates",
  "recombination/sahaFactors",
  "recombination/saha",
  "recombination/gas",
  "recombination/baryonToPhotonRatio",
  "recombination/threeLevelAtom",
  "recombination/lymanAlphaCorrection",
  "recombination/calibrationCoefficients.json",
  "recombination/nucleosynthesisHelium",
  "recombination/reionizationProfile",
  "lastScattering/reionization",
  "lastScattering/baryonLoading",
  "lastScattering/opticalDepthHistory",
  "acoustics/soundSpeed",
  "acoustics/soundHorizon",
  "acoustics/acousticAngle",
  "acoustics/acousticMultipole",
  "acoustics/dampingWavenumber",
  "acoustics/dampingAngle",
  "acoustics/equalityAngles",
  "acoustics/peakMultipole",
  "acoustics/peakHeightRatio",
  "fits/ageCarroll",
  "fits/dragSoundHorizonAubourg",
  "fits/dragSoundHorizonBrieden",
  "fits/eisensteinHu",
  "fits/eisensteinHuQuantities",
  "fits/lastScatteringRedshiftHuSugiyama",
  "fits/luminosityDistancePen",
  "fits/neutrinoDensityKomatsu",
  "fits/opticalDepthJonesWyse",
  "fits/peakHeights",
  "fits/peakPhase",
  "fits/publishedFit",
  "blackbody/blackbodyChromaticity",
  "blackbody/colorMatching",
  "blackbody/photonNumberDensity",
  "blackbody/planckLaw",
  "blackbody/wienFrequency",
  "blackbody/wienWavelength",
  "batch/closeRow",
  "batch/rowEngine",
  "batch/heliumEscape",
  "batch/engineOutputs",
];

/** Numbers of those files that are no physical coefficients, and why. */
export interface Exclusion {
  /** Where; every file, if left out. */
  readonly file?: string;
  /** Matches the line that the number stands in. */
  readonly line: RegExp;
  /** Only the number of the line that this follows. */
  readonly after?: RegExp;
  readonly reason: string;
}

const stated = "an accuracy that the register states, held by accuracy.test.ts";
const numericalError = "a part of an error estimate, held by accuracy.test.ts";
const fitRange = "a range outside which a fit warns; no value hangs on it (test/cosmo/fits)";
const message = "digits of a number in a message";
const roundingGuard = "a guard against rounding, a few units in the last place wide";
const search = "where or how far a numerical search goes; the answer does not hang on it";
const node = "a number of nodes, pieces or places in memory";
const interpolation = "a weight or a size of the cubic interpolation in a table (test/cosmo/batch/march.test.ts)";
const belowRounding =
  "one of the last terms of a series, or its limit: a millionth of it is below the last digit of the sum where it is used";

export const exclusions: readonly Exclusion[] = [
  { line: /^accuracy: /, reason: stated },
  { line: /^errorFloor: /, reason: stated },
  { line: /\berror: .*(1e-14|1e-11) \* |Number\.EPSILON \* \(4/, reason: numericalError },
  { file: "distances/distanceModulus", line: /error: \(5 /, after: /^ \/ Math\.LN10/, reason: numericalError },
  { file: "distances/volumeDistance", line: /error: \(2 \/ 3\)/, reason: numericalError },
  { file: "distances/comovingVolume", line: /^(const error = |return \{ \.\.\.shell)/, reason: numericalError },
  { file: "lastScattering/opticalDepthHistory", line: /^const farthest = /, reason: search },
  { file: "lastScattering/opticalDepthHistory", line: /^const rule = /, reason: node },
  {
    file: "batch/rowEngine",
    line: / = 0\.5;$/,
    reason: "a first value that says to the compiler what kind of number it is",
  },
  {
    file: "batch/engineOutputs",
    line: /^const highestRedshift/,
    reason: "which redshifts are left to the single path",
  },
  { line: /^(high: |limits: |\{ symbol: )/, reason: fitRange },
  { line: /to(Precision|Fixed)\(/, reason: message },
  { line: /\* Number\.EPSILON/, reason: roundingGuard },
  { line: /accepts: \(value\)/, reason: "which arguments are accepted" },
  { file: "solve/closeDirect", line: /w0 \+ wa < 1 \/ 3/, reason: "which models are accepted" },
  {
    file: "expansion/equalityRedshift",
    line: /noteworthy|percent|const radiation = model.photonDensity \+ 3 \* masslessSpeciesDensity/,
    reason: "the size of an effect in a note",
  },
  { file: "expansion/fermiDirac", line: /^const (zeta9|zeta11|moment8|moment10) /, reason: belowRounding },
  { file: "expansion/fermiDirac", line: /^if \(s < lowest\)/, reason: belowRounding },
  { file: "expansion/fermiDirac", line: /^return .*moment6/, reason: belowRounding },
  {
    file: "expansion/fermiDirac",
    line: /^const (step|abscissas|lowest|highest) /,
    reason: "step and ends of a quadrature, to rounding",
  },
  {
    file: "recombination/heliumRates",
    line: /^const leastNeutral/,
    reason: "a floor far below what is ever reached where helium recombines",
  },
  {
    file: "recombination/saha",
    line: /^(if \(d < |const start = |for \(let iteration|const heliumSpread|if \(Math.abs\(change\)|return \(2 \* Math.sqrt\(s\)\))/,
    reason: "start, slope and end of Newton's iteration; the root does not hang on them",
  },
  {
    file: "lastScattering/reionization",
    line: /depthLimit|const least = |breakpoints/,
    reason: "end, split and tolerance of an integral whose integrand has vanished there",
  },
  { file: "acoustics/dampingWavenumber", line: /^const (farEnough|secondHeliumStep|rule) |absolute: /, reason: search },
  {
    file: "fits/ageCarroll",
    line: /< 1e-9/,
    after: /^\) return/,
    reason: "where a limit takes over, equal to the formula to the last digit there",
  },
  {
    file: "blackbody/blackbodyChromaticity",
    line: /tableRounding = |< 1000/,
    reason: "the digits of the table, and when a note is due",
  },
  { file: "batch/closeRow", line: /new Float64Array|held\[|for \(let m = 0/, reason: node },
  { file: "batch/closeRow", line: /sum < 0\.1/, reason: "which rows are left to the single path" },
  {
    file: "batch/heliumEscape",
    line: /^const (highestRoot|pointsPerDepth|deepest|sobolev|continuumEscapes|outer|w1|w2) /,
    reason: interpolation,
  },
  { file: "batch/heliumEscape", line: /^(outer \*|\(q \* \(1 \+ p\))/, reason: interpolation },
];

/** Whole numbers below three are identities, halves, squares, signs and places in a list; they are no coefficients. */
export function isSmall(literal: Literal): boolean {
  return ["0", "1", "2"].includes(literal.text);
}

/** Why a number is no coefficient; undefined where it is one. Small whole numbers are not asked here. */
export function exclusionOf(place: string, literal: Literal): Exclusion | undefined {
  if (isSmall(literal)) return undefined;
  return exclusions.find(
    ({ file, line, after }) =>
      (file === undefined || file === place) &&
      line.test(literal.lineText) &&
      (after === undefined || after.test(literal.after)),
  );
}
