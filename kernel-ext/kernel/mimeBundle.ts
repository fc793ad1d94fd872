/** From a value to the MIME bundle that a front end gets. */
import { inspect } from "node:util";
import { displaySymbol, type MimeBundle } from "../display/sink";

/** Text of a value as an interactive console would show it. */
export function plainTextOf(value: unknown): string {
  return inspect(value, { depth: 4, maxArrayLength: 100, maxStringLength: 10_000, breakLength: 100 });
}

/** A bundle that can travel as JSON: bytes become base64 text. Throws for what JSON cannot carry. */
export function portableBundle(bundle: MimeBundle): MimeBundle {
  if (typeof bundle !== "object" || bundle === null || Array.isArray(bundle)) {
    throw new TypeError(`a MIME bundle must be an object from media types to content, got ${plainTextOf(bundle)}`);
  }
  const portable: MimeBundle = {};
  for (const [type, content] of Object.entries(bundle)) {
    if (content === undefined) continue;
    if (content instanceof Uint8Array) portable[type] = Buffer.from(content).toString("base64");
    else portable[type] = JSON.parse(JSON.stringify(content));
  }
  return portable;
}

function displayMethod(value: unknown): (() => unknown) | undefined {
  if ((typeof value !== "object" && typeof value !== "function") || value === null) return undefined;
  const method = (value as Record<symbol, unknown>)[displaySymbol];
  return typeof method === "function" ? () => method.call(value) : undefined;
}

/** The bundle of a value: its own if it offers one, else its text. */
export async function bundleOf(value: unknown): Promise<MimeBundle> {
  const method = displayMethod(value);
  if (!method) return { "text/plain": plainTextOf(value) };
  const bundle = portableBundle((await method()) as MimeBundle);
  if (!("text/plain" in bundle)) bundle["text/plain"] = plainTextOf(value);
  return bundle;
}
