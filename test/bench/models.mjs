/** Seeded models for the programs that are compared: a plain chain to be timed, and models that vary in everything to be compared. */

/** Marsaglia's xorshift with 32 bits: uniform numbers in 0 to 1, the same in every run. */
function generator(seed) {
  let state = seed >>> 0 || 1;
  return () => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 2 ** 32;
  };
}

/** Names of the numbers of a model line, as every program reads it; then up to three masses in eV. */
export const fields = [
  "hubble",
  "baryonDensity",
  "coldMatterDensity",
  "curvature",
  "darkEnergy.w0",
  "darkEnergy.wa",
  "neutrinos.effectiveNumber",
];

/** Rows of an invented chain: three parameters vary, one neutrino of 0.06 eV. Each row: the fields, then three masses. */
export function chainModels(count, seed = 20260101) {
  const uniform = generator(seed);
  const around = (middle, width) => middle + width * (uniform() + uniform() + uniform() - 1.5);
  return Array.from({ length: count }, () => [
    around(67.4, 1.2),
    around(0.0224, 4e-4),
    around(0.12, 3e-3),
    0,
    -1,
    0,
    3.044,
    0.06,
    0,
    0,
  ]);
}

/** Models that vary in all ten numbers. */
export function wideModels(count, seed = 20260102) {
  const uniform = generator(seed);
  const between = (low, high) => low + (high - low) * uniform();
  return Array.from({ length: count }, () => {
    const masses = [between(0.02, 0.4), between(0, 0.2), between(0, 0.1)];
    return [
      between(60, 80),
      between(0.016, 0.032),
      between(0.08, 0.2),
      between(-0.1, 0.1),
      between(-1.3, -0.75),
      between(-0.3, 0.3),
      between(2.2, 4.2),
      ...masses,
    ];
  });
}

/** One model a line, numbers apart by blanks. */
export const modelLines = (models) => `${models.map((row) => row.join(" ")).join("\n")}\n`;

/** A model of the list as the givens that a cell takes. */
export function givensOf(row) {
  const [hubble, baryonDensity, coldMatterDensity, curvature, w0, wa, effectiveNumber, ...masses] = row;
  return {
    hubble,
    baryonDensity,
    coldMatterDensity,
    curvature,
    darkEnergy: { w0, wa },
    neutrinos: { effectiveNumber, masses: masses.filter((mass) => mass > 0) },
  };
}

/** Models as the columns that the batch engine takes; a number that all rows share is given once, as a caller would. */
export function columnsOf(models) {
  const column = (k) => {
    const values = Float64Array.from(models, (row) => row[k]);
    return values.every((value) => value === values[0]) ? values[0] : values;
  };
  const columns = Object.fromEntries(fields.map((name, k) => [name, column(k)]));
  const masses = [7, 8, 9].map(column).filter((values) => values !== 0);
  return { ...columns, "neutrinos.masses": masses };
}
