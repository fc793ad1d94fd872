import { CosmologyError } from "./cosmologyError";

/** What a {@link NotConvergedError} is made of. */
export interface NotConvergedFields {
  where: string;
  /** What happened, as a clause: "step limit 5000 reached at t = 3.2". */
  reason: string;
  /** The best value so far, if there is one. */
  value?: number;
  /** Its absolute error estimate. */
  error?: number;
  /** Function evaluations spent. */
  evaluations?: number;
}

/** A computation that did not reach its tolerance; it never returns quietly at a limit. */
export class NotConvergedError extends CosmologyError {
  override readonly name = "NotConvergedError";
  readonly reason: string;
  readonly value: number | undefined;
  readonly error: number | undefined;
  readonly evaluations: number | undefined;

  constructor(fields: NotConvergedFields) {
    const best = fields.value === undefined ? "" : `; best value ${fields.value} +- ${fields.error ?? "unknown"}`;
    const effort = fields.evaluations === undefined ? "" : ` after ${fields.evaluations} evaluations`;
    super(fields.where, `${fields.where}: did not converge${effort}: ${fields.reason}${best}`);
    this.reason = fields.reason;
    this.value = fields.value;
    this.error = fields.error;
    this.evaluations = fields.evaluations;
  }
}
