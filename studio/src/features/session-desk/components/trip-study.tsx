import { useState } from 'react';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { saveFile } from '../../../charts/chart-export.ts';
import { fileNameOf } from '../../../charts/export-text.ts';
import { Button } from '../../../components/button.tsx';
import { Caution } from '../../../components/caution.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Menu, MenuItem, MenuRule } from '../../../components/menu.tsx';
import { Moment } from '../../../components/moment.tsx';
import { Notice } from '../../../components/notice.tsx';
import { TitleBlock } from '../../../components/title-block.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { studyDifferences } from '../../../lib/study-differences.ts';
import { useUnits } from '../../../lib/units.ts';
import type { StudyPlace } from '../api/study-query.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';
import { useStudyDeeds } from '../hooks/use-study-deeds.ts';
import { revisionNumbers } from '../model/revision-numbers.ts';
import { stateWords } from '../../../lib/study-names.ts';
import { studyKindLine } from '../model/study-line.ts';
import { RevisionList } from './revision-list.tsx';
import { StudyActivity } from './study-activity.tsx';

/** What the whole time of a trip is called. */
const TRIP_END = 'door to door';

type Props = { place: StudyPlace; study: Study };

/** A study that has no desk yet, to be read: what it starts from, what it came to, and its history. */
export function TripStudy({ place, study }: Props) {
  const { may } = useWorkspace();
  const history = useHistoryPlace();
  const deeds = useStudyDeeds(place);
  const cells = [
    { label: 'Revision', value: `${study.revision}, ${stateWords[study.state]}` },
    { label: 'Changed', value: <Moment at={study.changedAt} /> },
    { label: 'Owner', value: study.owner?.name ?? 'account gone' },
    ...(study.archivedAt === null ? [] : [{ label: 'Kept', value: 'In the archive' }]),
  ];
  const actions = (
    <>
      <Button aria-pressed={history.isOpen} onClick={history.isOpen ? history.close : history.open}>
        History
      </Button>
      <TripMenu place={place} study={study} />
    </>
  );
  return (
    <>
      <TitleBlock kind={studyKindLine(study)} title={study.title || 'Untitled study'} cells={cells} actions={actions} />
      <div className="reading-sheet">
        <Notice>
          Trips are run by the command line for now: export the study file and give it to <code>voltiplano run</code>.
        </Notice>
        {history.isOpen ? (
          <section className="history" aria-label="History">
            <div className="bar">
              <h2>History</h2>
              <button type="button" className="lnk" onClick={history.close}>
                Back to the inputs
              </button>
            </div>
            <RevisionList
              place={place}
              newest={study.revision}
              end={TRIP_END}
              now={() => study.working.inputs}
              actions={(revision) =>
                may('edit-studies') && (
                  <button type="button" className="lnk" onClick={() => void deeds.copy(revision)}>
                    Copy to a new study
                  </button>
                )
              }
            />
            <StudyActivity place={place} />
          </section>
        ) : (
          <Inputs study={study} />
        )}
        <Caution invented />
      </div>
    </>
  );
}

function Inputs({ study }: { study: Study }) {
  const units = useUnits();
  const numbers = revisionNumbers(study.headline.numbers, null, units, TRIP_END);
  const { format: _format, version: _version, kind: _kind, title: _title, ...inputs } = study.working.inputs;
  return (
    <>
      <section aria-labelledby="numbers-title">
        <div className="bar">
          <h2 id="numbers-title">What it came to</h2>
          <span className="aside">{`revision ${study.revision}`}</span>
        </div>
        {numbers.length === 0 ? (
          <p className="text-label text-ink2">
            {study.headline.failure ?? 'No numbers are kept for this kind of study.'}
          </p>
        ) : (
          <dl className="heads">
            {numbers.map(({ caption, value, unit }) => (
              <div key={caption}>
                <dt>{caption}</dt>
                <dd className="v">
                  {value}
                  <small>{unit}</small>
                </dd>
              </div>
            ))}
          </dl>
        )}
      </section>
      <section aria-labelledby="inputs-title" className="whole-inputs">
        <div className="bar">
          <h2 id="inputs-title">Inputs</h2>
        </div>
        <DifferenceList
          differences={studyDifferences(undefined, inputs, units.temperatureUnit)}
          before=""
          after="Value"
          caption="Inputs of the study"
        />
      </section>
    </>
  );
}

function TripMenu({ place, study }: Props) {
  const { may } = useWorkspace();
  const deeds = useStudyDeeds(place);
  const [isAsking, setAsking] = useState(false);
  const save = () => {
    const text = `${JSON.stringify(study.working.inputs, null, 2)}\n`;
    saveFile(new Blob([text], { type: 'application/json' }), fileNameOf(study.title, 'study', 'json'));
  };
  return (
    <>
      <Menu trigger={<Button>Study</Button>} align="end">
        <MenuItem onSelect={save}>Export the study file</MenuItem>
        <MenuItem onSelect={() => void deeds.copyLink()}>Copy the link</MenuItem>
        {may('edit-studies') && (
          <>
            <MenuRule />
            <MenuItem onSelect={() => void deeds.copy()}>Copy to a new study</MenuItem>
            {study.archivedAt === null ? (
              <MenuItem onSelect={() => setAsking(true)}>Put into the archive</MenuItem>
            ) : (
              <MenuItem onSelect={() => void deeds.unarchive()}>Take out of the archive</MenuItem>
            )}
          </>
        )}
      </Menu>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setAsking}
        title="Put this study into the archive?"
        about="It can still be read and copied, and no longer changed. Taking it out again brings everything back."
        confirm="Put into the archive"
        busy="Archiving"
        onConfirm={deeds.archive}
      />
    </>
  );
}
