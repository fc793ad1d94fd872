import { readdirSync, readFileSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { describe, expect, it } from "vitest";

/** The rooms of cosmo/ in the order of the house: each imports only from above. */
const order = [
  "sources",
  "errors",
  "constants",
  "published",
  "numerics",
  "quantity",
  "blackbody",
  "model",
  "fits",
  "expansion",
  "times",
  "distances",
  "recombination",
  "lastScattering",
  "acoustics",
  "quantities",
  "batch",
  "solve",
];

const root = join(__dirname, "..", "..");

function sourcesBelow(folder: string): string[] {
  return readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((file) => file.endsWith(".ts"))
    .map((file) => join(folder, file));
}

/** Module names that a file imports or re-exports, types included. */
function importsOf(file: string): string[] {
  const text = readFileSync(file, "utf8");
  return [...text.matchAll(/(?:from|import|require)\s*\(?\s*["']([^"']+)["']/g)].map((match) => match[1]!);
}

const inCosmo = sourcesBelow(join(root, "cosmo")).map((file) => ({
  file: relative(root, file).split(sep).join("/"),
  room: relative(join(root, "cosmo"), file).split(sep)[0]!.replace(/\.ts$/, ""),
  imports: importsOf(file),
}));

describe("the direction of imports", () => {
  it("every room of cosmo/ has its place in the order", () => {
    const rooms = new Set(inCosmo.map((each) => each.room));
    rooms.delete("index");
    expect([...rooms].filter((room) => !order.includes(room))).toEqual([]);
  });

  it("cosmo/ imports nothing from outside: no package, no node module, nothing of kernel-ext/", () => {
    const outside = inCosmo.flatMap(({ file, imports }) =>
      imports.filter((name) => !name.startsWith(".") || name.includes("kernel-ext")).map((name) => `${file}: ${name}`),
    );
    expect(outside).toEqual([]);
  });

  it("a room of cosmo/ imports only rooms above it", () => {
    const upward = inCosmo.flatMap(({ file, room, imports }) => {
      if (room === "index") return [];
      return imports
        .filter((name) => name.startsWith("../"))
        .map((name) => name.split("/").filter((part) => part !== "..")[0]!)
        .filter((target) => order.indexOf(target) > order.indexOf(room))
        .map((target) => `${file} imports ${target}`);
    });
    expect(upward).toEqual([]);
  });

  it("display/ and data/ never import cosmo/", () => {
    for (const room of ["display", "data"]) {
      const bad = sourcesBelow(join(root, "kernel-ext", room)).filter((file) =>
        importsOf(file).some((name) => name.includes("cosmo/")),
      );
      expect(bad, room).toEqual([]);
    }
  });

  it("only cells/, command/, chain/, fit/, workers/, record/ and papercheck/ know the physics", () => {
    const allowed = ["cells", "command", "chain", "fit", "workers", "record", "papercheck", "index.ts"];
    const bad = sourcesBelow(join(root, "kernel-ext"))
      .filter((file) => importsOf(file).some((name) => name.includes("cosmo/")))
      .map((file) => relative(join(root, "kernel-ext"), file).split(sep)[0]!)
      .filter((room) => !allowed.includes(room));
    expect([...new Set(bad)]).toEqual([]);
  });
});
