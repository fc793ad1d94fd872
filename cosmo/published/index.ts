export {
  calibrationColumn,
  type PrintedColumn,
  type PrintedNumber,
  planck2018BestFit,
  planck2018Table2,
} from "./planck2018";
