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

/** Finds the exported names of a declaration file, with the compiler that cells are compiled with. */
export function findExportedNames(declarations: string): ExportedNames {
  const path = require.resolve("@tslab/typescript-for-tslab", { paths: [require.resolve("tslab/package.json")] });
  const ts = require(path) as typeof import("@tslab/typescript-for-tslab");
  const program = ts.createProgram([declarations], {
    module: ts.ModuleKind.ESNext,
    moduleResolution: ts.ModuleResolutionKind.Bundler,
    target: ts.ScriptTarget.ES2022,
    skipLibCheck: true,
    types: ["node"],
  });
  const checker = program.getTypeChecker();
  const source = program.getSourceFile(declarations);
  const module = source && checker.getSymbolAtLocation(source);
  if (!module) throw new Error(`${declarations} is not a module`);
  const names: ExportedNames = { values: [], types: [] };
  for (const symbol of checker.getExportsOfModule(module)) {
    const target = symbol.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(symbol) : symbol;
    if (symbol.name === "default") continue;
    if (target.flags & ts.SymbolFlags.Value) names.values.push(symbol.name);
    else names.types.push(symbol.name);
  }
  names.values.sort();
  names.types.sort();
  return names;
}

if (require.main === module) {
  writeFileSync(listFile, `${JSON.stringify(findExportedNames(packageIndex.replace(/\.js$/, ".d.ts")), null, 1)}\n`);
}
