import { DomainError, UnknownNameError } from "../../cosmo/errors";

/** Refuses options that a cell helper does not have, with the one that was probably meant. */
export function checkOptions(options: unknown, known: readonly string[], where: string): void {
  if (options === undefined) return;
  if (typeof options !== "object" || options === null || Array.isArray(options)) {
    throw new DomainError({
      where,
      argument: "options",
      rule: `must be an object with ${known.join(", ")}`,
      value: options,
    });
  }
  for (const name of Object.keys(options)) {
    if (!known.includes(name)) throw new UnknownNameError({ where, kind: "option", given: name, known });
  }
}
