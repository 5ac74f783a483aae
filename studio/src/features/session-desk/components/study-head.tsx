import { useQuery } from '@tanstack/react-query';
import { Button } from '../../../components/button.tsx';
import { TitleBlock } from '../../../components/title-block.tsx';
import { useNow } from '../../../lib/use-now.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { revisionQuery } from '../api/revision-queries.ts';
import { useSaver, useStudyDesk } from '../hooks/study-desk-context.ts';
import { useStudy } from '../hooks/use-study.ts';
import { useDesk } from '../hooks/use-desk.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';
import { changedPaths } from '../model/changes.ts';
import { changesOf } from '../model/derived.ts';
import { saveWords } from '../model/save-words.ts';
import { stateWords } from '../../../lib/study-names.ts';
import { studyKindLine } from '../model/study-line.ts';
import { BaselineCell } from './baseline-cell.tsx';
import { ExportMenu } from './export-menu.tsx';
import type { HeadTools } from './session-desk.tsx';
import { StudyMoreMenu } from './study-more-menu.tsx';
import { TitleField } from './title-field.tsx';

type Props = { tools: HeadTools; hidesChanges: boolean; onSave: () => void; onChoose: () => void };

/** The title block of a study of a workspace, with what can be done with it. */
export function StudyHead({ tools, hidesChanges, onSave, onChoose }: Props) {
  const { mayEdit } = useStudyDesk();
  const study = useStudy();
  const history = useHistoryPlace();
  const cells = [
    { label: 'Revision', value: `${study.revision}, ${stateWords[study.state]}` },
    { label: 'Baseline', value: <BaselineCell /> },
    { label: 'Changed', value: <ChangedWords /> },
    {
      label: 'Kept',
      value: mayEdit ? <KeptWords onChoose={onChoose} /> : <ReadOnlyWords hidesChanges={hidesChanges} />,
    },
    { label: 'Owner', value: study.owner?.name ?? 'account gone' },
  ];
  const actions = (
    <>
      <Button aria-pressed={history.isOpen} onClick={history.isOpen ? history.close : history.open}>
        History
      </Button>
      <ExportMenu stripsRef={tools.stripsRef} ledgerRef={tools.ledgerRef} />
      <StudyMoreMenu tools={tools} />
      {mayEdit && <SaveButton onSave={onSave} />}
    </>
  );
  return <TitleBlock kind={studyKindLine(study)} title={<TitleField />} cells={cells} actions={actions} />;
}

/** The next step while something changed since the newest revision. */
function SaveButton({ onSave }: { onSave: () => void }) {
  const { isChanged } = useStudy();
  const { phase } = useSaver();
  return (
    <Button go={isChanged || phase.kind !== 'kept'} onClick={onSave}>
      Save revision
    </Button>
  );
}

/** How many inputs are other than the baseline's or, without one, the newest revision's. */
function ChangedWords() {
  const { place } = useStudyDesk();
  const { revision } = useStudy();
  const hasBaseline = useDesk(({ sheet }) => sheet.baseline !== null);
  const ofBaseline = useDesk(({ sheet }) => changesOf(sheet).length);
  const { data: newest } = useQuery(revisionQuery(place, revision));
  const inputs = newest?.inputs;
  const sinceRevision = useDesk(({ sheet }) =>
    !hasBaseline && inputs?.kind === 'session' ? changedPaths(sheet.draft.study, inputs).length : null,
  );
  const isRetitled = useDesk(({ sheet }) => (sheet.draft.study.title ?? '') !== (inputs?.title ?? ''));
  if (hasBaseline) return inputsWords(ofBaseline);
  if (sinceRevision === null) return '';
  if (sinceRevision > 0) return `${inputsWords(sinceRevision)} since ${revision}`;
  return isRetitled ? `title since ${revision}` : 'nothing';
}

function inputsWords(count: number): string {
  return `${count} ${count === 1 ? 'input' : 'inputs'}`;
}

function KeptWords({ onChoose }: { onChoose: () => void }) {
  const state = useSaver();
  const now = useNow();
  const { text, isTrouble } = saveWords(state, now);
  return (
    <span className={isTrouble ? 'kept trouble' : 'kept'}>
      {text}
      {state.phase.kind === 'conflict' && (
        <button type="button" className="lnk" onClick={onChoose}>
          Choose which stay
        </button>
      )}
      <span className="unseen" role="status">
        {isTrouble ? text : ''}
      </span>
    </span>
  );
}

function ReadOnlyWords({ hidesChanges }: { hidesChanges: boolean }) {
  const { archivedAt } = useStudy();
  const { role } = useWorkspace();
  const why = archivedAt === null ? `Read only: ${role}` : 'In the archive';
  return (
    <span className="kept">
      {hidesChanges ? `${why}. Changes of yours that were not sent are held in this browser.` : why}
    </span>
  );
}
