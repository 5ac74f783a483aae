import { trialStudy } from './trial-study.ts';

/** The small map of the landing page: start temperature over station power. */
export const cliffTempsC = Array.from({ length: 15 }, (_, i) => -16 + 4 * i);
export const cliffPowersKw = Array.from({ length: 9 }, (_, i) => 50 + 25 * i);

/** Minutes from 10 to 80 % at which the ramp takes its next, darker step. */
const edgesMin = [30, 33, 37, 42, 50, 62, 80];

/** Step of the altitude ramp, 0 (fast) to 7 (slow or not reached). */
export function rampStep(minutes: number | null): number {
  return minutes === null ? edgesMin.length : edgesMin.filter((edge) => minutes >= edge).length;
}

/** One column of the map: a start temperature at every station power. */
export const cliffColumn = (startTempC: number) =>
  cliffPowersKw.map((stationKw) => trialStudy({ ambientC: 10, startTempC, stationKw, ledges: 1 }));
