import type { QuantityValue } from "../../cosmo/quantity";
import type { ModelNumbers } from "../../cosmo/solve";

/** Several quantities without arguments, by name: the numbers of a cell's table and the plain values of the next cell. */
export function namedQuantities<const Names extends readonly string[]>(
  numbers: ModelNumbers,
  names: Names,
): { list: QuantityValue[]; values: { [name in Names[number]]: number } } {
  const list = names.map((name) => numbers.quantity(name));
  const values = Object.fromEntries(list.map((each) => [each.name, each.value]));
  return { list, values: values as { [name in Names[number]]: number } };
}
