import type { SessionStudyInput } from '@voltiplano/engine';
import warmArrival from '../../../../../examples/vicuna-warm-arrival.json';

/** What the rulers of the landing page move. */
export type Trial = {
  ambientC: number;
  startTempC: number;
  stationKw: number;
  /** Share of every ledge of the taper. */
  ledges: number;
};

export const initialTrial: Trial = { ambientC: 10, startTempC: 12, stationKw: 180, ledges: 1 };

// The compiler widens a JSON file's words to strings; the engine checks the study itself.
const vicuna = warmArrival as unknown as SessionStudyInput;

/** The invented van's study with the rulers' values in it. */
export function trialStudy({ ambientC, startTempC, stationKw, ledges }: Trial): SessionStudyInput {
  const { taper } = vicuna.strategy;
  if (taper.shape !== 'ledges')
    throw new Error(`The trial needs a taper of ledges, but the example has "${taper.shape}".`);
  const steps = taper.steps.map((step) => ({ ...step, value: step.value * ledges }));
  return {
    ...vicuna,
    station: { ...vicuna.station, powerMaxKw: stationKw },
    strategy: { ...vicuna.strategy, taper: { ...taper, steps } },
    session: { ...vicuna.session, ambientC, startTempC },
  };
}

/** Runs kept in grey behind the hero's curve, by the temperature they start at [°C]. */
export const ghosts = [
  { startTempC: 24, study: trialStudy({ ambientC: 20, startTempC: 24, stationKw: 250, ledges: 1 }) },
  { startTempC: -4, study: trialStudy({ ambientC: -10, startTempC: -4, stationKw: 250, ledges: 1 }) },
] as const;

/** The same arrival with every ledge lowered, beside the study as it is. */
export const baselinePair = [
  trialStudy({ ambientC: 26, startTempC: 33, stationKw: 250, ledges: 0.8 }),
  trialStudy({ ambientC: 26, startTempC: 33, stationKw: 250, ledges: 1 }),
] as const;
