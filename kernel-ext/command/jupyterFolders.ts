/** Where Jupyter looks for kernels. */
import { homedir } from "node:os";
import { delimiter, join, resolve } from "node:path";

export interface Surroundings {
  environment: NodeJS.ProcessEnv;
  platform: NodeJS.Platform;
  home: string;
}

const here = (): Surroundings => ({ environment: process.env, platform: process.platform, home: homedir() });

/**
 * The user's Jupyter data folder: JUPYTER_DATA_DIR, or what the platform prescribes.
 *
 * Source: Jupyter documentation, "Common directories and file locations" (memory).
 */
export function userDataFolder({ environment, platform, home }: Surroundings = here()): string {
  if (environment.JUPYTER_DATA_DIR) return resolve(environment.JUPYTER_DATA_DIR);
  if (platform === "darwin") return join(home, "Library", "Jupyter");
  if (platform === "win32") return join(environment.APPDATA || join(home, "AppData", "Roaming"), "jupyter");
  return join(environment.XDG_DATA_HOME || join(home, ".local", "share"), "jupyter");
}

/** The data folder that Jupyter searches first: the first of JUPYTER_PATH, or the user's. */
export function firstDataFolder(surroundings: Surroundings = here()): string {
  const first = (surroundings.environment.JUPYTER_PATH ?? "").split(delimiter).find((folder) => folder !== "");
  return first ? resolve(first) : userDataFolder(surroundings);
}

/** The data folder below an installation prefix. */
export function prefixDataFolder(prefix: string): string {
  return join(resolve(prefix), "share", "jupyter");
}
