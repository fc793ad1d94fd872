/** Contents: the charts of a cell's output. */
export type { ChartAxis } from "./chart/axis";
export { type BarChartOptions, type BarPanel, type BarRow, barChart, type ChartBar } from "./chart/barChart";
export { type Chart, type VegaLiteSpec, vegaLiteMediaType } from "./chart/chart";
export { type CorrelationChartOptions, correlationChart } from "./chart/correlationChart";
export type { ChartBand, ChartRule } from "./chart/guides";
export { type HistogramChartOptions, type HistogramPanel, histogramChart } from "./chart/histogramChart";
export {
  type IntervalChartOptions,
  type IntervalPanel,
  type IntervalRow,
  intervalChart,
} from "./chart/intervalChart";
export {
  type ChartPanel,
  type LineChartOptions,
  lineChart,
} from "./chart/lineChart";
export type { LineSeries, PointSeries } from "./chart/lineLayers";
export { type RegionChartOptions, type RegionPair, regionChart } from "./chart/regionChart";
export { type RenderOptions, renderSvg } from "./chart/renderSvg";
