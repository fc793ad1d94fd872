import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { Script } from "node:vm";
import ts from "typescript";

type Exports = Record<string, unknown>;
type Body = (exports: Exports, require: (place: string) => unknown, module: { exports: Exports }) => void;

/** A number in the text of a file of cosmo/. */
export interface Literal {
  /** As written: "4.309". */
  readonly text: string;
  readonly start: number;
  /** Counted from 1. */
  readonly line: number;
  /** The line it stands in, without the spaces around. */
  readonly lineText: string;
  /** What follows it in that line. */
  readonly after: string;
}

interface Compiled {
  readonly body: Body;
  /** Places that it requires. */
  readonly requires: readonly string[];
}

const root = join(__dirname, "..", "..", "cosmo");

/** Text of a file, by its place below cosmo/: "fits/peakHeights" (a TypeScript file), "recombination/calibrationCoefficients.json". */
export function sourceText(place: string): string {
  return readFileSync(join(root, place.endsWith(".json") ? place : `${place}.ts`), "utf8");
}

function compile(place: string, text: string): Compiled {
  const source = place.endsWith(".json")
    ? `module.exports = ${text}`
    : ts.transpileModule(text, {
        compilerOptions: { module: ts.ModuleKind.CommonJS, target: ts.ScriptTarget.ES2022, esModuleInterop: true },
      }).outputText;
  const requires = [...source.matchAll(/require\("(\.[^"]*)"\)/g)].map((match) => resolve(place, match[1]!));
  const script = new Script(`(function (exports, require, module) {${source}\n})`, { filename: `cosmo/${place}` });
  return { body: script.runInThisContext() as Body, requires };
}

const indexed = new Map<string, string>();

/** The place that a relative import of a place means: a file, or the index of a folder. */
function resolve(from: string, relative: string): string {
  const place = join(dirname(from), relative);
  const known = indexed.get(place);
  if (known !== undefined) return known;
  let found = place;
  if (!place.endsWith(".json")) {
    try {
      sourceText(place);
    } catch {
      found = `${place}/index`;
    }
  }
  indexed.set(place, found);
  return found;
}

/** Every file compiled once, whatever is changed later. */
const compiled = new Map<string, Compiled>();

function compiledAt(place: string): Compiled {
  let known = compiled.get(place);
  if (known === undefined) {
    known = compile(place, sourceText(place));
    compiled.set(place, known);
  }
  return known;
}

/** Places that a place requires, itself included, through any number of steps. */
const reached = new Map<string, ReadonlySet<string>>();

function reach(place: string): ReadonlySet<string> {
  const known = reached.get(place);
  if (known !== undefined) return known;
  const all = new Set<string>([place]);
  for (const next of all) for (const each of compiledAt(next).requires) all.add(each);
  reached.set(place, all);
  return all;
}

/** Whether what a place computes can hang on a file. */
export function dependsOn(place: string, file: string): boolean {
  return reach(place).has(file);
}

/**
 * The modules of cosmo/ as written, or with the text of one file changed. Modules that cannot see the changed file are those of
 * the unchanged copy, so that a copy costs only what hangs on the change.
 */
export class ModuleCopy {
  private readonly loaded = new Map<string, { exports: Exports }>();

  constructor(
    private readonly base?: ModuleCopy,
    private readonly changed?: { readonly place: string; readonly text: string },
  ) {}

  load(place: string): unknown {
    if (this.base !== undefined && !dependsOn(place, this.changed!.place)) return this.base.load(place);
    const known = this.loaded.get(place);
    if (known !== undefined) return known.exports;
    const module = { exports: {} as Exports };
    this.loaded.set(place, module);
    const { body } = place === this.changed?.place ? compile(place, this.changed.text) : compiledAt(place);
    body(module.exports, (relative) => this.load(resolve(place, relative)), module);
    return module.exports;
  }
}

/** The numbers of a file that are values: not types, not names of properties. Of a JSON file those in `coefficients`. */
export function literalsOf(place: string): Literal[] {
  const text = sourceText(place);
  const lines = text.split("\n");
  const found: Literal[] = [];
  const add = (literal: string, start: number) => {
    const line = text.slice(0, start).split("\n").length;
    const after = text.slice(start + literal.length).split("\n", 1)[0]!;
    found.push({ text: literal, start, line, lineText: lines[line - 1]!.trim(), after });
  };
  if (place.endsWith(".json")) {
    const list = /"coefficients": \[([^\]]*)\]/.exec(text);
    if (list === null) throw new Error(`${place} has no list of coefficients`);
    const first = list.index + list[0].indexOf("[") + 1;
    for (const match of list[1]!.matchAll(/[\d.e]+/g)) add(match[0], first + match.index);
    return found;
  }
  const file = ts.createSourceFile(place, text, ts.ScriptTarget.ES2022, true);
  const visit = (node: ts.Node): void => {
    if (ts.isNumericLiteral(node)) {
      const isName = ts.isPropertyAssignment(node.parent) && node.parent.name === node;
      if (!ts.isLiteralTypeNode(node.parent) && !isName) add(node.getText(file), node.getStart(file));
    }
    ts.forEachChild(node, visit);
  };
  visit(file);
  return found;
}

/** The text of a file with one of its numbers multiplied. */
export function withFactor(place: string, literal: Literal, factor: number): string {
  const text = sourceText(place);
  const product = place.endsWith(".json") ? String(Number(literal.text) * factor) : `(${literal.text} * ${factor})`;
  return text.slice(0, literal.start) + product + text.slice(literal.start + literal.text.length);
}
