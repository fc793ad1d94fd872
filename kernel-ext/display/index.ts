/** Contents of the display room. */
export { type CellOutputOptions, CellResult, cellOutput, type SourceLine } from "./bundle";
export {
  type BarChartOptions,
  type BarPanel,
  type BarRow,
  barChart,
  type Chart,
  type ChartAxis,
  type ChartBand,
  type ChartBar,
  type ChartPanel,
  type ChartRule,
  type CorrelationChartOptions,
  correlationChart,
  type HistogramChartOptions,
  type HistogramPanel,
  histogramChart,
  type IntervalChartOptions,
  type IntervalPanel,
  type IntervalRow,
  intervalChart,
  type LineChartOptions,
  type LineSeries,
  lineChart,
  type PointSeries,
  type RegionChartOptions,
  type RegionPair,
  type RenderOptions,
  regionChart,
  renderSvg,
  type VegaLiteSpec,
} from "./chart";
export { formatNumber, formatWithError, missingMark, type NumberFormat } from "./digits";
export { escapeHtml, escapeMarkdown, visibleText } from "./escape";
export { type Progress, type ProgressOptions, progress } from "./progress";
export {
  type Displayable,
  type DisplaySink,
  displaySink,
  displaySymbol,
  type MimeBundle,
  setDisplaySink,
} from "./sink";
export { quantityText, symbolHtml, symbolText } from "./symbol";
export { type Table, type TableColumn, type TableOptions, type TableRow, type TableValue, table } from "./table";
