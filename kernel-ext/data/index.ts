export { type ParsedNumber, parseNumber } from "./parseNumber";
export { type OpenedFile, openFile } from "./readFile";
export { readParquet } from "./readParquet";
export { type RowProblem, shownPiece, TableError, type TableErrorFields } from "./tableError";
export { formatByName, formatOfFile, knownFormats, type TableFormat } from "./tableFormat";
export { type TableOutput, type TableOutputOptions, tableOutput } from "./tableOutput";
export { type CellValue, openTable, type TableReader, type TableRow } from "./tableReader";
export { roundDigits, type TableWriter, tableWriter } from "./tableWriter";
export { ClosedPipeError, fileReason, openStream, type TextSink, wholeFile } from "./wholeFile";
