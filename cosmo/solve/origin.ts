/** Where a model came from, for the texts of errors. */
export interface Origin {
  /** The function or cell helper that asked. */
  where?: string;
  /** Row of a file, where there is one. */
  place?: string | undefined;
}
