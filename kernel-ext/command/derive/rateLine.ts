import { duration } from "../../display/progress";

/** What a {@link RateLine} writes to. */
export interface MessageStream {
  write(text: string): unknown;
  readonly isTTY?: boolean;
}

/** Rows done, rate and time left on standard error: one line that is overwritten on a terminal, else a line now and then. */
export class RateLine {
  private shownAt: number;
  private width = 0;
  private readonly start: number;
  private readonly gap: number;

  /** @param clock milliseconds from any origin */
  constructor(
    private readonly stream: MessageStream,
    private readonly clock: () => number = () => performance.now(),
  ) {
    this.start = clock();
    this.shownAt = this.start;
    this.gap = stream.isTTY === true ? 200 : 2000;
  }

  /** @param share of the input that has been read, 0 to 1; undefined where its length is not known */
  update(rows: number, share: number | undefined): void {
    const now = this.clock();
    if (now - this.shownAt < this.gap) return;
    this.shownAt = now;
    const seconds = (now - this.start) / 1000;
    const left =
      share !== undefined && share > 0 && share < 1 ? `, ${duration((seconds * (1 - share)) / share)} left` : "";
    this.show(`${rows} rows, ${rate(rows, seconds)}${left}`, false);
  }

  finish(rows: number): void {
    const seconds = (this.clock() - this.start) / 1000;
    this.show(`${rows} rows, ${rate(rows, seconds)}, finished in ${duration(seconds)}`, true);
  }

  /** Ends a line that stands open on a terminal, so that a message begins on its own. */
  close(): void {
    if (this.width > 0) this.stream.write("\n");
    this.width = 0;
  }

  private show(text: string, last: boolean): void {
    if (this.stream.isTTY !== true) {
      this.stream.write(`${text}\n`);
      return;
    }
    this.stream.write(`\r${text.padEnd(this.width)}${last ? "\n" : ""}`);
    this.width = last ? 0 : text.length;
  }
}

function rate(rows: number, seconds: number): string {
  const each = rows / seconds;
  return Number.isFinite(each) ? `${Number(each.toPrecision(3))} rows/s` : "no rate yet";
}
