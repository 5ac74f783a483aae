import { parseSessionStudy, simulateSession } from '@voltiplano/engine';
import { describe, expect, it } from 'vitest';
import { initialTrial, trialStudy } from './trial-study.ts';

const endMin = (change: Partial<typeof initialTrial>) =>
  simulateSession(parseSessionStudy(trialStudy({ ...initialTrial, ...change })), { everyS: 600 }).result.metrics.endMin;

describe('trialStudy', () => {
  it('is a study the engine takes at every end of the rulers', () => {
    for (const ambientC of [-20, 40])
      for (const startTempC of [-10, 40])
        for (const stationKw of [50, 250])
          for (const ledges of [0.7, 1.3])
            expect(() => parseSessionStudy(trialStudy({ ambientC, startTempC, stationKw, ledges }))).not.toThrow();
  });
  it('charges slower on a weaker station and under lower ledges', () => {
    const as = endMin({});
    expect(endMin({ stationKw: 80 })).toBeGreaterThan(as);
    expect(endMin({ ledges: 0.7 })).toBeGreaterThan(as);
  });
});
