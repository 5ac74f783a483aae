import { useState, type ReactNode } from 'react';
import { useNavigate } from 'react-router-dom';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Notice } from '../../../components/notice.tsx';
import { toast } from '../../../components/toasts.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { formatAgo } from '../../../lib/moments.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { useUnits } from '../../../lib/units.ts';
import { useConflict } from '../hooks/use-conflict.ts';
import { useSaver } from '../hooks/study-desk-context.ts';
import { contentDifferences } from '../model/content-differences.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { contentOf, contentOfWorking } from '../model/working-content.ts';

type Props = {
  store: DeskStore;
  /** Whether the question stands before the desk; put off, the title block leads back to it. */
  isChoosing: boolean;
  onChoosing: (isChoosing: boolean) => void;
};

/** Two people changed the study: both sides, and the choice between them. Nothing is sent before. */
export function ConflictDialog({ store, isChoosing, onChoosing }: Props) {
  const { phase } = useSaver();
  const { person } = useWorkspace();
  if (phase.kind !== 'conflict') return null;
  const { theirs } = phase;
  const isOwn = theirs.changedBy?.id === person.id;
  const who = isOwn ? 'you, in another tab or on another device' : (theirs.changedBy?.name ?? 'somebody else');
  return (
    <Dialog
      title="Changed in two places"
      about={`Saved ${formatAgo(theirs.changedAt)} by ${who}, before your changes on this desk were. Nothing is sent until you choose.`}
      open={isChoosing}
      onOpenChange={onChoosing}
    >
      <Choice store={store} theirs={theirs} name={isOwn ? 'The other’s' : 'Theirs'} onDone={() => onChoosing(true)} />
    </Dialog>
  );
}

type ChoiceProps = { store: DeskStore; theirs: WorkingCopy; name: string; onDone: () => void };

function Choice({ store, theirs, name, onDone }: ChoiceProps) {
  const { temperatureUnit } = useUnits();
  const { keepMine, takeTheirs, keepBoth } = useConflict(store, theirs);
  const navigate = useNavigate();
  const [isCopying, setCopying] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const differences = contentDifferences(contentOf(store.get().sheet), contentOfWorking(theirs), temperatureUnit);
  const copy = async () => {
    setCopying(true);
    setProblem(null);
    try {
      const { path, title } = await keepBoth();
      onDone();
      toast(`Yours is kept as “${title}”`);
      await navigate(path);
    } catch (error) {
      setProblem(problemSentence(error));
    } finally {
      setCopying(false);
    }
  };
  const choose = (act: () => void) => () => {
    act();
    onDone();
  };
  return (
    <div className="study-conflict">
      <div className="long-list">
        {differences.length > 0 ? (
          <DifferenceList differences={differences} before="Yours" after={name} caption="Inputs that differ" />
        ) : (
          <p className="text-label text-ink2">All inputs are the same; only where parts were taken from differs.</p>
        )}
      </div>
      {problem && <Notice kind="stop">{problem}</Notice>}
      <dl className="conflict-choices">
        <Way act={<Button onClick={choose(keepMine)}>Keep mine</Button>}>
          Yours is written over it. What it was stays one step of undo away.
        </Way>
        <Way act={<Button onClick={choose(takeTheirs)}>Take theirs</Button>}>
          It comes onto the desk. Yours stays one step of undo away.
        </Way>
        <Way
          act={
            <Button busy={isCopying ? 'Saving the copy' : undefined} onClick={() => void copy()}>
              Keep both
            </Button>
          }
        >
          Yours is saved as a study of its own, which opens here. This one stays as they left it.
        </Way>
      </dl>
    </div>
  );
}

type WayProps = { act: ReactNode; children: ReactNode };

function Way({ act, children }: WayProps) {
  return (
    <div>
      <dt>{act}</dt>
      <dd>{children}</dd>
    </div>
  );
}
