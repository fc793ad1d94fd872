import { pastRedshiftArgument } from "../quantity";
import { fitQuantity, type PublishedFit } from "./publishedFit";

const jonesWyseFit: PublishedFit = {
  source: "jonesWyse1985",
  label: "Jones & Wyse 1985",
  statement: "an early approximation, the same for every model",
  limits: [{ symbol: "z", low: 800, high: 1200, read: (_, [z]) => z! }],
};

/**
 * Optical depth to a redshift near last scattering: tau = 0.37 (z/1000)^14.25.
 *
 * @param z redshift, 0 or more; made for 800 to 1200 (memory). Source: Jones & Wyse 1985.
 * @example jonesWyseOpticalDepth(1000) // 0.37
 */
export function jonesWyseOpticalDepth(z: number): number {
  return 0.37 * (z / 1000) ** 14.25;
}

/**
 * Visibility function as a Gaussian of mean 1065 and width 80, per unit z.
 *
 * @param z redshift. Source: Jones & Wyse 1985.
 * @example jonesWyseVisibility(1065) // 0.004987
 */
export function jonesWyseVisibility(z: number): number {
  const deviation = (z - 1065) / 80;
  return Math.exp((-deviation * deviation) / 2) / (80 * Math.sqrt(2 * Math.PI));
}

export const opticalDepthJonesWyseQuantity = fitQuantity({
  name: "opticalDepth.jonesWyse1985",
  symbol: "τ",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Optical depth near last scattering by an early approximation",
  equation: String.raw`\tau(z) = 0.37\,(z/1000)^{14.25}`,
  fit: jonesWyseFit,
  compute: (_, [z]) => jonesWyseOpticalDepth(z!),
});

export const visibilityJonesWyseQuantity = fitQuantity({
  name: "visibility.jonesWyse1985",
  symbol: "g",
  unit: "",
  arguments: [pastRedshiftArgument],
  description: "Visibility function as a Gaussian, by an early approximation",
  equation: String.raw`g(z) = \frac{1}{80\sqrt{2\pi}}\,e^{-(z-1065)^2/(2\cdot 80^2)}`,
  fit: jonesWyseFit,
  compute: (_, [z]) => jonesWyseVisibility(z!),
});
