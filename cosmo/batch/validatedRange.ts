import type { BatchRow } from "./batchRow";

/** Where the engine was compared with the single path: see test/cosmo/batch/accuracy.test.ts. Rows outside take the single path. */
export const validatedRange = {
  reducedHubble: [0.45, 1],
  baryonDensity: [0.014, 0.038],
  /** Baryons and cold matter. */
  matter: [0.07, 0.3],
  curvature: [-0.22, 0.22],
  w0: [-1.6, -0.5],
  wa: [-1, 0.6],
  /** The sum w0 + wa, to which w tends early. */
  earlyState: [-2.6, -0.3],
  effectiveNumber: [1.3, 5.5],
  /** Sum of the masses in eV. */
  massSum: [0, 6],
  photonTemperature: [2.45, 2.95],
  helium: [0, 0.32],
} as const;

function within(range: readonly [number, number], value: number): boolean {
  return value >= range[0] && value <= range[1];
}

/** Whether the engine may take a row; false for anything that is not a number. */
export function isInsideRange(row: BatchRow): boolean {
  return (
    within(validatedRange.reducedHubble, row.reducedHubble) &&
    within(validatedRange.baryonDensity, row.baryonDensity) &&
    within(validatedRange.matter, row.baryonDensity + row.coldMatterDensity) &&
    row.coldMatterDensity >= 0 &&
    within(validatedRange.curvature, row.curvature) &&
    within(validatedRange.w0, row.w0) &&
    within(validatedRange.wa, row.wa) &&
    within(validatedRange.earlyState, row.w0 + row.wa) &&
    within(validatedRange.effectiveNumber, row.effectiveNumber) &&
    within(validatedRange.massSum, row.massSum) &&
    within(validatedRange.photonTemperature, row.photonTemperature) &&
    within(validatedRange.helium, row.helium)
  );
}

/** Places in a, for a model that dark energy or curvature may have kept from a Big Bang. */
const scanPoints = 40;

/**
 * Whether a row certainly has a Big Bang and H stays well away from 0 since: without radiation, (H/100)^2 a^3 =
 * omega_cb + omega_k a + omega_DE f(a) a^3 stays above half of omega_cb. Rows that do not pass take the single path, which looks closely.
 */
export function staysExpanding(row: BatchRow): boolean {
  const matter = row.baryonDensity + row.coldMatterDensity;
  const curvature = row.curvature * row.reducedHubble * row.reducedHubble;
  const darkEnergy = row.darkEnergyDensity;
  if (darkEnergy >= 0 && curvature >= -0.5 * matter) return true;
  const exponent = -3 * (row.w0 + row.wa);
  for (let k = 1; k <= scanPoints; k++) {
    const a = k / scanPoints;
    const growth = Math.exp(exponent * Math.log(a) - 3 * row.wa * (1 - a));
    if (!(matter + curvature * a + darkEnergy * growth > 0.5 * matter)) return false;
  }
  return true;
}
