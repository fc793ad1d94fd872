import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { constantsSets } from "../../../cosmo/constants";
import { unitDensity } from "../../../cosmo/model";
import { findRoot } from "../../../cosmo/numerics";
import { sahaEquilibrium } from "../../../cosmo/recombination";

const constants = constantsSets.codata2018;

describe("sahaEquilibrium", () => {
  it("ionizes 99% of pure hydrogen at z = 1586.7 with h 0.7, T_cmb 2.725 K, Omega_b 0.046", () => {
    // Callin 2006, astro-ph/0606683: z = 1587.6, with the ionization energy rounded up to 13.6057 eV (that of infinite nuclear mass).
    const hydrogenMass = 1.0078250319 * constants.atomicMassUnit;
    const today = (0.046 * 0.7 ** 2 * unitDensity(constants)) / hydrogenMass;
    const ionized = (z: number) => sahaEquilibrium(2.725 * (1 + z), today * (1 + z) ** 3, 0, constants).ionized;
    const z = findRoot((each) => ionized(each) - 0.99, 1400, 1800).value;
    expect(z).toBeCloseTo(1586.7, 1);
    // The energy enters as chi/kT, so the printed redshift follows from the ratio of the two energies.
    const electronvolts = 109678.77174307e2 * ((constants.planck * 299792458) / constants.elementaryCharge);
    expect(((1 + z) * 13.6057) / electronvolts - 1).toBeCloseTo(1587.6, 0);
  });

  it("puts the electrons where each ion says they are: x_e = x_p + f_He (y1 + 2 y2)", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1500, max: 30000, noNaN: true }),
        fc.double({ min: 6, max: 12, noNaN: true }),
        fc.double({ min: 0, max: 0.2, noNaN: true }),
        (temperature, logDensity, ratio) => {
          const density = 10 ** logDensity;
          const state = sahaEquilibrium(temperature, density, ratio, constants);
          const counted = state.hydrogen + ratio * (state.heliumOnce + 2 * state.heliumTwice);
          // Measured 2.2e-16 at worst of 3000.
          expect(Math.abs(state.ionized / counted - 1)).toBeLessThan(3e-15);
          // The law itself for hydrogen: n_e n_p/n_1s = (2 pi m_e k T/h^2)^1.5 e^(-chi/kT).
          const states = ((2 * Math.PI * 9.1093837015e-31 * 1.380649e-23 * temperature) / 6.62607015e-34 ** 2) ** 1.5;
          const exponent = (6.62607015e-34 * 299792458 * 109678.77174307e2) / (1.380649e-23 * temperature);
          const left = Math.log(state.ionized * density) + state.hydrogenLogit;
          expect(left - (Math.log(states) - exponent)).toBeCloseTo(0, 9);
        },
      ),
    );
  });

  it("strips helium twice at 30,000 K and leaves everything neutral at 1,500 K", () => {
    const hot = sahaEquilibrium(30000, 1e9, 0.08, constants);
    expect(hot.ionized).toBeCloseTo(1.16, 10);
    const cold = sahaEquilibrium(1500, 1e9, 0.08, constants);
    expect(cold.ionized).toBeGreaterThan(0);
    expect(cold.ionized).toBeLessThan(1e-8);
  });

  it("falls monotonically to zero without underflow trouble from 8,000 K to 3 K", () => {
    let before = 2;
    for (let temperature = 8000; temperature > 3; temperature /= 1.05) {
      const now = sahaEquilibrium(temperature, 1e9 * (temperature / 3000) ** 3, 0.08, constants).ionized;
      expect(now).toBeLessThanOrEqual(before);
      expect(now).toBeGreaterThanOrEqual(0);
      before = now;
    }
    expect(before).toBe(0);
  });
});
