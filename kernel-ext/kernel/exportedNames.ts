/**
 * The names that this package exports. Run as a program after the build it writes them down beside itself; the prelude
 * reads them, so that whatever `kernel-ext/index.ts` exports is known to every cell, types included.
 */
import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";

export interface ExportedNames {
  values: string[];
  types: string[];
}

const listFile = join(__dirname, "exportedNames.json");

/** The compiled index of the package. */
export const packageIndex = join(__dirname, "..", "index.js");

/** Reads the list that the build wrote. */
export function readExportedNames(): ExportedNames {
  return JSON.parse(readFileSync(listFile, "utf8")) as ExportedNames;
}

/**
 * Finds the names that a compiled module exports: values by loading it, types with the compiler that cells are compiled
 * with.
 *
 * @param module path of the compiled module; its declarations lie beside it
 */
export function findExportedNames(module: string): ExportedNames {
  const values = Object.keys(require(module) as object).filter((name) => name !== "__esModule" && name !== "default");
  const path = require.resolve("@tslab/typescript-for-tslab", { paths: [require.resolve("tslab/package.json")] });
  const ts = require(path) as typeof import("@tslab/typescript-for-tslab");
  const declarations = module.replace(/\.js$/, ".d.ts");
  const program = ts.createProgram([declarations], {
    module: ts.ModuleKind.ESNext,
    moduleResolution: ts.ModuleResolutionKind.Bundler,
    target: ts.ScriptTarget.ES2022,
    skipLibCheck: true,
    types: ["node"],
  });
  const checker = program.getTypeChecker();
  const source = program.getSourceFile(declarations);
  const symbol = source && checker.getSymbolAtLocation(source);
  if (!symbol) throw new Error(`${declarations} is not a module`);
  const all = checker.getExportsOfModule(symbol).map(({ name }) => name);
  const types = all.filter((name) => name !== "default" && !values.includes(name));
  return { values: values.sort(), types: types.sort() };
}

if (require.main === module) {
  writeFileSync(listFile, `${JSON.stringify(findExportedNames(packageIndex), null, 1)}\n`);
}
