import { describeValue, nearestName, UnknownNameError } from "../../../cosmo/errors";
import { type ModelField, modelFieldByName, modelFields } from "../../../cosmo/model";
import { quantityRegister } from "../../../cosmo/quantities";
import { CommandError } from "../commandError";
import type { DeriveOptions } from "./options";

/** A column of the file that gives a field of the model. */
export interface FieldColumn {
  readonly index: number;
  /** The name in the file. */
  readonly column: string;
  readonly field: ModelField;
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
  readonly fields: readonly FieldColumn[];
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
  checkRenaming(columns, options.renamed);
  const fields: FieldColumn[] = [];
  const groups: GroupColumn[] = [];
  const warnings: string[] = [];
  const derived: string[] = [];
  const strangers: string[] = [];
  const takenBy = new Map<string, string>();
  columns.forEach((column, index) => {
    const name = options.renamed.get(column) ?? column;
    const field = modelFieldByName.get(name);
    if (field !== undefined) {
      const other = takenBy.get(name);
      if (other !== undefined) {
        const two = `${describeValue(other)} and ${describeValue(column)}`;
        throw new CommandError(`derive: the columns ${two} are both ${describeValue(name)}`);
      }
      takenBy.set(name, column);
      fields.push({ index, column, field });
    } else if (groupNames.has(name) && options.inputFormat === "jsonl") groups.push({ index, column });
    else if (quantityRegister.has(name)) derived.push(column);
    else strangers.push(column);
  });
  for (const column of strangers) {
    const near = nearestName(column, [...modelFieldByName.keys()]);
    // Where the field is given already, a column with a similar name is the user's own.
    if (near === undefined || takenBy.has(near) || options.fill.has(near)) continue;
    warnings.push(
      `column ${describeValue(column)} is not in the vocabulary and is carried through; if it is ${near}, say --map ${describeValue(`${column}=${near}`)}`,
    );
  }
  if (derived.length > 0) {
    const names = derived.map((name) => describeValue(name)).join(", ");
    warnings.push(
      `${derived.length === 1 ? `column ${names} is a derived quantity, and is` : `columns ${names} are derived quantities, and are`} carried through, not used for the model`,
    );
  }
  for (const name of options.fill.keys()) {
    const column = takenBy.get(name);
    if (column !== undefined) {
      warnings.push(`column ${describeValue(column)} gives ${name}; the value that was set fills only its empty cells`);
    }
  }
  return { columns, fields, groups, added: addedColumns(columns, options), warnings };
}

function checkRenaming(columns: readonly string[], renamed: ReadonlyMap<string, string>): void {
  for (const [column, field] of renamed) {
    if (!modelFieldByName.has(field)) {
      const known = [...modelFieldByName.keys()];
      throw new UnknownNameError({ where: "derive --map", kind: "parameter", given: field, known });
    }
    if (!columns.includes(column)) {
      const near = nearestName(column, columns);
      throw new CommandError(
        `derive: --map renames the column ${describeValue(column)}, which the file does not have${near === undefined ? `; it has ${columns.map(describeValue).join(", ")}` : `; did you mean ${describeValue(near)}?`}`,
      );
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
