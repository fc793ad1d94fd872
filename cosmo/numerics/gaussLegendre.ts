import { DomainError, NotConvergedError } from "../errors";

/** Nodes and weights of a quadrature rule on [-1, 1]. */
export interface QuadratureRule {
  /** Nodes in ascending order. */
  nodes: Float64Array;
  /** Weights, one a node; their sum is 2. */
  weights: Float64Array;
}

const rules = new Map<number, QuadratureRule>();

/**
 * Gauss-Legendre rule with n nodes on [-1, 1]: exact for polynomials up to degree 2n - 1.
 *
 * int_-1^1 f(x) dx = sum_i w_i f(x_i),  P_n(x_i) = 0,  w_i = 2 / [(1 - x_i^2) P_n'(x_i)^2]
 *
 * @param n - number of nodes, an integer from 1 to 10000; anything else throws DomainError
 * @returns the rule; rules are kept and shared, so the arrays must not be written to
 *
 * Method: Newton iteration on P_n(cos theta) in theta, with the recurrence in differences P_k - P_(k-1), which keeps full
 * relative accuracy of 1 - x and of the weights near the ends.
 * Accuracy: nodes 5e-16 absolute, weights 1e-14 relative, tested for n up to 200.
 * Source: Abramowitz & Stegun 1964, 25.4.29 (weights), 22.16.6 (start value).
 *
 * @example
 * const { nodes, weights } = gaussLegendre(2); // nodes -+1/sqrt(3), weights 1
 */
export function gaussLegendre(n: number): QuadratureRule {
  const known = rules.get(n);
  if (known !== undefined) return known;
  if (!(Number.isInteger(n) && n >= 1 && n <= 10000)) {
    throw new DomainError({
      where: "gaussLegendre",
      argument: "n",
      rule: "must be an integer from 1 to 10000",
      value: n,
    });
  }
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 1; 2 * i <= n; i++) {
    const { node, weight } = nodeAndWeight(n, (Math.PI * (4 * i - 1)) / (4 * n + 2));
    nodes[n - i] = node;
    nodes[i - 1] = -node;
    weights[n - i] = weight;
    weights[i - 1] = weight;
  }
  if (n % 2 === 1) weights[(n - 1) / 2] = nodeAndWeight(n, Math.PI / 2).weight;
  const rule = { nodes, weights };
  rules.set(n, rule);
  return rule;
}

function nodeAndWeight(n: number, start: number): { node: number; weight: number } {
  let theta = start;
  for (let iteration = 0; iteration < 20; iteration++) {
    const halfSine = Math.sin(0.5 * theta);
    const gap = 2 * halfSine * halfSine; // 1 - x without cancellation
    let value = 1;
    let difference = 0;
    for (let k = 0; k < n; k++) {
      difference = (k * difference - (2 * k + 1) * gap * value) / (k + 1);
      value += difference;
    }
    // dP_n/dtheta = n (x P_n - P_(n-1)) / sin(theta)
    const slope = (n * (difference - gap * value)) / Math.sin(theta);
    const change = value / slope;
    theta -= change;
    if (Math.abs(change) <= 1e-9 * theta) {
      // Newton has converged quadratically; the slope belongs to the angle before the last change, and its own slope is
      // -cot(theta) times itself.
      const corrected = slope * (1 + change / Math.tan(theta));
      return { node: Math.cos(theta), weight: 2 / (corrected * corrected) };
    }
  }
  throw new NotConvergedError({ where: "gaussLegendre", reason: `Newton iteration from angle ${start}`, value: theta });
}
