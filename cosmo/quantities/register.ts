import { comovingDistanceQuantity } from "../distances";
import { UnknownNameError } from "../errors";
import { hubbleRateQuantity, type ModelQuantity } from "../expansion";
import { ageAtQuantity, ageQuantity } from "../times";

/** Every quantity the program knows, in the order in which tables list them: one line a quantity. */
const quantities: readonly ModelQuantity[] = [hubbleRateQuantity, comovingDistanceQuantity, ageQuantity, ageAtQuantity];

/** The register: quantities by name. */
export const quantityRegister: ReadonlyMap<string, ModelQuantity> = new Map(
  quantities.map((quantity) => [quantity.name, quantity]),
);

/** A quantity by name; an unknown one is refused with the name that was probably meant. */
export function findQuantity(name: string, where: string): ModelQuantity {
  const found = quantityRegister.get(name);
  if (found === undefined) {
    throw new UnknownNameError({ where, kind: "quantity", given: name, known: [...quantityRegister.keys()] });
  }
  return found;
}
