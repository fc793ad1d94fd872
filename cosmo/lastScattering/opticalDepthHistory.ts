import { lightSpeed } from "../constants";
import { NoAnswerError } from "../errors";
import {
  type Expansion,
  earlyDarkEnergySharePart,
  expansionPart,
  type ModelEvaluation,
  type ModelPart,
} from "../expansion";
import { hundredKmPerSecondPerMpc } from "../model";
import { findRoot, gaussLegendre, integrate } from "../numerics";
import { type Gas, gasPart, type IonizationHistory, ionizationHistoryPart } from "../recombination";
import { baryonLoadingToday } from "./baryonLoading";

/** Nodes a step of the history: the integrand is a polynomial of degree 5 times smooth functions there. */
const rule = gaussLegendre(8);

/** ln(1+z) beyond which a crossing is not looked for. */
const farthest = Math.log(1e7);

/**
 * Thomson and drag optical depth of one model over t = ln(1+z), reionization excluded, the residue of recombination and all
 * species' electrons included.
 *
 * tau(z) = int_0^z c sigma_T n_e dz/[H (1+z)]; tau_d = int dtau/R.
 * Method: Gauss-Legendre nodes on the steps of the ionization history, cumulated.
 */
export class OpticalDepthHistory {
  /** tau and tau_d at the points of the history's mesh. */
  private readonly depths: { photon: Float64Array; drag: Float64Array };
  private readonly scatteringToday: number;
  private readonly loadingToday: number;

  constructor(
    private readonly history: IonizationHistory,
    private readonly expansion: Expansion,
    gas: Gas,
    evaluation: ModelEvaluation,
  ) {
    this.scatteringToday =
      (lightSpeed * gas.constants.thomsonCrossSection * gas.hydrogenDensity) / hundredKmPerSecondPerMpc;
    this.loadingToday = baryonLoadingToday(evaluation.model);
    const points = history.mesh.length;
    const photon = new Float64Array(points);
    const drag = new Float64Array(points);
    for (let i = 1; i < points; i++) {
      const piece = this.piece(history.mesh[i - 1]!, history.mesh[i]!);
      photon[i] = photon[i - 1]! + piece.photon;
      drag[i] = drag[i - 1]! + piece.drag;
    }
    this.depths = { photon, drag };
  }

  /** dtau/dt = c sigma_T n_e/H. */
  rate(t: number): number {
    const onePlusRedshift = Math.exp(t);
    const density = this.scatteringToday * onePlusRedshift ** 3 * this.history.ionized(t);
    return density / this.expansion.rate(1 / onePlusRedshift);
  }

  /** R(t) = 3 omega_b/[4 omega_gamma (1+z)]. */
  loading(t: number): number {
    return this.loadingToday * Math.exp(-t);
  }

  /** tau or tau_d at t. */
  depth(kind: "photon" | "drag", t: number): number {
    const { mesh } = this.history;
    const last = mesh.length - 1;
    if (t > mesh[last]!) {
      const integrand = (s: number) => (kind === "photon" ? this.rate(s) : this.rate(s) / this.loading(s));
      return this.depths[kind][last]! + integrate(integrand, mesh[last]!, t).value;
    }
    const step = this.stepOf(t);
    return this.depths[kind][step]! + this.piece(mesh[step]!, t)[kind];
  }

  /** t at which the depth reaches a value. */
  crossing(kind: "photon" | "drag", value: number): number {
    const { mesh } = this.history;
    const table = this.depths[kind];
    const last = mesh.length - 1;
    let lower = 0;
    let upper = last;
    if (table[last]! < value) {
      lower = last;
      if (!(this.depth(kind, farthest) >= value)) {
        throw new NoAnswerError({
          where: kind === "photon" ? "lastScatteringRedshift" : "dragRedshift",
          reason: `the ${kind === "photon" ? "optical" : "drag"} depth does not reach ${value} below redshift 1e7: too few baryons`,
          hint: "raise baryonDensity",
        });
      }
      return findRoot((t) => this.depth(kind, t) - value, mesh[last]!, farthest).value;
    }
    while (upper - lower > 1) {
      const middle = (lower + upper) >> 1;
      if (table[middle]! < value) lower = middle;
      else upper = middle;
    }
    const below = table[lower]!;
    return findRoot((t) => below + this.piece(mesh[lower]!, t)[kind] - value, mesh[lower]!, mesh[upper]!).value;
  }

  private stepOf(t: number): number {
    const { mesh } = this.history;
    let lower = 0;
    let upper = mesh.length - 1;
    while (upper - lower > 1) {
      const middle = (lower + upper) >> 1;
      if (mesh[middle]! <= t) lower = middle;
      else upper = middle;
    }
    return lower;
  }

  /** tau and tau_d from one t to another, within one step of the mesh. */
  private piece(from: number, to: number): { photon: number; drag: number } {
    const half = (to - from) / 2;
    const middle = (to + from) / 2;
    let photon = 0;
    let drag = 0;
    for (let i = 0; i < rule.nodes.length; i++) {
      const t = middle + half * rule.nodes[i]!;
      const weighted = rule.weights[i]! * this.rate(t);
      photon += weighted;
      drag += weighted / this.loading(t);
    }
    return { photon: half * photon, drag: half * drag };
  }
}

/** The depths of the model. */
export const opticalDepthPart: ModelPart<OpticalDepthHistory> = {
  name: "optical depth",
  compute: (evaluation) => {
    evaluation.once(earlyDarkEnergySharePart);
    return new OpticalDepthHistory(
      evaluation.once(ionizationHistoryPart),
      evaluation.once(expansionPart),
      evaluation.once(gasPart),
      evaluation,
    );
  },
};
