import { shownPiece } from "./tableError";

/** A formula that cannot be taken: names the place in it and the reason. */
export class FormulaError extends Error {
  override readonly name = "FormulaError";
  /** The formula as it was written. */
  readonly formula: string;
  /** The place of the fault, counted in characters from 1; undefined where the whole formula is at fault. */
  readonly character: number | undefined;
  /** What is wrong, as a clause: "has an unknown name q". */
  readonly reason: string;
  readonly hint: string | undefined;

  constructor(formula: string, reason: string, character?: number, hint?: string) {
    const place = character === undefined ? "" : ` (character ${character})`;
    super(`the formula ${shownPiece(formula)} ${reason}${place}`);
    this.formula = formula;
    this.character = character;
    this.reason = `${reason}${place}`;
    this.hint = hint;
  }
}
