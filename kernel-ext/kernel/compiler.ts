/**
 * The TypeScript compiler as tslab's converter is to see it: the same module with source maps switched on, packages
 * found by their `exports`, and fewer files watched. It must be prepared before tslab is loaded.
 */
import Module, { SourceMap, type SourceMapPayload } from "node:module";
import { dirname, join, sep } from "node:path";

type TypeScript = typeof import("@tslab/typescript-for-tslab");
type TranspileOptions = Parameters<TypeScript["transpileModule"]>[1];

/** One file as the converter compiled it. */
export interface CompiledFile {
  /** Text of the emitted module, as it is executed. */
  output: string;
  /** What the first map calls the source file. */
  source: string;
  /** From the executed text to the source, zero-based lines and columns, where there is a counterpart. */
  locate(line: number, column: number): { line: number; column: number } | undefined;
}

export interface Compiler {
  typescript: TypeScript;
  /** The files compiled since the last call. */
  takeCompiled(): CompiledFile[];
}

const inlineMap = /\n?\/\/# sourceMappingURL=data:application\/json;base64,([A-Za-z0-9+/=]+)\s*$/;

function hasPosition(entry: unknown): entry is { originalLine: number; originalColumn: number } {
  return typeof (entry as { originalLine?: unknown }).originalLine === "number";
}

/** Two maps in a row, parsed when they are first needed: most cells never fail. */
function chain(outer: string, inner: string): CompiledFile["locate"] {
  let maps: [SourceMap, SourceMap] | undefined;
  return (line, column) => {
    maps ??= [
      new SourceMap(JSON.parse(outer) as SourceMapPayload),
      new SourceMap(JSON.parse(inner) as SourceMapPayload),
    ];
    const between = maps[0].findEntry(line, column);
    if (!hasPosition(between)) return undefined;
    const entry = maps[1].findEntry(between.originalLine, between.originalColumn);
    return hasPosition(entry) ? { line: entry.originalLine, column: entry.originalColumn } : undefined;
  };
}

/** The package under its own name, wherever the notebook lies: the declarations of its two entrances. */
function ownDeclarations(): Record<string, string[]> {
  return Object.fromEntries(
    Object.entries(ownEntrances).map(([name, path]) => [name, [`${path.split(sep).join("/")}.d.ts`]]),
  );
}

const ownEntrances: Record<string, string> = {
  "cosmology-cells": join(__dirname, "..", "index"),
  "cosmology-cells/cosmo": join(__dirname, "..", "..", "cosmo", "index"),
};

/** Lets `require` find the package under its own name from any folder, as the compiler does. */
export function resolveOwnName(): void {
  const loader = Module as unknown as { _resolveFilename(request: string, ...rest: unknown[]): string };
  const original = loader._resolveFilename;
  loader._resolveFilename = function (this: unknown, request, ...rest) {
    const own = Object.hasOwn(ownEntrances, request) ? `${ownEntrances[request]}.js` : request;
    return original.call(this, own, ...rest);
  };
}

/** Files that do not change while a kernel runs; watching some hundred of them would only cost start-up time. */
function neverChanges(path: string): boolean {
  return path.includes("/node_modules/") || path.startsWith(packageRoot);
}

const packageRoot = dirname(dirname(__dirname)).split(sep).join("/");

/** Replaces the compiler module that tslab loads; returns the access to what it compiles. */
export function prepareCompiler(): Compiler {
  const path = require.resolve("@tslab/typescript-for-tslab", { paths: [require.resolve("tslab/package.json")] });
  const original = require(path) as TypeScript;
  const compiled: CompiledFile[] = [];

  const watchFile = original.sys.watchFile?.bind(original.sys);
  if (watchFile) {
    original.sys.watchFile = (file, ...rest) =>
      neverChanges(file) ? { close: () => undefined } : watchFile(file, ...rest);
  }

  const createWatchCompilerHost = original.createWatchCompilerHost as (...all: unknown[]) => unknown;
  const changed = {
    ...original,
    createWatchCompilerHost: (roots: string[], options: object, ...rest: unknown[]) =>
      createWatchCompilerHost(
        roots,
        {
          ...options,
          inlineSourceMap: true,
          moduleResolution: original.ModuleResolutionKind.Bundler,
          types: ["node"],
          paths: ownDeclarations(),
        },
        ...rest,
      ),
    transpileModule: (input: string, options: TranspileOptions) => {
      const inner = inlineMap.exec(input);
      if (!inner) return original.transpileModule(input, options);
      const result = original.transpileModule(input.slice(0, inner.index), {
        ...options,
        compilerOptions: { ...options.compilerOptions, sourceMap: true },
      });
      const innerText = Buffer.from(inner[1], "base64").toString("utf8");
      const output = result.outputText.replace(/\n?\/\/# sourceMappingURL=.*\s*$/, "\n");
      compiled.push({
        output,
        source: (JSON.parse(innerText) as { sources: string[] }).sources[0] ?? "",
        locate: chain(result.sourceMapText as string, innerText),
      });
      return { ...result, outputText: output };
    },
  };
  const cached = require.cache[path];
  if (!cached) throw new Error(`the compiler at ${path} is not in the module cache`);
  cached.exports = changed;
  return { typescript: original, takeCompiled: () => compiled.splice(0) };
}
