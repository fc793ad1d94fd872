import { arcsecond } from "../constants";
import {
  askedValue,
  type Branch,
  expansionPart,
  type ModelEvaluation,
  type ModelPart,
  type ModelQuantity,
  redshiftNodesPart,
  requireAsked,
  solveRedshift,
  unitHubbleDistance,
} from "../expansion";
import { curvedSine, curvedVolume, findRoot } from "../numerics";
import type { Computed, QuantityArgument } from "../quantity";
import { comovingDistance } from "./comovingDistance";
import { curvaturePerArea } from "./transverseDistance";

/** The comoving distance at every node, in a closed model as far as the antipode. */
const distanceNodesPart: ModelPart<{ nodes: Float64Array; along: Float64Array }> = {
  name: "distances at the redshift nodes",
  compute: (evaluation) => {
    const nodes = evaluation.once(redshiftNodesPart);
    const curvature = curvaturePerArea(evaluation);
    const antipode = curvature > 0 ? Math.PI / Math.sqrt(curvature) : Number.POSITIVE_INFINITY;
    const along = new Float64Array(nodes.length);
    for (let i = 1; i < nodes.length; i++) {
      const low = nodes[i - 1]!;
      const stepTo = (s: number) => along[i - 1]! + comovingDistance(evaluation, Math.expm1(low), Math.expm1(s)).value;
      along[i] = stepTo(nodes[i]!);
      if (along[i]! >= antipode) {
        const end = findRoot((s) => stepTo(s) - antipode, low, nodes[i]!).value;
        return {
          nodes: Float64Array.of(...nodes.subarray(0, i), end),
          along: Float64Array.of(...along.subarray(0, i), antipode),
        };
      }
    }
    return { nodes, along };
  },
};

/** One of the distances, or what hangs on one, that can be asked back. */
interface Invertible {
  readonly name: string;
  readonly subject: string;
  readonly argument: QuantityArgument;
  readonly equation: string;
  /** Whether it can have an extremum: then names with `.near` and `.far` stand beside. */
  readonly branches: boolean;
  /** Where the curve is not what is asked for: what is, and the unit and the value of the curve. */
  readonly asked?: string;
  readonly unit?: string;
  readonly convert?: (value: number) => number;
  /** From D_C, D_M (Mpc), 1+z, c/H (Mpc) and the curvature (1/Mpc^2). */
  readonly form: (along: number, transverse: number, stretch: number, rate: number, curvature: number) => number;
}

const distance = askedValue("distance", "d", "Mpc");
const modulus: QuantityArgument = {
  name: "modulus",
  symbol: "μ",
  unit: "mag",
  rule: "must be a finite number",
  accepts: Number.isFinite,
};

const invertibles: readonly Invertible[] = [
  {
    name: "redshiftAtDistance",
    subject: "line-of-sight comoving distance",
    argument: distance,
    equation: "D_C(z) = d",
    branches: false,
    form: (along) => along,
  },
  {
    name: "redshiftAtTransverseDistance",
    subject: "transverse comoving distance",
    argument: distance,
    equation: "D_M(z) = d",
    branches: true,
    form: (_, transverse) => transverse,
  },
  {
    name: "redshiftAtAngularDiameterDistance",
    subject: "angular-diameter distance",
    argument: distance,
    equation: "D_A(z) = d",
    branches: true,
    form: (_, transverse, stretch) => transverse / stretch,
  },
  {
    name: "redshiftAtLuminosityDistance",
    subject: "luminosity distance",
    argument: distance,
    equation: "D_L(z) = d",
    branches: true,
    form: (_, transverse, stretch) => transverse * stretch,
  },
  {
    name: "redshiftAtDistanceModulus",
    subject: "luminosity distance",
    asked: "distance modulus",
    argument: modulus,
    equation: String.raw`\mu(z) = \mu`,
    branches: true,
    unit: "Mpc",
    convert: (value) => 10 ** ((value - 25) / 5),
    form: (_, transverse, stretch) => transverse * stretch,
  },
  {
    name: "redshiftAtVolumeDistance",
    subject: "volume-averaged distance",
    argument: distance,
    equation: "D_V(z) = d",
    branches: true,
    form: (_, transverse, stretch, rate) => Math.cbrt(transverse ** 2 * (stretch - 1) * rate),
  },
  {
    name: "redshiftAtComovingVolume",
    subject: "comoving volume",
    argument: askedValue("volume", "V", "Gpc3"),
    equation: "V_C(z) = V",
    branches: false,
    form: (along, _transverse, _stretch, _rate, curvature) => (4 * Math.PI * curvedVolume(along, curvature)) / 1e9,
  },
  {
    name: "redshiftAtProperScale",
    subject: "proper scale",
    argument: askedValue("scale", "s", "kpc/arcsec"),
    equation: "s(z) = s",
    branches: true,
    form: (_, transverse, stretch) => (1000 * arcsecond * transverse) / stretch,
  },
];

const byName = new Map(invertibles.map((each) => [each.name, each]));

/** The names of what can be asked back. */
export type InvertibleDistance =
  | "redshiftAtDistance"
  | "redshiftAtTransverseDistance"
  | "redshiftAtAngularDiameterDistance"
  | "redshiftAtLuminosityDistance"
  | "redshiftAtDistanceModulus"
  | "redshiftAtVolumeDistance"
  | "redshiftAtComovingVolume"
  | "redshiftAtProperScale";

/**
 * Redshift, 0 or more, at which a distance, or what hangs on one, has a value.
 *
 * @param name which: `redshiftAtDistance` is the line-of-sight comoving one. @param value in the unit of that quantity, 0 or more
 * (any finite number for a modulus). A value that the model does not reach up to z = 1e10, or up to the antipode of a closed
 * model: NoAnswerError, with what it reaches.
 * @param branch `near` or `far` of the maximum. The angular-diameter and volume-averaged distance and the proper scale have one, in a
 * closed model the transverse and the luminosity distance may. Without a branch, two answers are refused with both.
 * Method: distances at 460 nodes in ln(1+z), computed once a model, then Brent's method on the quadrature between. Accuracy 1e-12 of
 * 1+z, less at a maximum. Source: Hogg 1999, inverted.
 * @example redshiftAt(evaluation, "redshiftAtAngularDiameterDistance", 1500, "far").value
 */
export function redshiftAt(
  evaluation: ModelEvaluation,
  name: InvertibleDistance,
  value: number,
  branch?: Branch,
  where: string = name,
): Computed {
  const { subject, argument, form, convert, unit = argument.unit } = byName.get(name)!;
  requireAsked(argument, value, where);
  const { nodes, along } = evaluation.once(distanceNodesPart);
  const curvature = curvaturePerArea(evaluation);
  const expansion = evaluation.once(expansionPart);
  const shaped = (s: number, distanceThere: number) => {
    const stretch = Math.exp(s);
    const rate = unitHubbleDistance / expansion.rate(1 / stretch);
    return form(distanceThere, curvedSine(distanceThere, curvature), stretch, rate, curvature);
  };
  const at = (s: number) => {
    // From below: a bounced model's turning point, where the integrand is singular, is then met only when it is asked for.
    const nearest = Math.min(nodes.length - 1, Math.floor(s / nodes[1]!));
    const step = comovingDistance(evaluation, Math.expm1(nodes[nearest]!), Math.expm1(s), where);
    return shaped(s, along[nearest]! + step.value);
  };
  const values = nodes.map((s, i) => shaped(s, along[i]!));
  const target = convert === undefined ? value : convert(value);
  return solveRedshift({ where, subject, unit, nodes, values, at }, target, branch);
}

function describe({ name, subject, asked, argument, equation }: Invertible, branch?: Branch): ModelQuantity {
  const fullName = branch === undefined ? name : `${name}.${branch}`;
  return {
    name: fullName,
    symbol: "z",
    unit: "",
    arguments: [argument],
    description: `Redshift at which the ${asked ?? subject} has a value${branch === undefined ? "" : `, on the ${branch} side of its maximum`}`,
    equation,
    method: "Brent's method in ln(1+z), between nodes computed once a model",
    accuracy: 1e-10,
    sources: ["hogg1999", "brent1973"],
    compute: (evaluation, [value]) => redshiftAt(evaluation, name as InvertibleDistance, value!, branch, fullName),
  };
}

/** Every distance that can be asked back; those with a maximum also by branch. */
export const redshiftAtQuantities: readonly ModelQuantity[] = invertibles.flatMap((each) =>
  each.branches ? [describe(each), describe(each, "near"), describe(each, "far")] : [describe(each)],
);
