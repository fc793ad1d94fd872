/** Answers to requests that run no code of the user. */
import { version as tslabVersion } from "tslab/package.json";
import type { CellRunner } from "./cellRunner";
import { pointsFromUnits, unitsFromPoints } from "./cursor";
import { type JsonObject, protocolVersion } from "./wire";

/** The compiler inside tslab, which decides what a cell may say. */
const languageVersion = "5.0.4";

/** Reads a field that a request must have. */
export function requiredText(content: JsonObject, field: string): string {
  const value = content[field];
  if (typeof value !== "string") throw new TypeError(`the field "${field}" must be text, got ${JSON.stringify(value)}`);
  return value;
}

/** @param version of this package */
export function kernelInfo(version: string): JsonObject {
  return {
    status: "ok",
    protocol_version: protocolVersion,
    implementation: "cosmology-cells",
    implementation_version: version,
    language_info: {
      name: "typescript",
      version: languageVersion,
      mimetype: "text/typescript",
      file_extension: ".ts",
      codemirror_mode: { name: "javascript", mode: "typescript", typescript: true },
    },
    banner: `cosmology-cells ${version} (TypeScript through tslab ${tslabVersion}, Node ${process.versions.node})`,
    help_links: [],
    debugger: false,
  };
}

function codeAndPosition(content: JsonObject): { code: string; at: number } {
  const code = requiredText(content, "code");
  const points = typeof content.cursor_pos === "number" ? content.cursor_pos : code.length;
  return { code, at: unitsFromPoints(code, points) };
}

/** Names that may stand at the cursor. */
export function completion(content: JsonObject, runner: CellRunner): JsonObject {
  const { code, at } = codeAndPosition(content);
  const { start, end, candidates } = runner.complete(code, at);
  return {
    status: "ok",
    matches: candidates,
    cursor_start: pointsFromUnits(code, start),
    cursor_end: pointsFromUnits(code, end),
    metadata: {},
  };
}

/** What stands at the cursor. */
export function inspection(content: JsonObject, runner: CellRunner): JsonObject {
  const { code, at } = codeAndPosition(content);
  // At the end of a name, where a cursor usually stands, the compiler sees nothing any more.
  const text = runner.inspect(code, at) ?? (at > 0 ? runner.inspect(code, at - 1) : undefined);
  return {
    status: "ok",
    found: text !== undefined,
    data: text === undefined ? {} : { "text/plain": text },
    metadata: {},
  };
}
