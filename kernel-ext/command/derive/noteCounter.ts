import type { ValidityNote } from "../../../cosmo/quantity";

interface Seen {
  readonly text: string;
  readonly firstRow: number;
  count: number;
}

/** Counts the warnings that come with numbers, so that a file of a million rows tells each once. */
export class NoteCounter {
  private readonly seen = new Map<string, Seen>();

  /** Takes a note; those below the level of a warning are not counted. */
  add(column: string, row: number, note: ValidityNote): void {
    if (note.level !== "warning") return;
    const known = this.seen.get(column);
    if (known === undefined) this.seen.set(column, { text: note.text, firstRow: row, count: 1 });
    else known.count++;
  }

  /** One sentence a warning; columns with the same warning in the same rows share it. */
  sentences(): string[] {
    const columns = new Map<string, string[]>();
    for (const [column, { text, firstRow, count }] of this.seen) {
      const words = `${count === 1 ? `row ${firstRow}` : `${count} rows, first in row ${firstRow}`}: ${text}`;
      columns.set(words, [...(columns.get(words) ?? []), column]);
    }
    return [...columns].map(([words, names]) => `${names.join(", ")}: warning in ${words}`);
  }
}
