import { useQueryClient } from '@tanstack/react-query';
import type { StudyRevision } from '../../../../../server/src/contract/study.ts';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { revisionQuery } from '../api/revision-queries.ts';
import { useStudyDesk } from '../hooks/study-desk-context.ts';
import { useStudy } from '../hooks/use-study.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';
import { useStudyDeeds } from '../hooks/use-study-deeds.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { referenceOnly } from '../model/working-content.ts';
import { RevisionList } from './revision-list.tsx';
import { StudyActivity } from './study-activity.tsx';

type Props = { store: DeskStore };

/** The revisions of the study on the desk, in the place of its results. */
export function SessionHistory({ store }: Props) {
  const { place } = useStudyDesk();
  const { revision } = useStudy();
  const history = useHistoryPlace();
  return (
    <section className="res history" aria-label="History">
      <div className="bar">
        <h2>History</h2>
        <button type="button" className="lnk" onClick={history.close}>
          Back to the results
        </button>
      </div>
      <RevisionList
        place={place}
        newest={revision}
        now={() => store.get().sheet.draft.study}
        actions={(one) => <Actions store={store} revision={one} />}
      />
      <StudyActivity place={place} />
    </section>
  );
}

function Actions({ store, revision }: Props & { revision: number }) {
  const { place, mayEdit } = useStudyDesk();
  const { may } = useWorkspace();
  const { close } = useHistoryPlace();
  const deeds = useStudyDeeds(place);
  const { asBaseline, bringBack } = useRevisionOnDesk(store);
  const act = (word: string, take: () => void) => (
    <button type="button" className="lnk" aria-label={`${word}: revision ${revision}`} onClick={take}>
      {word}
    </button>
  );
  return (
    <>
      {act('Use as baseline', () => void asBaseline(revision).then((done) => done && close()))}
      {mayEdit && act('Bring back', () => void bringBack(revision).then((done) => done && close()))}
      {may('edit-studies') && act('Copy to a new study', () => void deeds.copy(revision))}
    </>
  );
}

/** Puts a revision behind the desk as baseline, or onto it as one step of undo; true where that was done. */
function useRevisionOnDesk(store: DeskStore) {
  const { place } = useStudyDesk();
  const client = useQueryClient();
  const read = async (revision: number): Promise<StudyRevision | null> => {
    try {
      return await client.fetchQuery(revisionQuery(place, revision));
    } catch (error) {
      toast(`Revision ${revision} could not be read. ${problemSentence(error)}`, { kind: 'stop' });
      return null;
    }
  };
  return {
    asBaseline: async (revision: number): Promise<boolean> => {
      const found = await read(revision);
      if (found?.inputs.kind !== 'session') return false;
      store.dispatch({ type: 'set-baseline', study: found.inputs, name: `Revision ${revision}` });
      return true;
    },
    bringBack: async (revision: number): Promise<boolean> => {
      const found = await read(revision);
      if (found?.inputs.kind !== 'session') return false;
      const draft = { study: found.inputs, pending: {} };
      const label = `bring back revision ${revision}`;
      store.dispatch({ type: 'draft', draft, references: found.parts.map(referenceOnly), label });
      const undo = { word: 'Undo', take: () => store.dispatch({ type: 'undo' }) };
      toast(`Revision ${revision} is on the desk`, { action: undo });
      return true;
    },
  };
}
