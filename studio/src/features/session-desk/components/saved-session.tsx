import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { ReadOnlyFields } from '../../../components/fields/read-only.ts';
import { toast } from '../../../components/toasts.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import type { StudyPlace } from '../api/study-query.ts';
import { openStudyDesk, type OpenedStudyDesk } from '../hooks/open-study-desk.ts';
import { StudyDeskContext } from '../hooks/study-desk-context.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';
import { useStudySaving } from '../hooks/use-study-saving.ts';
import { ConflictDialog } from './conflict-dialog.tsx';
import { SaveRevisionDialog } from './save-revision-dialog.tsx';
import { SessionDesk } from './session-desk.tsx';
import { SessionHistory } from './session-history.tsx';
import { StudyHead } from './study-head.tsx';

type Props = { study: Study; mayEdit: boolean };

/** A session study of a workspace, opened from the server and from what this browser holds of it. */
export function SavedSession({ study, mayEdit }: Props) {
  const { workspaceId, person } = useWorkspace();
  const place = useMemo(() => ({ workspaceId, studyId: study.id }), [workspaceId, study.id]);
  const opened = useOpenedDesk(study, place, person.id, mayEdit);
  if (!opened) return <p className="desk-opening">Opening the study.</p>;
  return <StudyDesk opened={opened} place={place} mayEdit={mayEdit} />;
}

/** Opens the study as it is when the desk is put up; what others make of it later is taken in by the desk. */
function useOpenedDesk(study: Study, place: StudyPlace, personId: string, mayEdit: boolean) {
  const client = useQueryClient();
  const [first] = useState(study);
  const [opened, setOpened] = useState<OpenedStudyDesk | null>(null);
  const [error, setError] = useState<unknown>(null);
  // Speaks to this browser's storage and tabs.
  useEffect(() => {
    let gone = false;
    openStudyDesk({ study: first, place, personId, mayEdit, client }).then(
      (desk) => !gone && setOpened(desk),
      (reason: unknown) => !gone && setError(reason),
    );
    return () => {
      gone = true;
    };
  }, [first, place, personId, mayEdit, client]);
  // The router shows what went wrong and how to go on.
  if (error) throw error instanceof Error ? error : new Error('The study could not be opened');
  return opened;
}

type DeskProps = { opened: OpenedStudyDesk; place: StudyPlace; mayEdit: boolean };

function StudyDesk({ opened, place, mayEdit }: DeskProps) {
  const { store, saver, found, hidesChanges } = opened;
  const { may } = useWorkspace();
  const [isSaving, setSaving] = useState(false);
  const [isChoosing, setChoosing] = useState(true);
  const history = useHistoryPlace();
  const mayEditLibrary = mayEdit && may('edit-library');
  const desk = useMemo(() => ({ place, saver, mayEdit, mayEditLibrary }), [place, saver, mayEdit, mayEditLibrary]);
  const onSave = useMemo(() => ({ does: 'save a revision', act: () => setSaving(true) }), []);
  useStudySaving(opened, place, mayEdit);
  // Tells what was found in this browser, once.
  useEffect(() => {
    if (found) toast(found);
  }, [found]);
  return (
    <StudyDeskContext value={desk}>
      <ReadOnlyFields value={!mayEdit}>
        <SessionDesk
          store={store}
          report={null}
          {...(mayEdit ? { onSave } : {})}
          instead={history.isOpen ? <SessionHistory store={store} /> : undefined}
          head={(tools) => (
            <StudyHead
              tools={tools}
              hidesChanges={hidesChanges}
              onSave={onSave.act}
              onChoose={() => setChoosing(true)}
            />
          )}
        />
        {mayEdit && <SaveRevisionDialog store={store} open={isSaving} onOpenChange={setSaving} />}
        {mayEdit && <ConflictDialog store={store} isChoosing={isChoosing} onChoosing={setChoosing} />}
      </ReadOnlyFields>
    </StudyDeskContext>
  );
}
