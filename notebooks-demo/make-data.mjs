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

// ---- a chain of the planned survey

/** Steps of the chain, and where it starts: off the place where it will stay, so that there is something to leave out. */
const steps = 9000;
const chainStart = [66.2, 0.0221, 0.1245];

/** Centers, errors and correlations of the invented posterior: H0 in km/s/Mpc, omega_b, omega_c. */
const center = [68.0, 0.02236, 0.1193];
const errors = [0.45, 0.00013, 0.001];
const correlations = [
  [1, 0.45, -0.8],
  [0.45, 1, -0.4],
  [-0.8, -0.4, 1],
];

/** Normal numbers (Box & Muller 1958). */
const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());

/** The inverse of a symmetric 3 by 3 matrix, by cofactors. */
function inverse([[a, b, c], [, d, e], [, , f]]) {
  const determinant = a * (d * f - e * e) - b * (b * f - c * e) + c * (b * e - c * d);
  const cofactors = [
    [d * f - e * e, c * e - b * f, b * e - c * d],
    [c * e - b * f, a * f - c * c, b * c - a * e],
    [b * e - c * d, b * c - a * e, a * d - b * b],
  ];
  return cofactors.map((row) => row.map((each) => each / determinant));
}

const precision = inverse(correlations);

/** Minus two times the logarithm of the invented posterior, but for a constant. */
function misfit(point) {
  const pulls = point.map((value, i) => (value - center[i]) / errors[i]);
  return pulls.reduce((sum, p, i) => sum + pulls.reduce((inner, q, j) => inner + p * precision[i][j] * q, 0), 0);
}

// Metropolis et al. 1953: a step is taken when it fits better, else with the ratio of the posteriors; a state that stays is one row with the number of
// its repeats as weight.
const chain = ["# Invented: a chain of the Saltmarsh forecast (make-data.mjs)", "weight,H0,omegab,omegac,misfit"];
let state = chainStart;
let fit = misfit(state);
let repeats = 1;
const writeState = () =>
  chain.push([repeats, state[0].toFixed(4), state[1].toFixed(7), state[2].toFixed(6), fit.toFixed(3)].join(","));
for (let step = 0; step < steps; step++) {
  const proposal = state.map((value, i) => value + 0.5 * errors[i] * normal());
  const proposedFit = misfit(proposal);
  if (uniform() < Math.exp((fit - proposedFit) / 2)) {
    writeState();
    [state, fit, repeats] = [proposal, proposedFit, 1];
  } else repeats++;
}
writeState();
writeFileSync(join(folder, "saltmarsh-chain.csv"), `${chain.join("\n")}\n`);
