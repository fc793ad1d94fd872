import { NoAnswerError } from "../errors";
import type { ClosedModel } from "../model";

/** Refuses a model without baryons, matter or radiation: the fits of last scattering are powers of all three. */
export function requireDensities(model: ClosedModel, where: string): void {
  const missing = [
    ["baryons", model.baryonDensity],
    ["matter", model.matterDensity],
    ["radiation (photonTemperature 0)", model.photonTemperature],
  ].find(([, value]) => !((value as number) > 0));
  if (missing !== undefined) {
    throw new NoAnswerError({ where, reason: `this model has no ${missing[0]}, and the fit is a power of them` });
  }
}
