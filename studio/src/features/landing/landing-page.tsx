import './landing.css';
import { useMemo, useState } from 'react';
import { Caution } from '../../components/caution.tsx';
import { Notice } from '../../components/notice.tsx';
import { formatNumber } from '../../lib/format.ts';
import { useUnits } from '../../lib/units.ts';
import { HeroCurve } from './components/hero-curve.tsx';
import { NextSteps } from './components/next-steps.tsx';
import { LimitLegend } from './components/limit-legend.tsx';
import { ThreeColumns } from './components/three-columns.tsx';
import { TrialRulers } from './components/trial-rulers.tsx';
import { useRuns } from './hooks/use-runs.ts';
import { useTrialRun } from './hooks/use-trial-run.ts';
import { ghosts, initialTrial } from './model/trial-study.ts';

const ghostStudies = ghosts.map(({ study }) => study);

/** The front page: one charge curve, computed as it is looked at. */
export function LandingPage() {
  const [trial, setTrial] = useState(initialTrial);
  const { result, error } = useTrialRun(trial);
  const ghostRuns = useGhosts();
  return (
    <>
      <title>Voltiplano: charge-rate and thermal engineering</title>
      <section className="lead">
        <h1>Know the charge curve before you plug in.</h1>
        <div>
          <p>
            Describe the pack, the cooling, the station and the taper. See which limit holds the current back, minute by
            minute, and how hot the cells get.
          </p>
          <NextSteps />
        </div>
      </section>
      <HeroCurve result={result} ghosts={ghostRuns} />
      {error && (
        <div className="px-[24px] py-[12px]">
          <Notice kind="stop">The curve could not be computed: {error.message}</Notice>
        </div>
      )}
      <div className="rulew" />
      <TrialRulers trial={trial} onChange={setTrial} result={result} />
      <ThreeColumns />
      <LimitLegend />
      <section className="end">
        <Caution invented />
      </section>
    </>
  );
}

function useGhosts() {
  const runs = useRuns(ghostStudies);
  const units = useUnits();
  return useMemo(
    () =>
      ghosts.flatMap(({ startTempC }, i) => {
        const result = runs[i];
        const name = `at ${formatNumber(units.temperature(startTempC), 0)} ${units.temperatureUnit}`;
        return result ? [{ result, name }] : [];
      }),
    [runs, units],
  );
}
