/**
 * Radau IIA with five stages: collocation at the right Radau points, order 9, stage order 5, L-stable.
 *
 * Sources: Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.5 (the methods), IV.8 (the transformation
 * of the linear systems and the embedded formula); Hairer & Wanner 1999, J. Comput. Appl. Math. 111, 93 (five stages).
 * The digits follow from the definition by test/reference/numerics/radau.py with 60 digits, rounded to the nearest double.
 */

/** Number of stages. */
export const STAGES = 5;

/** Nodes c_i on (0, 1]: the roots of P_5 - P_4, shifted. */
export const nodes = Float64Array.of(
  0.05710419611451768,
  0.2768430136381238,
  0.5835904323689168,
  0.8602401356562195,
  1,
);

/** The real eigenvalue gamma of the inverse of the Runge-Kutta matrix A. */
export const realEigenvalue = 6.2867047517292765;

/** The two pairs alpha +- i beta of complex eigenvalues of the inverse of A. */
export const complexEigenvalues = [
  { alpha: 5.70095329867179, beta: 3.2102656003085497 },
  { alpha: 3.655694325463572, beta: 6.543736899360077 },
] as const;

/**
 * T of A^-1 = T L T^-1, row by row, with L = blockdiag(gamma, [[alpha, beta], [-beta, alpha]], ...): the real
 * eigenvector, then real and imaginary part of one eigenvector a pair, last components 1.
 */
// biome-ignore format: a matrix
export const transformation = Float64Array.of(
  0.013576867344947943, -0.011478515255229515, 0.01401985889287541, -0.010242047817908826, -0.04767387729029572,
  0.0016179004017190875, -0.007668830749180163, -0.024708578426518527, 0.05017286451737106, 0.09433181918161143,
  0.07915785334744721, 0.01939846399882895, -0.08180035370375117, -0.23053953404341795, -0.1027030453801259,
  0.41225608268046143, 0.40760117128019907, -0.19968242788680252, 0.37789390224886127, -0.46674413033249434,
  1, 1, 0, 1, 0,
);

/** T^-1, row by row. */
// biome-ignore format: a matrix
export const inverseTransformation = Float64Array.of(
  27.697693775684087, 12.783337911304406, 3.20848938671343, -0.9514904122489162, 0.7415504960259897,
  -33.041880213519, -17.376953479063566, -0.17212906325400557, -0.09916977798254265, 0.5312281158383066,
  8.611443979875292, -9.699991409528808, -1.9147286396968743, -2.41869200608494, 1.0474634879353375,
  5.344186437834912, 4.593615567759161, -3.0363603234594243, 1.050660190231459, -0.27277861186429625,
  -3.748059807439805, 3.984965736343885, 1.0444156416080188, -1.1840985681379486, 0.44991777015678036,
);

/** The nodes with the start of the step put first: 0, c_1 ... c_5. */
const points = Float64Array.of(0, ...nodes);

/** 1 / prod_(j != i) (p_i - p_j). */
const inverseDenominators = points.map((p, i) => points.reduce((d, q, j) => (j === i ? d : d / (p - q)), 1));

/**
 * Weights L_i(tau), i = 1..5, of the stage increments Z_i = Y_i - y_0 in the polynomial of degree 5 through the start
 * value and the stages: u(tau) = y_0 + sum_i L_i(tau) Z_i.
 *
 * @param tau - position in the step, 0 at its start, 1 at its end; other values extrapolate
 * @param out - receives the five weights
 */
export function stageWeights(tau: number, out: Float64Array): void {
  // Products of the distances from the left, then from the right: one pass each way.
  let product = tau;
  for (let i = 1; i <= STAGES; i++) {
    out[i - 1] = product * inverseDenominators[i];
    product *= tau - points[i];
  }
  product = 1;
  for (let i = STAGES; i >= 1; i--) {
    out[i - 1] *= product;
    product *= tau - points[i];
  }
}

/** Derivatives L_i'(0): they give h u'(0) from the stage increments. */
export const startSlopeWeights = slopeWeights(0);

/** Derivatives L_i'(1): they give h u'(1) = h f(y_1). */
export const endSlopeWeights = slopeWeights(1);

function slopeWeights(tau: number): Float64Array {
  const out = new Float64Array(STAGES);
  for (let i = 1; i <= STAGES; i++) {
    for (let k = 0; k <= STAGES; k++) {
      if (k === i) continue;
      let product = inverseDenominators[i];
      for (let j = 0; j <= STAGES; j++) if (j !== i && j !== k) product *= tau - points[j];
      out[i - 1] += product;
    }
  }
  return out;
}

/** Coefficients of the monic polynomial M with the roots c_i, from the constant upward. */
const monic = monicCoefficients();

function monicCoefficients(): Float64Array {
  const out = new Float64Array(STAGES + 1);
  out[0] = 1;
  nodes.forEach((c, degree) => {
    for (let k = degree + 1; k > 0; k--) out[k] = out[k - 1] - c * out[k];
    out[0] *= -c;
  });
  return out;
}

/**
 * The polynomial of degree 6 that vanishes at the start and at the stages, B(tau) = tau M(tau), M monic with the roots
 * c_i. It is the shape of the error of u where the stages are exact, as in a stiff component.
 */
export function stageBubble(tau: number): number {
  let product = tau;
  for (let i = 0; i < STAGES; i++) product *= tau - nodes[i];
  return product;
}

/** Q(tau) / (tau (1 - tau)) in powers of tau. */
const slopeBubbleCoefficients = slopeQuotient();

function slopeQuotient(): Float64Array {
  // Q / tau = sum_k m_k tau^k / (k + 1) / M(0); division by 1 - tau sums the coefficients from the bottom.
  const out = new Float64Array(STAGES);
  let sum = 0;
  for (let k = 0; k < STAGES; k++) {
    sum += monic[k] / (k + 1) / monic[0];
    out[k] = sum;
  }
  return out;
}

/**
 * The polynomial Q(tau) = int_0^tau M(s) ds / M(0): it vanishes at both ends, its slope is 1 at the start and 0 at the
 * stages. It is the shape of the error of u where the slopes at the stages are exact, as in a component that is not stiff.
 */
export function slopeBubble(tau: number): number {
  let sum = 0;
  for (let k = STAGES - 1; k >= 0; k--) sum = sum * tau + slopeBubbleCoefficients[k];
  return sum * tau * (1 - tau);
}

/** Largest |B| and |Q| on [0, 1], rounded up. */
export const LARGEST_STAGE_BUBBLE = 1.15e-3;
export const LARGEST_SLOPE_BUBBLE = 2.99e-2;
