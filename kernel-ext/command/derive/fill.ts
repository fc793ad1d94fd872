import { DomainError, describeValue, UnknownNameError } from "../../../cosmo/errors";
import { modelFieldByName, validateGivens } from "../../../cosmo/model";
import { compileModel } from "../../cells/compileModel";
import { CommandError } from "../commandError";
import { findGiven, givenNames } from "./givenNames";
import { type FlatValues, type GivenValue, nestGivens, valueOfText } from "./givensOfRow";
import { splitPairs } from "./pairs";

/** What --set and --recombination give, by the name in the vocabulary. */
export type FillValues = FlatValues;

/**
 * Reads --set and --recombination and checks each value as the model will.
 *
 * @throws UnknownNameError for a name outside the vocabulary, DomainError for a value outside its rule
 */
export function parseFill(lists: readonly string[], recombination: string | undefined): FillValues {
  const pairs = splitPairs(lists, "set", "neutrinos.effectiveNumber=3.046");
  if (recombination !== undefined) pairs.push({ name: "recombination", value: recombination });
  const values = new Map<string, GivenValue>();
  const where = "derive --set";
  for (const { name, value } of pairs) {
    const given = findGiven(name);
    if (given === undefined) throw new UnknownNameError({ where, kind: "parameter", given: name, known: givenNames });
    if (values.has(name)) {
      const both = recombination !== undefined && name === "recombination";
      throw new CommandError(
        both
          ? "derive: --set and --recombination both give the tier"
          : `derive: --set gives ${describeValue(name)} twice`,
      );
    }
    const parsed = valueOfText(given, value);
    if ("reason" in parsed) throw new DomainError({ where, argument: name, rule: parsed.reason, value });
    values.set(name, parsed.value);
  }
  // A derived number has no rule beyond being finite until the model is solved for it.
  const fields = new Map([...values].filter(([name]) => modelFieldByName.has(name)));
  validateGivens(compileModel(nestGivens(fields), where), where);
  return values;
}
