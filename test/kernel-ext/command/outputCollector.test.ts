import { describe, expect, it } from "vitest";
import type { CodeCell } from "../../../kernel-ext/command/notebookFile";
import { OutputCollector } from "../../../kernel-ext/command/outputCollector";
import type { JsonObject, WireMessage } from "../../../kernel-ext/kernel/wire";

function newCell(): CodeCell {
  return { cell_type: "code", id: "c", metadata: {}, source: "", execution_count: null, outputs: [] };
}

function message(type: string, parent: string, content: JsonObject, metadata: JsonObject = {}): WireMessage {
  return {
    identities: [],
    header: { msg_id: "x", msg_type: type, session: "s", username: "u", date: "", version: "5.3" },
    parent: { msg_id: parent },
    metadata,
    content,
    buffers: [],
  };
}

describe("OutputCollector", () => {
  it("merges text of one stream and keeps streams apart, in order", () => {
    const collector = new OutputCollector();
    const cell = newCell();
    collector.assign("1", cell);
    for (const [name, text] of [
      ["stdout", "a\nb"],
      ["stdout", "c\n"],
      ["stderr", "d"],
      ["stdout", "e"],
    ]) {
      collector.take(message("stream", "1", { name, text }));
    }
    collector.finish([cell]);
    expect(cell.outputs).toEqual([
      { output_type: "stream", name: "stdout", text: ["a\n", "bc\n"] },
      { output_type: "stream", name: "stderr", text: ["d"] },
      { output_type: "stream", name: "stdout", text: ["e"] },
    ]);
  });

  it("updates every display with the id, also in earlier cells", () => {
    const collector = new OutputCollector();
    const [first, second] = [newCell(), newCell()];
    collector.assign("1", first);
    collector.assign("2", second);
    const data = (text: string) => ({ data: { "text/plain": text }, metadata: {}, transient: { display_id: "d" } });
    collector.take(message("display_data", "1", data("old")));
    collector.take(message("display_data", "2", data("old")));
    collector.take(message("update_display_data", "2", data("new\nline")));
    const expected = { output_type: "display_data", data: { "text/plain": ["new\n", "line"] }, metadata: {} };
    expect([first.outputs, second.outputs]).toEqual([[expected], [expected]]);
  });

  it("clears at once, or with the next output", () => {
    const collector = new OutputCollector();
    const cell = newCell();
    collector.assign("1", cell);
    collector.take(message("stream", "1", { name: "stdout", text: "a" }));
    collector.take(message("clear_output", "1", { wait: false }));
    expect(cell.outputs).toEqual([]);
    collector.take(message("stream", "1", { name: "stdout", text: "b" }));
    collector.take(message("clear_output", "1", { wait: true }));
    expect(cell.outputs).toHaveLength(1);
    collector.take(message("stream", "1", { name: "stdout", text: "c" }));
    collector.finish([cell]);
    expect(cell.outputs).toEqual([{ output_type: "stream", name: "stdout", text: ["c"] }]);
  });

  it("keeps errors with their line, and tells late ones", () => {
    const collector = new OutputCollector();
    const cell = newCell();
    collector.assign("1", cell);
    const content = { ename: "E", evalue: "v", traceback: ["t"] };
    collector.take(message("error", "1", content, { line: 4 }));
    collector.end("1");
    collector.take(message("error", "1", content));
    expect(collector.errors.map(({ line, late }) => [line, late])).toEqual([
      [4, false],
      [undefined, true],
    ]);
    expect(cell.outputs).toEqual(Array(2).fill({ output_type: "error", ...content }));
  });

  it("lets pass what belongs to no cell of the notebook", () => {
    const collector = new OutputCollector();
    const cell = newCell();
    collector.assign("1", cell);
    collector.take(message("stream", "other", { name: "stdout", text: "a" }));
    expect(cell.outputs).toEqual([]);
  });

  it("keeps JSON as it is and text of pictures in lines", () => {
    const collector = new OutputCollector();
    const cell = newCell();
    collector.assign("1", cell);
    const data = {
      "application/vnd.vegalite.v5+json": { mark: "line" },
      "image/svg+xml": "<svg>\n</svg>",
      "image/png": "AA==",
    };
    collector.take(message("execute_result", "1", { execution_count: 2, data, metadata: {} }));
    expect(cell.outputs).toEqual([
      {
        output_type: "execute_result",
        execution_count: 2,
        data: { ...data, "image/svg+xml": ["<svg>\n", "</svg>"] },
        metadata: {},
      },
    ]);
  });
});
