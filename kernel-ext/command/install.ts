/** `cosmology-cells install`: tells Jupyter about the kernel. */
import { existsSync, readFileSync, rmdirSync, rmSync } from "node:fs";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { CommandError } from "./commandError";
import { firstDataFolder, prefixDataFolder, userDataFolder } from "./jupyterFolders";
import { ownKernelArguments } from "./kernelClient";
import { writeWhole } from "./notebookFile";
import { kernelSpecification } from "./runNotebook";

export const installUsage = `cosmology-cells install [options]

Writes the kernel's description where Jupyter looks for kernels: the first folder of JUPYTER_PATH,
else the user's Jupyter data folder (JUPYTER_DATA_DIR, or the platform's own). Python is not needed.

  --user            the user's data folder, whatever JUPYTER_PATH says
  --prefix DIR      DIR/share/jupyter, for an environment of its own
  --remove          takes the description away again, from the same place
`;

/** What the description holds, as Jupyter documents it for kernel.json. */
export function kernelDescription(): object {
  return {
    argv: ownKernelArguments(),
    display_name: kernelSpecification.display_name,
    language: kernelSpecification.language,
    interrupt_mode: "message",
    metadata: { debugger: false, installedBy: kernelSpecification.name },
  };
}

/** Whether the file was written by this command: nobody else's kernel is ever removed. */
function isOurs(file: string): boolean {
  try {
    const { metadata } = JSON.parse(readFileSync(file, "utf8")) as { metadata?: { installedBy?: unknown } };
    return metadata?.installedBy === kernelSpecification.name;
  } catch {
    return false;
  }
}

/** The `install` command; returns the exit code. */
export async function installCommand(args: string[]): Promise<number> {
  const { values } = parseArgs({
    args,
    options: { user: { type: "boolean" }, prefix: { type: "string" }, remove: { type: "boolean" } },
  });
  if (values.user && values.prefix !== undefined) {
    throw new CommandError("install: --user and --prefix name two places; give one of them", installUsage);
  }
  if (values.prefix === "") throw new CommandError("install: --prefix must name a folder", installUsage);
  let data = firstDataFolder();
  if (values.user) data = userDataFolder();
  if (values.prefix !== undefined) data = prefixDataFolder(values.prefix);
  const folder = join(data, "kernels", kernelSpecification.name);
  const file = join(folder, "kernel.json");
  if (values.remove) {
    if (!existsSync(file)) {
      process.stdout.write(`There is no kernel at ${folder}\n`);
      return 0;
    }
    if (!isOurs(file)) throw new CommandError(`install: ${file} was not written by this command and is left alone`);
    rmSync(file);
    try {
      rmdirSync(folder);
    } catch {
      process.stdout.write(`${folder} holds other files and stays\n`);
    }
    process.stdout.write(`Removed the kernel from ${folder}\n`);
    return 0;
  }
  if (existsSync(file) && !isOurs(file)) {
    throw new CommandError(`install: ${file} was not written by this command and is left alone`);
  }
  writeWhole(file, `${JSON.stringify(kernelDescription(), null, 2)}\n`);
  process.stdout.write(`Installed the kernel "${kernelSpecification.display_name}" in ${folder}\n`);
  return 0;
}
