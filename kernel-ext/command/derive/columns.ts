import { describeValue, nearestName, UnknownNameError } from "../../../cosmo/errors";
import { modelFieldByName, modelFields } from "../../../cosmo/model";
import { slots } from "../../../cosmo/solve/slots";
import { CommandError } from "../commandError";
import { findGiven, type Given, givenNames, isDerived } from "./givenNames";
import type { DeriveOptions } from "./options";

/** A column of the file that gives the model something. */
export interface GivenColumn {
  readonly index: number;
  /** The name in the file. */
  readonly column: string;
  readonly given: Given;
}

/** A column of JSON lines that holds a group of fields as an object: "neutrinos". */
export interface GroupColumn {
  readonly index: number;
  /** The name in the file, and of the group. */
  readonly column: string;
}

/** Which column is what. */
export interface ColumnPlan {
  readonly columns: readonly string[];
  readonly givens: readonly GivenColumn[];
  readonly groups: readonly GroupColumn[];
  /** The columns added behind, in order. */
  readonly added: readonly string[];
  /** What the user should know before the rows run, one sentence each. */
  readonly warnings: readonly string[];
}

const groupNames = new Set(
  modelFields.filter((field) => field.name.includes(".")).map((field) => field.name.split(".")[0]!),
);

/**
 * Sorts the columns of a file into those that make the model and those that are carried through.
 *
 * @throws UnknownNameError where --map names no field of the vocabulary; CommandError where a mapped column is not there, two
 * columns come to one name, or a column to be added is there already
 */
export function planColumns(columns: readonly string[], options: DeriveOptions): ColumnPlan {
  checkNames(columns, options);
  const plan: GivenColumn[] = [];
  const groups: GroupColumn[] = [];
  const derived: GivenColumn[] = [];
  const strangers: string[] = [];
  columns.forEach((column, index) => {
    const name = options.renamed.get(column) ?? column;
    const given = findGiven(name);
    if (given !== undefined) {
      // Who renames a column means it.
      const meant = given.field !== undefined || options.renamed.has(column) || options.given.includes(column);
      (meant ? plan : derived).push({ index, column, given });
    } else if (groupNames.has(name) && options.inputFormat === "jsonl") groups.push({ index, column });
    else strangers.push(column);
  });
  const warnings: string[] = [];
  const standIns = chooseStandIns(plan, derived, options, warnings);
  const givens = [...plan, ...standIns].sort((a, b) => a.index - b.index);
  const takenBy = columnOfGiven(givens);
  for (const column of strangers) {
    const near = nearestName(column, [...modelFieldByName.keys()]);
    // Where the field is given already, a column with a similar name is the user's own.
    if (near === undefined || takenBy.has(near) || options.fill.has(near)) continue;
    warnings.push(
      `column ${describeValue(column)} is not in the vocabulary and is carried through; if it is ${near}, say --map ${describeValue(`${column}=${near}`)}`,
    );
  }
  for (const name of options.fill.keys()) {
    const column = takenBy.get(name);
    if (column !== undefined) {
      warnings.push(`column ${describeValue(column)} gives ${name}; the value that was set fills only its empty cells`);
    }
  }
  return { columns, givens, groups, added: addedColumns(columns, options), warnings };
}

function columnOfGiven(givens: readonly GivenColumn[]): Map<string, string> {
  const takenBy = new Map<string, string>();
  for (const { column, given } of givens) {
    const other = takenBy.get(given.name);
    if (other !== undefined) {
      const two = `${describeValue(other)} and ${describeValue(column)}`;
      throw new CommandError(`derive: the columns ${two} are both ${describeValue(given.name)}`);
    }
    takenBy.set(given.name, column);
  }
  return takenBy;
}

/**
 * Which columns of derived numbers stand in for a parameter, where the command does not say: all of them where they are as many
 * as the needed parameters that nothing else gives; none where none is missing. Says in the warnings what was done.
 */
function chooseStandIns(
  plan: readonly GivenColumn[],
  derived: readonly GivenColumn[],
  options: DeriveOptions,
  warnings: string[],
): readonly GivenColumn[] {
  if (derived.length === 0) return [];
  const names = derived.map(({ column }) => describeValue(column)).join(", ");
  const present = new Set([...plan.map(({ given }) => given.name), ...options.fill.keys()]);
  const missing = slots.filter((slot) => slot.required && !slot.fillers.some((name) => present.has(name)));
  const standing = [...present].filter(isDerived).length;
  const open = missing.length + options.solveFor.length - standing;
  if (open === derived.length) {
    warnings.push(
      `no column gives ${missing.map((slot) => slot.fillers.join(" or ")).join(", nor ")}; solved for from ${names}`,
    );
    return derived;
  }
  if (open > 0 && options.given.length === 0) {
    throw new CommandError(
      `derive: no column gives ${missing.map((slot) => slot.fillers.join(" or ")).join(", nor ")}; say with --given which of ${names} stands in`,
    );
  }
  const one = derived.length === 1;
  warnings.push(
    `${one ? `column ${names} is a derived number, and is` : `columns ${names} are derived numbers, and are`} carried through, not used for the model; --given makes ${one ? "it" : "them"} part of it`,
  );
  return [];
}

function checkNames(columns: readonly string[], { renamed, given }: DeriveOptions): void {
  const known = (option: string, verb: string, column: string): void => {
    if (columns.includes(column)) return;
    const near = nearestName(column, columns);
    const advice =
      near === undefined ? `it has ${columns.map(describeValue).join(", ")}` : `did you mean ${describeValue(near)}?`;
    throw new CommandError(
      `derive: --${option} ${verb} the column ${describeValue(column)}, which the file does not have; ${advice}`,
    );
  };
  for (const [column, name] of renamed) {
    if (findGiven(name) === undefined) {
      throw new UnknownNameError({ where: "derive --map", kind: "parameter", given: name, known: givenNames });
    }
    known("map", "renames", column);
  }
  for (const column of given) {
    known("given", "names", column);
    if (findGiven(renamed.get(column) ?? column) === undefined) {
      throw new UnknownNameError({ where: "derive --given", kind: "parameter", given: column, known: givenNames });
    }
  }
}

function addedColumns(columns: readonly string[], options: DeriveOptions): string[] {
  const added: string[] = [];
  const seen = new Set<string>();
  for (const request of options.requests) {
    const key = `${request.name}(${request.arguments.join(",")})`;
    if (seen.has(key)) throw new CommandError(`derive: --add asks twice for ${describeValue(request.text)}`);
    seen.add(key);
    added.push(request.text);
    if (options.errors) added.push(`${request.text}.error`);
  }
  if (options.keepBadRows) added.push(options.problemColumn);
  added.forEach((name, index) => {
    if (columns.includes(name)) {
      const way = name === options.problemColumn ? "; give another name with --problem-column" : "";
      throw new CommandError(`derive: the file already has a column ${describeValue(name)}${way}`);
    }
    if (added.indexOf(name) !== index) {
      throw new CommandError(`derive: two added columns would have the name ${describeValue(name)}`);
    }
  });
  return added;
}
