/**
 * Backward differentiation of sixth order at equal steps: y_n = (360 y_1 - 450 y_2 + 400 y_3 - 225 y_4 + 72 y_5 - 10 y_6 + 60 h y'_n)/147.
 *
 * Stable for the real, negative slopes of ionization however stiff. Source: Gear 1971, table 11.1 (memory); a test derives it anew.
 */
export const pastWeights = Float64Array.of(360, -450, 400, -225, 72, -10).map((weight) => weight / 147);

/** 60/147, weight of h y'_n. */
export const slopeWeight = 60 / 147;

/** Extrapolation of the polynomial through six points to the next: 6, -15, 20, -15, 6, -1. */
export const predictionWeights = Float64Array.of(6, -15, 20, -15, 6, -1);

/** Points that the formula looks back at. */
export const lookBack = 6;

/** The same of fourth order, for the gas temperature: (48 d_1 - 36 d_2 + 16 d_3 - 3 d_4 + 12 h d'_n)/25. */
export const coolingWeights = Float64Array.of(48, -36, 16, -3).map((weight) => weight / 25);

/** 12/25, weight of h d'_n. */
export const coolingSlopeWeight = 12 / 25;
