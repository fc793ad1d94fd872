import { TableError } from "./tableError";

/** The formats of table files: comma separated, tab separated, one JSON object a line, Apache Parquet. */
export type TableFormat = "csv" | "tsv" | "jsonl" | "parquet";

const formatByEnding: ReadonlyMap<string, TableFormat> = new Map([
  [".csv", "csv"],
  [".tsv", "tsv"],
  [".jsonl", "jsonl"],
  [".parquet", "parquet"],
]);

/** The formats that are known, as an error or a help text lists them. */
export const knownFormats = "csv (comma separated), tsv (tab separated), jsonl (one JSON object a line), parquet";

/** A format by its own name: "csv". */
export function formatByName(name: string): TableFormat | undefined {
  return [...formatByEnding.values()].find((format) => format === name);
}

/**
 * The format that the end of a file's name says.
 *
 * @throws TableError for an end that says no known format, and for a name without one
 * @example formatOfFile("models.csv") // "csv"
 */
export function formatOfFile(file: string): TableFormat {
  const ending = /\.[^./\\]*$/.exec(file)?.[0].toLowerCase();
  const format = ending === undefined ? undefined : formatByEnding.get(ending);
  if (format !== undefined) return format;
  const known = [...formatByEnding.keys()].join(", ");
  throw new TableError({
    file,
    reason: `the name must end in ${known}, and it ends in ${ending === undefined ? "none of them" : JSON.stringify(ending)}`,
  });
}
