import { type ConstantsSet, lightSpeed } from "../constants";
import type { QuantityArgument } from "../quantity";
import { type BlackbodyQuantity, requireTemperature } from "./blackbodyModel";
import { colorMatching, firstWavelength, wavelengthStep } from "./colorMatching";

/** Chromaticity coordinates in the CIE 1931 diagram. */
export interface Chromaticity {
  readonly x: number;
  readonly y: number;
}

/**
 * Color of a blackbody: its place in the CIE 1931 diagram (2-degree observer).
 *
 * X = sum B_lambda x(lambda), Y and Z likewise; x = X/(X + Y + Z), y = Y/(X + Y + Z). Equal energy is white at (1/3, 1/3).
 *
 * @param temperature T in K, positive; others: DomainError. Toward 0 the color tends to the red end of the spectrum.
 * Method: sum over 380 to 780 nm in steps of 5 nm, as the standard prescribes. Accuracy 2e-5 in x and y, from 1500 K up
 * (measured against the standard's illuminant A: 6e-6); the table ends at 780 nm, which colder bodies feel.
 * Source: CIE 15 (color-matching functions, and illuminant A as the check).
 * @example blackbodyChromaticity(3000, constantsSets.codata2022) // { x: 0.4369, y: 0.4041 }
 */
export function blackbodyChromaticity(temperature: number, constants: ConstantsSet): Chromaticity {
  return weighted(temperature, constants, 1);
}

function weighted(temperature: number, constants: ConstantsSet, stride: number): Chromaticity {
  requireTemperature(temperature, "blackbodyChromaticity");
  const scale = (constants.planck * lightSpeed * 1e9) / (constants.boltzmann * temperature);
  const last = firstWavelength + wavelengthStep * (colorMatching.length - 1);
  const sum = [0, 0, 0];
  for (let i = 0; i < colorMatching.length; i += stride) {
    const wavelength = firstWavelength + wavelengthStep * i;
    // Brightness over that at the red end but for e^x - 1, so that a cold body does not underflow to 0/0.
    const relative = Math.exp(scale / last - scale / wavelength) / -Math.expm1(-scale / wavelength);
    const brightness = relative / wavelength ** 5;
    colorMatching[i]!.forEach((value, k) => {
      sum[k]! += brightness * value;
    });
  }
  const [x, y, z] = sum as [number, number, number];
  return { x: x / (x + y + z), y: y / (x + y + z) };
}

const temperatureArgument: QuantityArgument = {
  name: "temperature",
  symbol: "T",
  unit: "K",
  rule: "must be finite and positive",
  accepts: (value) => value > 0 && Number.isFinite(value),
};

/** The table holds six decimals. */
const tableRounding = 2e-6;

function coordinate(axis: "x" | "y"): BlackbodyQuantity {
  const numerator = axis.toUpperCase();
  return {
    name: `blackbodyChromaticity${numerator}`,
    symbol: axis,
    unit: "",
    arguments: [temperatureArgument],
    description: `Color of a blackbody: ${axis} in the CIE 1931 diagram`,
    equation: String.raw`${axis} = \frac{${numerator}}{X+Y+Z}, \quad X = \sum_\lambda B_\lambda(T)\,\bar x(\lambda)`,
    method: "sum over the color-matching functions from 380 to 780 nm in steps of 5 nm",
    accuracy: 5e-4,
    sources: ["cie2004", "planck1901"],
    notes: (_, [temperature]) =>
      temperature! < 1000
        ? [{ level: "note", text: "below 1000 K most of what the eye would see lies at the red end of the CIE table" }]
        : [],
    compute: ({ model }, [temperature]) => {
      const value = blackbodyChromaticity(temperature!, model.constants)[axis];
      const coarser = weighted(temperature!, model.constants, 2)[axis];
      return { value, error: Math.abs(value - coarser) + tableRounding };
    },
  };
}

export const blackbodyChromaticityXQuantity = coordinate("x");
export const blackbodyChromaticityYQuantity = coordinate("y");
