import { parseArgs } from "node:util";
import { DomainError, describeValue, nearestName, UnknownNameError } from "../../../cosmo/errors";
import { modelFieldByName } from "../../../cosmo/model";
import { parseRequests, type QuantityRequest } from "../../../cosmo/quantities";
import { formatByName, formatOfFile, knownFormats, parseNumber, type TableFormat } from "../../data";
import { CommandError } from "../commandError";
import { type FillValues, parseFill } from "./fill";
import { splitPairs } from "./pairs";

/** What a command line of `derive` asks for. */
export interface DeriveOptions {
  /** "-" for standard input. */
  readonly input: string;
  readonly inputFormat: TableFormat;
  /** "-" for standard output. */
  readonly output: string;
  readonly outputFormat: TableFormat;
  readonly requests: readonly QuantityRequest[];
  /** What the file calls a field, to the field's name. */
  readonly renamed: ReadonlyMap<string, string>;
  readonly fill: FillValues;
  /** Columns of derived numbers that are part of the model, by the names in the file. */
  readonly given: readonly string[];
  /** Parameters that are solved for instead of keeping their defaults. */
  readonly solveFor: readonly string[];
  /** Which of two solutions is wanted: the one nearest to these values. */
  readonly solveNear: ReadonlyMap<string, number>;
  readonly digits: number;
  readonly errors: boolean;
  /** The batch engine instead of the full computation. */
  readonly fast: boolean;
  /** Worker threads of the batch engine; undefined: one a core. */
  readonly workers: number | undefined;
  readonly keepBadRows: boolean;
  readonly problemColumn: string;
  readonly header: boolean;
  /** Undefined: where standard error is a terminal. */
  readonly progress: boolean | undefined;
}

const textOption = { type: "string", multiple: true } as const;
const flagOption = { type: "boolean", multiple: true } as const;

const options = {
  add: textOption,
  out: textOption,
  map: textOption,
  set: textOption,
  recombination: textOption,
  given: textOption,
  "solve-for": textOption,
  "solve-near": textOption,
  digits: textOption,
  errors: flagOption,
  fast: flagOption,
  workers: textOption,
  "bad-rows": textOption,
  "problem-column": textOption,
  header: textOption,
  format: textOption,
  progress: flagOption,
} as const;

const repeatable = new Set(["add", "map", "set", "given", "solve-for", "solve-near"]);

/**
 * Reads the command line and checks all of it that can be checked without the file.
 *
 * @throws CommandError for an option that is unknown, lacks its value, stands twice or has a value outside its rule;
 * UnknownNameError and DomainError for names and numbers inside --add, --set and --recombination
 */
export function parseOptions(args: readonly string[]): DeriveOptions {
  const { texts, flags, files } = readArguments(args);
  const [input, ...more] = files;
  if (input === undefined) throw new CommandError("derive: name the file of models, or - for standard input");
  if (more.length > 0) {
    throw new CommandError(
      `derive: name one file, got ${files.map(describeValue).join(", ")}; quote lists with blanks`,
    );
  }
  const one = (name: string): string | undefined => texts.get(name)?.[0];

  const format = chosenFormat(one("format"));
  const output = one("out") ?? "-";
  if (input !== "-" && output !== "-" && format !== undefined) {
    throw new CommandError("derive: --format is for standard input or output; here both names say the format");
  }
  const inputFormat = input === "-" ? (format ?? "csv") : formatOfFile(input);
  const outputFormat = output === "-" ? (format ?? inputFormat) : formatOfFile(output);
  if (input === "-" && inputFormat === "parquet") {
    throw new CommandError(
      "derive: Parquet cannot be read from standard input, because its table of contents stands at the end; name a file",
    );
  }

  const add = texts.get("add")?.join(", ");
  if (add === undefined) throw new CommandError('derive: say what to add: --add "age, luminosityDistance(1.1)"');
  const requests = parseRequests(add, "derive --add");
  if (requests.length === 0) throw new CommandError("derive: --add names no quantity");

  const fast = flags.has("fast");
  if (fast && flags.has("errors")) {
    throw new CommandError(
      "derive: --errors and --fast do not go together: the batch engine estimates no errors of single numbers",
    );
  }
  if (!fast && texts.has("workers")) throw new CommandError("derive: --workers is for --fast");
  return {
    input,
    inputFormat,
    output,
    outputFormat,
    requests,
    renamed: parseRenaming(texts.get("map") ?? []),
    fill: parseFill(texts.get("set") ?? [], one("recombination")),
    given: namesOf(texts.get("given")),
    solveFor: parameterNames(namesOf(texts.get("solve-for")), "solve-for"),
    solveNear: parseNear(texts.get("solve-near") ?? []),
    digits: digitsOption(one("digits"), fast),
    errors: flags.has("errors"),
    fast,
    workers: workersOption(one("workers")),
    keepBadRows: oneOf("bad-rows", one("bad-rows") ?? "refuse", ["refuse", "keep"]) === "keep",
    problemColumn: one("problem-column") ?? "problem",
    header: oneOf("header", one("header") ?? "yes", ["yes", "no"]) === "yes",
    progress: flags.has("progress") ? true : undefined,
  };
}

/** Options and files apart; node's parser in its lenient mode, so that the refusals can say what was meant. */
function readArguments(args: readonly string[]): {
  texts: Map<string, string[]>;
  flags: Set<string>;
  files: string[];
} {
  const { tokens } = parseArgs({ args: [...args], options, allowPositionals: true, strict: false, tokens: true });
  const texts = new Map<string, string[]>();
  const flags = new Set<string>();
  const files: string[] = [];
  for (const token of tokens) {
    if (token.kind === "positional") files.push(token.value);
    if (token.kind !== "option") continue;
    const { name, rawName, value } = token;
    if (!Object.hasOwn(options, name)) {
      const near = rawName.startsWith("--") ? nearestName(name, Object.keys(options)) : undefined;
      throw new CommandError(
        `derive: there is no option ${rawName}${near === undefined ? "" : `; did you mean --${near}?`}`,
      );
    }
    if (options[name as keyof typeof options].type === "boolean") {
      if (value !== undefined) throw new CommandError(`derive: --${name} takes no value, got ${describeValue(value)}`);
      flags.add(name);
      continue;
    }
    if (value === undefined || (!token.inlineValue && value.startsWith("--"))) {
      throw new CommandError(
        `derive: --${name} needs a value${value === undefined ? "" : `, got ${describeValue(value)}`}`,
      );
    }
    const before = texts.get(name) ?? [];
    if (before.length > 0 && !repeatable.has(name)) {
      throw new CommandError(
        `derive: --${name} is given twice, as ${describeValue(before[0])} and ${describeValue(value)}`,
      );
    }
    texts.set(name, [...before, value]);
  }
  return { texts, flags, files };
}

function chosenFormat(name: string | undefined): TableFormat | undefined {
  if (name === undefined) return undefined;
  const format = formatByName(name);
  if (format === undefined) {
    throw new CommandError(`derive: --format must be one of ${knownFormats}, got ${describeValue(name)}`);
  }
  return format;
}

function workersOption(text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const count = /^\d{1,3}$/.test(text) ? Number(text) : -1;
  if (!(count >= 0 && count <= 256)) {
    throw new CommandError(`derive: --workers must be a whole number from 0 to 256, got ${describeValue(text)}`);
  }
  return count;
}

function digitsOption(text: string | undefined, fast: boolean): number {
  if (text === undefined) return fast ? 9 : 15;
  const digits = /^\d{1,2}$/.test(text) ? Number(text) : 0;
  if (!(digits >= 1 && digits <= 17)) {
    throw new CommandError(`derive: --digits must be a whole number from 1 to 17, got ${describeValue(text)}`);
  }
  return digits;
}

function oneOf(option: string, value: string, choices: readonly string[]): string {
  if (choices.includes(value)) return value;
  throw new CommandError(`derive: --${option} must be ${choices.join(" or ")}, got ${describeValue(value)}`);
}

function namesOf(lists: readonly string[] = []): string[] {
  return lists
    .flatMap((list) => list.split(","))
    .map((name) => name.trim())
    .filter((name) => name !== "");
}

function parameterNames(names: readonly string[], option: string): readonly string[] {
  const stranger = names.find((name) => !modelFieldByName.has(name));
  if (stranger === undefined) return names;
  const known = [...modelFieldByName.keys()];
  throw new UnknownNameError({ where: `derive --${option}`, kind: "parameter", given: stranger, known });
}

function parseNear(lists: readonly string[]): Map<string, number> {
  const near = new Map<string, number>();
  const pairs = splitPairs(lists, "solve-near", "curvature=0");
  parameterNames(
    pairs.map((pair) => pair.name),
    "solve-near",
  );
  for (const { name, value } of pairs) {
    const parsed = parseNumber(value);
    if ("reason" in parsed) {
      throw new DomainError({ where: "derive --solve-near", argument: name, rule: parsed.reason, value });
    }
    near.set(name, parsed.value);
  }
  return near;
}

function parseRenaming(lists: readonly string[]): Map<string, string> {
  const renamed = new Map<string, string>();
  for (const { name: column, value: field } of splitPairs(lists, "map", "H0=hubble")) {
    if (renamed.has(column)) throw new CommandError(`derive: --map renames the column ${describeValue(column)} twice`);
    renamed.set(column, field);
  }
  return renamed;
}
