import { gigayear, lightSpeed, megaparsec } from "../constants";
import { hundredKmPerSecondPerMpc } from "../model";

/** c/(100 km/s/Mpc) in Mpc: 2997.92458. */
export const unitHubbleDistance = lightSpeed / hundredKmPerSecondPerMpc / megaparsec;

/** 1/(100 km/s/Mpc) in Gyr: 9.778. */
export const unitHubbleTime = 1 / hundredKmPerSecondPerMpc / gigayear;
