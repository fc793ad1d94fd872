/** A command that was not given as it must be. */
export class CommandError extends Error {
  override name = "CommandError";

  /** @param usage the help text to show below the message, if any */
  constructor(
    message: string,
    readonly usage?: string,
  ) {
    super(message);
  }
}

/** Reads an option that must be a positive number. */
export function numberOption(name: string, value: string | undefined): number | undefined {
  if (value === undefined) return undefined;
  const number = value.trim() === "" ? Number.NaN : Number(value);
  if (!(number > 0 && number < Number.POSITIVE_INFINITY)) {
    throw new CommandError(`--${name} must be a positive number, got ${JSON.stringify(value)}`);
  }
  return number;
}
