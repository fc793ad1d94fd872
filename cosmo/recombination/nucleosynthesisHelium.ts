import { atoms } from "../constants";

/**
 * Primordial helium from big-bang nucleosynthesis, as a mass fraction Y_p.
 *
 * Y_BBN = 0.2311 + 0.9502 w - 11.27 w^2 + dN (0.01356 + 0.008581 w - 0.1810 w^2) + dN^2 (-0.0009795 - 0.001370 w + 0.01746 w^2)
 * with w = omega_b, dN = N_eff - 3.046: a fraction of nucleons. To mass: Y_p = r Y/(r Y + 1 - Y), r = m_He/(4 m_H).
 *
 * @param baryonDensity omega_b; the fit was made near 0.02; @param effectiveNumber N_eff.
 * Source: Planck 2015 XIII, section 6.5 (memory). 0.24682 by nucleons is 0.24549 by mass.
 * @example nucleosynthesisHelium(0.0224, 3.044) // 0.2455
 */
export function nucleosynthesisHelium(baryonDensity: number, effectiveNumber: number): number {
  const w = baryonDensity;
  const d = effectiveNumber - 3.046;
  const byNucleons =
    0.2311 +
    w * (0.9502 - 11.27 * w) +
    d * (0.01356 + w * (0.008581 - 0.181 * w)) +
    d * d * (-0.0009795 + w * (-0.00137 + 0.01746 * w));
  return massFractionFromNucleonFraction(byNucleons);
}

/** Y_p by mass from the share of nucleons in helium: r Y/(r Y + 1 - Y), r = m_He/(4 m_H). */
export function massFractionFromNucleonFraction(byNucleons: number): number {
  const r = atoms.heliumToHydrogenMass / 4;
  return (r * byNucleons) / (r * byNucleons + 1 - byNucleons);
}
