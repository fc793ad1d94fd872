/** A statement on where a number stops being valid, shown with the result. */
export interface ValidityNote {
  /** `warning`: the number should not be used as it stands without thought; `note`: good to know. */
  readonly level: "note" | "warning";
  readonly text: string;
}
