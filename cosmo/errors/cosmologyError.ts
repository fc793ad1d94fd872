/**
 * The root of the program's own errors: data first (fields), words second (message made from the fields).
 *
 * `hint`, where present, is one sentence that says what to do; front ends show it on a line of its own.
 */
export abstract class CosmologyError extends Error {
  /** The name of the function, quantity or cell helper that refused. */
  readonly where: string;
  /** What would mend it, in one sentence. */
  readonly hint: string | undefined;

  protected constructor(where: string, message: string, hint?: string) {
    super(message);
    this.where = where;
    this.hint = hint;
  }
}
