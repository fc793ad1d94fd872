/** The hidden first cell: it makes what the package exports known to every cell, with its types. */
import { type ExportedNames, packageIndex, readExportedNames } from "./exportedNames";

/** The source of the prelude. */
export function preludeSource(names: ExportedNames = readExportedNames(), from: string = packageIndex): string {
  const all = [...names.values, ...names.types];
  if (all.length === 0) return "";
  return `import { ${all.join(", ")} } from ${JSON.stringify(from.replace(/\\/g, "/"))};`;
}
