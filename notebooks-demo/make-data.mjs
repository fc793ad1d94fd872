/**
 * Makes the data of the demo notebooks: node notebooks-demo/make-data.mjs [FOLDER]
 *
 * Everything here is invented. There is no Saltmarsh survey: the redshift distribution, the bins and the counts come from
 * the numbers below and from a seeded generator, so that the same file comes out on every machine, byte for byte.
 */
import { writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const seed = 20261201;

/** Square degrees of the pilot field, and galaxies with a secure redshift expected in one of them, at all redshifts. */
const pilotArea = 15;
const surfaceDensity = 1550;

/** Shape of the invented distribution: z^2 exp(-(z/scale)^steepness). */
const scale = 0.78;
const steepness = 1.45;
const highestRedshift = 4;

/** Edges of the redshift bins. */
const edges = [0.6, 0.8, 1.0, 1.2, 1.4, 1.6, 1.8, 2.0];

/** Uniform numbers between 0 and 1 (Park & Miller 1988, Communications of the ACM 31, 1192: 16807 x modulo 2^31 - 1). */
function generator(start) {
  const modulus = 2 ** 31 - 1;
  let state = start % modulus;
  return () => {
    state = (16807 * state) % modulus;
    return state / modulus;
  };
}

const uniform = generator(seed);
const shape = (z) => z * z * Math.exp(-((z / scale) ** steepness));
const peak = shape(scale * (2 / steepness) ** (1 / steepness));

/** A redshift of the distribution, by rejection. */
function drawRedshift() {
  for (;;) {
    const z = highestRedshift * uniform();
    if (peak * uniform() < shape(z)) return z;
  }
}

/** How long until the next galaxy, where on average one arrives in a unit of time. */
const waitingTime = () => -Math.log(1 - uniform());

// The number of galaxies is Poisson: as many as arrive before the expected number has passed.
const redshifts = [];
let time = waitingTime();
while (time < pilotArea * surfaceDensity) {
  redshifts.push(drawRedshift());
  time += waitingTime();
}

const lines = [
  `# Invented: counts of the Saltmarsh pilot field, ${pilotArea} square degrees (make-data.mjs, seed ${seed})`,
  "bin,zLow,zHigh,zEffective,galaxies",
];
for (let i = 0; i + 1 < edges.length; i++) {
  const inside = redshifts.filter((z) => z >= edges[i] && z < edges[i + 1]);
  const mean = inside.reduce((sum, z) => sum + z, 0) / inside.length;
  lines.push(`S${i + 1},${edges[i].toFixed(1)},${edges[i + 1].toFixed(1)},${mean.toFixed(4)},${inside.length}`);
}

const folder = process.argv[2] ?? dirname(fileURLToPath(import.meta.url));
writeFileSync(join(folder, "saltmarsh-pilot.csv"), `${lines.join("\n")}\n`);
