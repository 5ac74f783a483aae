import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { Button } from '../../../components/button.tsx';
import { DifferenceList } from '../../../components/difference-list.tsx';
import { Notice } from '../../../components/notice.tsx';
import { toast } from '../../../components/toasts.tsx';
import { momentText } from '../../../lib/moment-text.ts';
import { useUnits } from '../../../lib/units.ts';
import type { ItemDesk } from '../hooks/use-item-draft.ts';
import { useNow } from '../hooks/use-now.ts';
import { itemDifferences } from '../model/item-content.ts';

type Props = { desk: ItemDesk; theirs: LibraryItem };

/** Somebody saved a revision while this one was being changed: both, where they differ, and the choice. */
export function ConflictPanel({ desk, theirs }: Props) {
  const { temperatureUnit } = useUnits();
  const now = useNow();
  const { base, draft } = desk;
  const who = theirs.changedBy?.name ?? 'Somebody';
  const differences = itemDifferences(theirs.kind, theirs, draft, temperatureUnit);
  const take = () => {
    const undo = desk.takeOver(theirs, `take revision ${theirs.revision}`);
    toast(`You see revision ${theirs.revision} now.`, { action: { word: 'Bring my changes back', take: undo } });
  };
  return (
    <section className="conflict" aria-label="Two people changed this part">
      <Notice kind="stop">
        {`${who} saved revision ${theirs.revision} ${momentText(theirs.changedAt, now)}, while you were changing revision ${base.revision}. Nothing of yours is lost.`}
      </Notice>
      {differences.length === 0 ? (
        <p className="item-quiet">Both say the same.</p>
      ) : (
        <DifferenceList
          differences={differences}
          before={`Revision ${theirs.revision}`}
          after="Yours"
          caption="Where the two differ"
        />
      )}
      <div className="form-actions">
        <Button go onClick={() => desk.keepMine(theirs)}>
          Keep mine on top of theirs
        </Button>
        <Button onClick={take}>Take theirs</Button>
      </div>
      <p className="item-quiet">
        Keeping yours makes your changes again on their revision and saves nothing yet. Taking theirs leaves yours under
        undo.
      </p>
    </section>
  );
}
