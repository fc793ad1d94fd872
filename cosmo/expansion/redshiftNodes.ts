import { type ModelPart, turningRedshiftPart } from "./expansion";

/** ln(1+z) at the far end of every search for a redshift: z = 1e10. */
const farthest = Math.log1p(1e10);
const gap = 0.05;

/**
 * The values of ln(1+z), 0 to 23 in steps of 0.05 or to just short of (1e-8) the turning point of a closed model, between which answers to
 * "at which redshift" are sought: closer than anything in a background model turns.
 */
export const redshiftNodesPart: ModelPart<Float64Array> = {
  name: "redshift nodes",
  compute: (evaluation) => {
    const turning = evaluation.once(turningRedshiftPart);
    const end = turning === undefined ? farthest : Math.min(farthest, Math.log1p(turning) * (1 - 1e-8));
    const count = Math.max(20, Math.ceil(end / gap));
    return Float64Array.from({ length: count + 1 }, (_, i) => (end * i) / count);
  },
};
