/** The command line: which command, and what its failures look like. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { nearestName } from "../../cosmo/errors";
import { CommandError } from "./commandError";
import { deriveUsage } from "./derive/usage";
import { installCommand, installUsage } from "./install";
import { NotebookFileError } from "./notebookFile";
import { runCommand, runUsage } from "./run";
import { startCommand, startUsage } from "./start";

interface Command {
  summary: string;
  usage: string;
  run(args: string[]): Promise<number>;
}

const commands: Record<string, Command> = {
  install: { summary: "tell Jupyter about the kernel, or take it away", usage: installUsage, run: installCommand },
  derive: {
    summary: "add derived columns to a file of models",
    usage: deriveUsage,
    // Loaded when asked for: it brings the physics, which the other commands do not need.
    run: (args) => (require("./derive") as typeof import("./derive")).deriveCommand(args),
  },
  run: { summary: "run notebooks without Jupyter", usage: runUsage, run: runCommand },
  start: { summary: "run the demo notebooks, print their headline numbers", usage: startUsage, run: startCommand },
};

function version(): string {
  const file = join(__dirname, "..", "..", "..", "package.json");
  return (JSON.parse(readFileSync(file, "utf8")) as { version: string }).version;
}

function usage(): string {
  const names = Object.keys(commands);
  const width = Math.max(...names.map((name) => name.length));
  const lines = names.map((name) => `  ${name.padEnd(width)}   ${commands[name].summary}`);
  return [
    "cosmology-cells COMMAND [options]",
    "",
    ...lines,
    "",
    "  --help      this text; with a command, the text of that command",
    "  --version   the version",
    "",
  ].join("\n");
}

/** Errors of node's own option parser, whose message is meant for the user. */
function isOptionError(error: unknown): error is Error {
  return error instanceof Error && String((error as NodeJS.ErrnoException).code).startsWith("ERR_PARSE_ARGS");
}

/** Runs a command line; returns the exit code: 0 done, 1 the work failed, 2 it was asked for wrongly. */
export async function main(args: string[]): Promise<number> {
  const [name, ...rest] = args;
  if (name === undefined || name === "--help" || name === "-h") {
    (name === undefined ? process.stderr : process.stdout).write(usage());
    return name === undefined ? 2 : 0;
  }
  if (name === "--version") {
    process.stdout.write(`${version()}\n`);
    return 0;
  }
  const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
  if (!command) {
    const near = nearestName(name, Object.keys(commands));
    process.stderr.write(`cosmology-cells: there is no command ${JSON.stringify(name)}`);
    process.stderr.write(near === undefined ? "\n\n" : `; did you mean ${near}?\n\n`);
    process.stderr.write(usage());
    return 2;
  }
  if (rest.includes("--help") || rest.includes("-h")) {
    process.stdout.write(command.usage);
    return 0;
  }
  try {
    return await command.run(rest);
  } catch (error) {
    if (error instanceof CommandError) {
      process.stderr.write(`cosmology-cells: ${error.message}\n${error.usage ? `\n${error.usage}` : ""}`);
      return 2;
    }
    if (error instanceof NotebookFileError || isOptionError(error)) {
      process.stderr.write(`cosmology-cells: ${error.message}\n`);
      return 2;
    }
    throw error;
  }
}
