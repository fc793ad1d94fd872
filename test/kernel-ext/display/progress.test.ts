import { afterEach, describe, expect, it } from "vitest";
import { type MimeBundle, progress, setDisplaySink } from "../../../kernel-ext/display";
import { duration } from "../../../kernel-ext/display/progress";

interface Event {
  id: string | undefined;
  update: boolean;
  text: string;
  html: string;
}

/** A sink that keeps what it is shown, and a clock that stands still until it is moved. */
function stage() {
  const events: Event[] = [];
  const event = (bundle: MimeBundle, id: string | undefined, update: boolean): void => {
    events.push({ id, update, text: String(bundle["text/plain"]), html: String(bundle["text/html"]) });
  };
  setDisplaySink({ show: (bundle, id) => event(bundle, id, false), update: (id, bundle) => event(bundle, id, true) });
  const time = { now: 5000 };
  return { events, time, clock: () => time.now };
}

afterEach(() => setDisplaySink(undefined));

describe("progress", () => {
  it("is shown at once and then updated in place, with rate and time left", () => {
    const { events, time, clock } = stage();
    const bar = progress({ label: "Rows", total: 200, unit: "rows", clock });
    time.now += 2000;
    bar.update(50);
    expect(events.map(({ update }) => update)).toEqual([false, true]);
    expect(events[0]?.id).toMatch(/^progress-/);
    expect(events[1]?.id).toBe(events[0]?.id);
    expect(events[0]?.text).toBe("Rows [........................] 0 of 200 rows");
    expect(events[1]?.text).toBe("Rows [######..................] 50 of 200 rows, 25 rows/s, 6 s left");
    expect(events[1]?.html).toContain('<progress max="200" value="50" aria-label="Rows"');
  });

  it("is updated at most ten times a second, and the last state is always shown", () => {
    const { events, time, clock } = stage();
    const bar = progress({ label: "Rows", total: 1000, clock });
    for (let done = 1; done <= 1000; done++) {
      time.now += 1;
      bar.update(done);
    }
    bar.finish();
    const updates = events.filter(({ update }) => update);
    expect(updates).toHaveLength(11);
    expect(updates.at(-1)?.text).toBe(
      "Rows [########################] 1000 of 1000 steps, 1000 steps/s, finished in 1 s",
    );
  });

  it("says how far it came when it is interrupted, and nothing after that", () => {
    const { events, time, clock } = stage();
    const bar = progress({ label: "Rows", total: 10, clock });
    time.now += 40_000;
    bar.update(3);
    bar.interrupted();
    bar.update(4);
    bar.finish();
    expect(events.at(-1)?.text).toContain("3 of 10 steps, 13.3 s each, interrupted after 40 s");
    expect(events).toHaveLength(3);
  });

  it("without a sink writes lines, at most one in two seconds, and the end", () => {
    const lines: string[] = [];
    const time = { now: 0 };
    const bar = progress({ label: "Rows", total: 100, clock: () => time.now, write: (line) => lines.push(line) });
    for (let done = 1; done <= 100; done++) {
      time.now += 50;
      bar.update(done);
    }
    bar.finish();
    expect(lines).toHaveLength(4);
    expect(lines.at(-1)).toContain("100 of 100 steps, 20 steps/s, finished in 5 s");
  });

  it("escapes its label", () => {
    const { events, clock } = stage();
    progress({ label: '<b>"x"\u001b', total: 1, clock });
    for (const sign of ["<b>", "\u001b"]) expect(events[0]?.html).not.toContain(sign);
    expect(events[0]?.text).not.toContain("\u001b");
  });

  it("refuses a total or a count that cannot be", () => {
    const { clock } = stage();
    expect(() => progress({ label: "x", total: 0, clock })).toThrow(
      "progress: total must be a whole number of at least 1, got 0",
    );
    expect(() => progress({ label: "x", total: Number.NaN, clock })).toThrow("got NaN");
    const bar = progress({ label: "x", total: 5, clock });
    expect(() => bar.update(6)).toThrow("progress: done must be between 0 and 5, got 6");
    expect(() => bar.update(Number.NaN)).toThrow("got NaN");
  });
});

describe("duration", () => {
  it("speaks of seconds, minutes and hours", () => {
    expect([0, 59.4, 59.6, 125, 3600, 12_000].map(duration)).toEqual([
      "0 s",
      "59 s",
      "1 min 00 s",
      "2 min 05 s",
      "1 h 00 min",
      "3 h 20 min",
    ]);
  });
});
