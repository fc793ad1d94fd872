export { arcsecond, astronomicalUnit, gigayear, julianYear, megaparsec, parsec } from "./astronomicalUnits";
export * as atoms from "./atoms";
export {
  type ConstantsSet,
  type ConstantsSetName,
  constantsSets,
  lightSpeed,
  radiationConstant,
} from "./constantsSets";
