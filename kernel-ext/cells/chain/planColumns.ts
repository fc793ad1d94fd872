import { DomainError, describeValue, UnknownNameError } from "../../../cosmo/errors";
import { modelFieldByName } from "../../../cosmo/model";
import { parseRequest, parseRequests, quantityRegister } from "../../../cosmo/quantities";
import type { ChainCellOptions } from "../chainCell";

const where = "chainCell";

/** Which column of a chain is what. */
export interface ColumnPlan {
  /** Columns of the chain to their names in the vocabulary, or their own. */
  readonly columns: ReadonlyMap<string, string>;
  /** The fields among the names. */
  readonly fields: readonly string[];
  readonly weights: string | undefined;
  readonly hubbleFrom: string | undefined;
}

/** The quantities to be derived, each once. */
export function requestsOf(add: ChainCellOptions["add"]): { text: string; name: string }[] {
  if (add === undefined) return [];
  const requests = typeof add === "string" ? parseRequests(add, where) : add.map((each) => parseRequest(each, where));
  const texts = requests.map(({ text }) => text);
  const twice = texts.find((text, index) => texts.indexOf(text) !== index);
  if (twice !== undefined)
    throw new DomainError({ where, argument: "add", rule: "must not ask twice for one quantity", value: twice });
  return requests;
}

/** Sorts the columns of a chain into parameters, weights and the rest. */
export function planColumns(names: readonly string[], options: ChainCellOptions, deriving: boolean): ColumnPlan {
  const { map = {}, also = [] } = options;
  const isDerived = (name: string): boolean =>
    !modelFieldByName.has(name) && quantityRegister.get(name)?.arguments.length === 0;
  const columns = new Map<string, string>();
  const fields: string[] = [];
  let hubbleFrom: string | undefined;
  for (const [column, name] of Object.entries(map)) {
    if (!names.includes(column))
      throw new UnknownNameError({ where: `${where}: map`, kind: "column of the chain", given: column, known: names });
    if (!modelFieldByName.has(name) && !isDerived(name)) {
      throw new UnknownNameError({
        where: `${where}: map`,
        kind: "parameter",
        given: name,
        known: [...modelFieldByName.keys()],
      });
    }
  }
  const nameOf = (column: string): string => map[column] ?? column;
  const weights = options.weights ?? (names.includes("weight") ? "weight" : undefined);
  const hasHubble = names.some((column) => ["hubble", "reducedHubble"].includes(nameOf(column)));
  const sharedHubble = options.shared?.hubble !== undefined || options.shared?.reducedHubble !== undefined;
  const derived = names.filter((column) => isDerived(nameOf(column)));
  for (const column of names) {
    const name = nameOf(column);
    if (column === weights) continue;
    if (modelFieldByName.get(name)?.kind === "number" || modelFieldByName.get(name)?.kind === "numberOrChoice") {
      if (fields.includes(name))
        throw new DomainError({
          where,
          argument: "chain",
          rule: `must give ${name} in one column only`,
          value: column,
        });
      fields.push(name);
      columns.set(column, name);
    }
  }
  if (deriving && !hasHubble && !sharedHubble) {
    const [only] = derived;
    if (derived.length === 1) {
      hubbleFrom = nameOf(only!);
      columns.set(only!, hubbleFrom);
    } else if (derived.length > 1) {
      const list = derived.map(describeValue).join(", ");
      throw new DomainError({
        where,
        argument: "chain",
        rule: `must give hubble, or one derived number in its place and not ${list}`,
        value: undefined,
      });
    }
  }
  for (const column of also) {
    if (!names.includes(column))
      throw new UnknownNameError({ where: `${where}: also`, kind: "column of the chain", given: column, known: names });
    if (!columns.has(column)) columns.set(column, column);
  }
  if (columns.size === 0) {
    const list = names.map(describeValue).join(", ");
    throw new DomainError({
      where,
      argument: "chain",
      rule: `must have a column by the vocabulary's names (map renames, also takes others along); it has ${list}`,
      value: undefined,
    });
  }
  return { columns, fields, weights, hubbleFrom };
}
