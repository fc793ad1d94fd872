import { expect } from "vitest";
import { CosmologyError } from "../../../cosmo/errors";

/** Message and hint of what a wrong input meets. */
export function refusal(run: () => unknown): string {
  try {
    run();
  } catch (error) {
    expect(error).toBeInstanceOf(CosmologyError);
    const { message, hint } = error as CosmologyError;
    return hint === undefined ? message : `${message} | ${hint}`;
  }
  throw new Error("nothing was refused");
}
