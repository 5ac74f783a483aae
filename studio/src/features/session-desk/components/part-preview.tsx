import { useMemo, useState } from 'react';
import { SessionStrips } from '../../../charts/session-strips.tsx';
import { stripKeys, type StripKey } from '../../../charts/strip-specs.ts';
import { Caution } from '../../../components/caution.tsx';
import { ReadOnlyFields } from '../../../components/fields/read-only.ts';
import { ChoiceField } from '../../../components/fields/choice-field.tsx';
import { useAnswered, useRun } from '../hooks/run-context.ts';
import { useDesk } from '../hooks/use-desk.ts';
import type { SessionPartKind } from '../model/carriers.ts';
import { issuesOf } from '../model/derived.ts';
import { examples, type Example } from '../../../lib/examples.ts';
import { RunFailureNotice, WaitingInputs } from './run-notices.tsx';
import { SessionSentence } from './session-sentence.tsx';

/** The strips on which a part shows. */
const STRIPS: Record<SessionPartKind, readonly StripKey[]> = {
  cell: ['power', 'voltage', 'anode'],
  pack: ['power', 'current'],
  thermal: ['power', 'temperatures'],
  inlet: ['power', 'temperatures'],
  station: ['power', 'current'],
  strategy: ['power', 'temperatures', 'anode'],
};

type Props = {
  kind: SessionPartKind;
  carrier: Example;
  onCarrier: (example: Example) => void;
  /** Whether another example could not be fetched. */
  failed: boolean;
};

/** What the part does on an example that carries it; the rest of the example gives way where it must. */
export function PartPreview({ kind, carrier, onCarrier, failed }: Props) {
  const hasAnswer = useRun((run) => run.answer !== null);
  return (
    <section className="part-preview" aria-label={`On ${carrier.title}`}>
      <CarrierChoice carrier={carrier} onCarrier={onCarrier} />
      {failed && <p className="note err">That example could not be fetched. Choose it again.</p>}
      <RunFailureNotice />
      {hasAnswer ? <Answered kind={kind} /> : <p className="say waiting">Running the session.</p>}
      <Caution short invented />
    </section>
  );
}

function CarrierChoice({ carrier, onCarrier }: Pick<Props, 'carrier' | 'onCarrier'>) {
  const options = examples.map(({ title }) => ({ value: title, label: title }));
  return (
    <div className="part-carrier">
      {/* Which example shows the part is everybody's to choose. */}
      <ReadOnlyFields value={false}>
        <ChoiceField
          label="Shown on"
          value={carrier.title}
          options={options}
          onChange={(title) => onCarrier(examples.find((one) => one.title === title)!)}
        />
      </ReadOnlyFields>
    </div>
  );
}

function Answered({ kind }: { kind: SessionPartKind }) {
  const { answer } = useAnswered();
  const baseline = useRun((run) => run.baseline?.result ?? null);
  const working = useRun((run) => run.isWorking);
  const failed = useRun((run) => run.failure !== null);
  const waits = useDesk(({ sheet }) => issuesOf(sheet.draft).length > 0);
  const [cursor, setCursor] = useState<number | null>(null);
  const hidden = useMemo(() => new Set(stripKeys.filter((key) => !STRIPS[kind].includes(key))), [kind]);
  return (
    <>
      <WaitingInputs />
      <SessionSentence result={answer.result} />
      <SessionStrips
        result={answer.result}
        baseline={baseline}
        axis="time"
        hidden={hidden}
        cursor={cursor}
        onCursor={setCursor}
        stale={working || waits || failed}
        working={working}
      />
    </>
  );
}
