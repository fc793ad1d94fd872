import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";

/** An argument of a formula: a number, or a name (of a constants set, a neutrino ordering, a field). */
export type FormulaArgument = number | string;

/** One reference value of a closed formula. */
export interface FormulaRow {
  readonly arguments: readonly FormulaArgument[];
  readonly value: number;
}

/** One file of formulas/: a function of the program at some arguments, evaluated outside the program. */
export interface FormulaFile {
  /** The function's name, also the file's. */
  readonly name: string;
  readonly source: string;
  readonly rows: readonly FormulaRow[];
}

const folder = join(__dirname, "formulas");

/** All files of formulas/, in the order of their names. */
export function readFormulas(): FormulaFile[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith(".json"))
    .sort()
    .map((file) => {
      const content = JSON.parse(readFileSync(join(folder, file), "utf8")) as {
        function: string;
        source: string;
        rows: [...FormulaArgument[], number][];
      };
      const name = file.slice(0, -".json".length);
      if (content.function !== name) throw new Error(`${file} holds ${content.function}`);
      return {
        name,
        source: content.source,
        rows: content.rows.map((row) => ({
          arguments: row.slice(0, -1),
          value: row[row.length - 1] as number,
        })),
      };
    });
}
