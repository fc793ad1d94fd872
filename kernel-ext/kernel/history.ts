/** The inputs of this session, for history requests. */
import type { JsonObject } from "./wire";

interface Entry {
  line: number;
  input: string;
  output: string | null;
}

/** The number of the session; nothing is kept from earlier ones. */
const session = 1;

function globPattern(pattern: string): RegExp {
  const escaped = pattern
    .replace(/[.+^${}()|[\]\\]/g, "\\$&")
    .replace(/\*/g, "[^]*")
    .replace(/\?/g, "[^]");
  return new RegExp(`^${escaped}$`);
}

export class History {
  private readonly entries: Entry[] = [];

  add(line: number, input: string, output: string | null): void {
    this.entries.push({ line, input, output });
  }

  /** Answers the content of a history_request. */
  answer(request: JsonObject): JsonObject {
    const limit = typeof request.n === "number" && request.n >= 0 ? request.n : Number.POSITIVE_INFINITY;
    let chosen = this.entries;
    if (request.hist_access_type === "range") {
      const asked = typeof request.session === "number" ? request.session : 0;
      const start = typeof request.start === "number" ? request.start : 1;
      const stop = typeof request.stop === "number" ? request.stop : Number.POSITIVE_INFINITY;
      const ours = asked === 0 || asked === session;
      chosen = ours ? chosen.filter((entry) => entry.line >= start && entry.line < stop) : [];
    } else {
      if (request.hist_access_type === "search") {
        const pattern = globPattern(typeof request.pattern === "string" ? request.pattern : "*");
        chosen = chosen.filter((entry) => pattern.test(entry.input));
        if (request.unique === true) {
          chosen = chosen.filter((entry, at) => !chosen.slice(at + 1).some((later) => later.input === entry.input));
        }
      }
      chosen = limit === Number.POSITIVE_INFINITY ? chosen : chosen.slice(Math.max(0, chosen.length - limit));
    }
    const withOutput = request.output === true;
    return {
      status: "ok",
      history: chosen.map((entry) => [session, entry.line, withOutput ? [entry.input, entry.output] : entry.input]),
    };
  }
}
