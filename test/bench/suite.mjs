/** The models and the quantities that are timed. */
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

export const root = join(dirname(fileURLToPath(import.meta.url)), "..", "..");
const require = createRequire(import.meta.url);

/** A module of the build. */
export const built = (path) => require(join(root, "dist", path));

/** The full suite of one model. */
export const suite = [
  "lastScatteringRedshift",
  "dragRedshift",
  "lastScatteringSoundHorizon",
  "dragSoundHorizon",
  "acousticAngle",
  "dampingWavenumber",
  "age",
];

/** Models that differ in every call, so that nothing can be remembered between them. */
export function modelNumber(i) {
  return {
    hubble: 67 + 0.5 * Math.sin(i),
    baryonDensity: 0.0224 + 2e-4 * Math.sin(2 * i + 1),
    coldMatterDensity: 0.12 + 1e-3 * Math.sin(3 * i + 2),
  };
}

export function median(numbers) {
  const sorted = [...numbers].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
