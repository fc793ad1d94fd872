/**
 * The Gauss-Kronrod rule with 10 and 21 nodes on [-1, 1]: the 10-point Gauss-Legendre rule (exact to degree 19) and its
 * optimal extension by 11 nodes (exact to degree 31).
 *
 * Source: A. S. Kronrod 1965, Nodes and Weights of Quadrature Formulas; the digits are computed from the definition
 * (roots of P_10 and of its Stieltjes polynomial) by test/reference/numerics/gaussKronrod.py with 80 digits,
 * and rounded to the nearest double.
 * Only the positive halves are listed, from the outside inward: the rule is symmetric.
 */

/** Positive nodes of the 10-point Gauss rule. */
export const gaussNodes = Float64Array.of(
  0.9739065285171717,
  0.8650633666889845,
  0.6794095682990244,
  0.4333953941292472,
  0.14887433898163122,
);

/** Weights of `gaussNodes` in the Gauss rule. */
export const gaussWeights = Float64Array.of(
  0.06667134430868814,
  0.1494513491505806,
  0.21908636251598204,
  0.26926671930999635,
  0.29552422471475287,
);

/** Weights of `gaussNodes` in the Kronrod rule. */
export const gaussNodeKronrodWeights = Float64Array.of(
  0.032558162307964725,
  0.07503967481091996,
  0.10938715880229764,
  0.13470921731147334,
  0.14773910490133849,
);

/** Positive nodes that the Kronrod rule adds; the eleventh added node is 0. */
export const addedNodes = Float64Array.of(
  0.9956571630258081,
  0.9301574913557082,
  0.7808177265864169,
  0.5627571346686047,
  0.2943928627014602,
);

/** Weights of `addedNodes` in the Kronrod rule. */
export const addedNodeKronrodWeights = Float64Array.of(
  0.011694638867371874,
  0.054755896574351995,
  0.0931254545836976,
  0.12349197626206584,
  0.14277593857706009,
);

/** Weight of the node 0 in the Kronrod rule; the Gauss rule does not use it. */
export const centerKronrodWeight = 0.1494455540029169;
