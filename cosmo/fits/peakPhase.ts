import { DomainError } from "../errors";

/** What the phases hang on. */
export interface PeakSetting {
  /** omega_b. */
  readonly baryonDensity: number;
  /** Radiation over matter at last scattering. */
  readonly ratio: number;
  /** n_s. */
  readonly spectralIndex: number;
  /** Mean share of dark energy before last scattering; 0 for a cosmological constant. */
  readonly earlyDarkEnergy: number;
}

/**
 * Phase of a peak: l_m = l_A (m - phi - d_m); this is phi + d_m.
 *
 * phi = (1.466 - 0.466 n) [a1 r^a2 + 0.291 O], a1 = 0.286 + 0.626 w_b, a2 = 0.1786 - 6.308 w_b + 174.9 w_b^2 - 1168 w_b^3; d_1 = 0;
 * d_2 = c0 - c1 r - c2/r + 0.05 (n-1), c0 = -0.1 + (0.213 - 0.123 O) exp[-(52 - 63.6 O) w_b], c1 = 0.063 exp(-3500 w_b^2) + 0.015,
 * c2 = 6e-6 + 0.137 (w_b - 0.07)^2; d_3 = 10 - e1 r^e2 + 0.08 (n-1), e1 = 9.97 + (3.3 - 3 O) w_b,
 * e2 = 0.0016 + 0.0067 O + (0.196 - 0.22 O) w_b + (2.25 + 2.77 O) 1e-5/w_b.
 *
 * @param peak m, 1, 2 or 3; others: DomainError. Source: Doran & Lilley 2002 (memory).
 * @example peakPhase(1, { baryonDensity: 0.0224, ratio: 0.32, spectralIndex: 1, earlyDarkEnergy: 0 }) // 0.264
 */
export function peakPhase(peak: number, setting: PeakSetting): number {
  const { baryonDensity: b, ratio: r, spectralIndex: n, earlyDarkEnergy: early } = setting;
  const a1 = 0.286 + 0.626 * b;
  const a2 = 0.1786 + b * (-6.308 + b * (174.9 - 1168 * b));
  const common = (1.466 - 0.466 * n) * (a1 * r ** a2 + 0.291 * early);
  if (peak === 1) return common;
  if (peak === 2) {
    const c0 = -0.1 + (0.213 - 0.123 * early) * Math.exp(-(52 - 63.6 * early) * b);
    const c1 = 0.063 * Math.exp(-3500 * b * b) + 0.015;
    const c2 = 6e-6 + 0.137 * (b - 0.07) ** 2;
    return common + c0 - c1 * r - c2 / r + 0.05 * (n - 1);
  }
  if (peak === 3) {
    const e1 = 9.97 + (3.3 - 3 * early) * b;
    const e2 = 0.0016 + 0.0067 * early + (0.196 - 0.22 * early) * b + ((2.25 + 2.77 * early) * 1e-5) / b;
    return common + 10 - e1 * r ** e2 + 0.08 * (n - 1);
  }
  throw new DomainError({ where: "peakPhase", argument: "peak", rule: "must be 1, 2 or 3", value: peak });
}
