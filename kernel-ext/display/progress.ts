/**
 * A progress bar that is updated in place.
 */
import { randomUUID } from "node:crypto";
import { escapeHtml, visibleText } from "./escape";
import { displaySink, type MimeBundle } from "./sink";

/** What a bar counts. */
export interface ProgressOptions {
  readonly label: string;
  /** How many steps there are. */
  readonly total: number;
  /** What is counted, for the rate: "models". Default "steps". */
  readonly unit?: string | undefined;
  /** Milliseconds from any origin; for tests. */
  readonly clock?: (() => number) | undefined;
  /** Where lines go when no notebook takes displays; default standard error. */
  readonly write?: ((line: string) => void) | undefined;
}

/** A running bar. */
export interface Progress {
  /** Says how many steps are done; shown at most ten times a second. */
  update(done: number): void;
  /** Shows the end. */
  finish(): void;
  /** Shows that the work was stopped, and how far it had come. */
  interrupted(): void;
}

const shortestGap = 100;
/** Without a notebook each update is a line of its own, so that there are fewer. */
const shortestGapOfLines = 2000;
const barWidth = 24;

/** Seconds as a person says them: 8 s, 2 min 05 s, 3 h 20 min. */
export function duration(seconds: number): string {
  const whole = Math.max(0, Math.round(seconds));
  if (whole < 60) return `${whole} s`;
  const two = (count: number): string => String(count).padStart(2, "0");
  if (whole < 3600) return `${Math.floor(whole / 60)} min ${two(whole % 60)} s`;
  return `${Math.floor(whole / 3600)} h ${two(Math.floor((whole % 3600) / 60))} min`;
}

function rateText(rate: number, unit: string): string {
  if (!(rate > 0 && rate < Number.POSITIVE_INFINITY)) return "";
  return rate >= 1 ? `${Number(rate.toPrecision(3))} ${unit}/s` : `${Number((1 / rate).toPrecision(3))} s each`;
}

/**
 * Starts a progress bar and shows it.
 *
 * The rate is the mean since the start; the time left follows from it. The last state is always shown.
 *
 * @param options label, total
 * @throws RangeError when total is not a whole number of at least 1, or an update is not between 0 and total
 * @example const bar = progress({ label: "Rows", total: rows.length }); bar.update(10); bar.finish();
 */
export function progress(options: ProgressOptions): Progress {
  const { total } = options;
  if (!(Number.isSafeInteger(total) && total >= 1)) {
    throw new RangeError(`progress: total must be a whole number of at least 1, got ${String(total)}`);
  }
  const label = visibleText(options.label);
  const unit = visibleText(options.unit ?? "steps");
  const clock = options.clock ?? (() => performance.now());
  const write = options.write ?? ((line: string) => process.stderr.write(`${line}\n`));
  const sink = displaySink();
  const displayId = `progress-${randomUUID()}`;
  const start = clock();
  let done = 0;
  let shownAt = Number.NEGATIVE_INFINITY;
  let ended = false;

  const figures = (state: "running" | "finished" | "interrupted"): string => {
    const seconds = (clock() - start) / 1000;
    const rate = done / seconds;
    const parts = [`${done} of ${total} ${unit}`];
    const pace = rateText(rate, unit);
    if (pace !== "") parts.push(pace);
    if (state === "running" && done > 0 && pace !== "") parts.push(`${duration((total - done) / rate)} left`);
    if (state === "finished") parts.push(`finished in ${duration(seconds)}`);
    if (state === "interrupted") parts.push(`interrupted after ${duration(seconds)}`);
    return parts.join(", ");
  };

  const bundle = (state: "running" | "finished" | "interrupted"): MimeBundle => {
    const filled = Math.round((done / total) * barWidth);
    const text = `${label} [${"#".repeat(filled)}${".".repeat(barWidth - filled)}] ${figures(state)}`;
    const html =
      `<div class="cell-output cell-progress">${escapeHtml(label)} ` +
      `<progress max="${total}" value="${done}" aria-label="${escapeHtml(label)}" style="vertical-align:middle"></progress> ` +
      `<span style="font-variant-numeric:tabular-nums">${escapeHtml(figures(state))}</span></div>`;
    return { "text/html": html, "text/plain": text };
  };

  const present = (state: "running" | "finished" | "interrupted"): void => {
    const content = bundle(state);
    if (sink === undefined) write(String(content["text/plain"]));
    else if (shownAt === Number.NEGATIVE_INFINITY) sink.show(content, displayId);
    else sink.update(displayId, content);
    shownAt = clock();
  };

  const end = (state: "finished" | "interrupted"): void => {
    if (ended) return;
    ended = true;
    present(state);
  };

  present("running");
  return {
    update(count) {
      if (!(count >= 0 && count <= total)) {
        throw new RangeError(`progress: done must be between 0 and ${total}, got ${String(count)}`);
      }
      done = count;
      const gap = sink === undefined ? shortestGapOfLines : shortestGap;
      if (!ended && clock() - shownAt >= gap) present("running");
    },
    finish() {
      done = total;
      end("finished");
    },
    interrupted() {
      end("interrupted");
    },
  };
}
