import type { RefObject } from 'react';
import { LedgerFlow } from '../../../charts/ledger-flow.tsx';
import { Caution } from '../../../components/caution.tsx';
import { HeadlineNumbers } from '../../../components/headline-numbers.tsx';
import { useUnits } from '../../../lib/units.ts';
import { useAnswered, useRun } from '../hooks/run-context.ts';
import { sessionHeadlines } from '../model/session-headlines.ts';
import { HeatSection } from './heat-section.tsx';
import { RunFailureNotice, WaitingInputs } from './run-notices.tsx';
import { SessionSentence } from './session-sentence.tsx';
import { StripsSection } from './strips-section.tsx';

type Drawing = RefObject<HTMLDivElement | null>;

/** The drawings that can be exported. */
export type Drawings = { stripsRef: Drawing; ledgerRef: Drawing };

/** Sentence, numbers, strips, ledger, heat: what the session does, in words first. */
export function ResultsPanel({ stripsRef, ledgerRef }: Drawings) {
  const hasAnswer = useRun((run) => run.answer !== null);
  return (
    <section className="res" aria-label="Results">
      <RunFailureNotice />
      {hasAnswer ? (
        <>
          <div className="res-head">
            <WaitingInputs />
            <Headlines />
          </div>
          <StripsSection drawing={stripsRef} />
          <LedgerSection drawing={ledgerRef} />
          <HeatSection />
        </>
      ) : (
        <p className="say waiting">Running the session.</p>
      )}
      <div className="res-foot">
        <p className="caution">The hot limit reads surfaces, so cores may pass its upper end.</p>
        <Caution invented />
      </div>
    </section>
  );
}

function Headlines() {
  const { answer, study } = useAnswered();
  const baseline = useRun((run) => run.baseline);
  const units = useUnits();
  return (
    <>
      <SessionSentence result={answer.result} />
      <HeadlineNumbers numbers={sessionHeadlines(answer.result, study, units, baseline?.result ?? null)} />
    </>
  );
}

function LedgerSection({ drawing }: { drawing: Drawing }) {
  const { answer } = useAnswered();
  return (
    <section aria-labelledby="ledger-title">
      <div className="bar">
        <h2 id="ledger-title">Ledger</h2>
        <span className="aside">
          energy from the grid to the cells; each loss is one ledge, heights to scale above the break
        </span>
      </div>
      <LedgerFlow ref={drawing} ledger={answer.result.energyLedger} />
    </section>
  );
}
